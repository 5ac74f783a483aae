import { z } from 'zod';
import { emailSchema, idSchema, momentSchema, oneTimeTokenSchema, pageOf, pageQuerySchema } from './common.ts';
import { membershipSchema } from './account.ts';
import { defineEndpoint } from './endpoint.ts';
import { roleSchema } from './roles.ts';

export const workspaceNameSchema = z.string().trim().min(1, 'A name is needed').max(100);

export const workspaceSchema = z
  .object({ id: idSchema, name: z.string(), createdAt: momentSchema, role: roleSchema })
  .meta({ id: 'Workspace', description: 'A workspace and the role that the caller has in it' });
export type Workspace = z.infer<typeof workspaceSchema>;

export const memberSchema = z
  .object({ personId: idSchema, name: z.string(), email: z.string(), role: roleSchema, joinedAt: momentSchema })
  .meta({ id: 'Member' });
export type Member = z.infer<typeof memberSchema>;

export const invitationSchema = z
  .object({
    id: idSchema,
    email: z.string(),
    role: roleSchema,
    invitedByName: z.string().nullable(),
    createdAt: momentSchema,
    expiresAt: momentSchema,
    isExpired: z.boolean(),
  })
  .meta({ id: 'Invitation', description: 'An invitation that is neither accepted nor withdrawn' });
export type Invitation = z.infer<typeof invitationSchema>;

export const invitationPreviewSchema = z
  .object({
    workspaceName: z.string(),
    role: roleSchema,
    email: z.string(),
    invitedByName: z.string().nullable(),
    hasAccount: z.boolean().meta({ description: 'Whether an account has that e-mail: sign in, or sign up' }),
  })
  .meta({ id: 'InvitationPreview' });
export type InvitationPreview = z.infer<typeof invitationPreviewSchema>;

export const activitySchema = z
  .object({
    id: idSchema,
    at: momentSchema,
    personId: idSchema.nullable(),
    personName: z.string().nullable(),
    action: z.string().meta({ description: 'What was done, as in `member.roleChanged`' }),
    subjectId: z.string().nullable(),
    detail: z.record(z.string(), z.string()),
  })
  .meta({ id: 'Activity' });
export type Activity = z.infer<typeof activitySchema>;

const inWorkspace = z.object({ workspaceId: idSchema });

/** Calls about workspaces, members, invitations and the activity log. */
export const workspaceEndpoints = {
  createWorkspace: defineEndpoint({
    id: 'createWorkspace',
    method: 'post',
    path: '/workspaces',
    tag: 'Workspaces',
    summary: 'Make a workspace; the caller becomes its owner',
    access: 'session',
    body: z.object({ name: workspaceNameSchema }),
    status: 201,
    answer: workspaceSchema,
    problems: [],
    creates: true,
  }),
  readWorkspace: defineEndpoint({
    id: 'readWorkspace',
    method: 'get',
    path: '/workspaces/:workspaceId',
    tag: 'Workspaces',
    summary: 'Read a workspace',
    access: 'read',
    params: inWorkspace,
    status: 200,
    answer: workspaceSchema,
    problems: [],
  }),
  renameWorkspace: defineEndpoint({
    id: 'renameWorkspace',
    method: 'patch',
    path: '/workspaces/:workspaceId',
    tag: 'Workspaces',
    summary: 'Rename a workspace',
    access: 'manage',
    params: inWorkspace,
    body: z.object({ name: workspaceNameSchema }),
    status: 200,
    answer: workspaceSchema,
    problems: [],
  }),
  deleteWorkspace: defineEndpoint({
    id: 'deleteWorkspace',
    method: 'delete',
    path: '/workspaces/:workspaceId',
    tag: 'Workspaces',
    summary: 'Delete a workspace and everything in it, for good; the name must be repeated',
    access: 'manage',
    params: inWorkspace,
    body: z.object({ name: z.string() }),
    status: 204,
    problems: ['INVALID_INPUT'],
  }),
  listMembers: defineEndpoint({
    id: 'listMembers',
    method: 'get',
    path: '/workspaces/:workspaceId/members',
    tag: 'Workspaces',
    summary: 'Members by name',
    access: 'read',
    params: inWorkspace,
    status: 200,
    answer: z.object({ items: z.array(memberSchema) }),
    problems: [],
  }),
  changeRole: defineEndpoint({
    id: 'changeRole',
    method: 'patch',
    path: '/workspaces/:workspaceId/members/:personId',
    tag: 'Workspaces',
    summary: 'Give a member another role',
    access: 'manage',
    params: inWorkspace.extend({ personId: idSchema }),
    body: z.object({ role: roleSchema }),
    status: 200,
    answer: memberSchema,
    problems: ['LAST_OWNER'],
  }),
  removeMember: defineEndpoint({
    id: 'removeMember',
    method: 'delete',
    path: '/workspaces/:workspaceId/members/:personId',
    tag: 'Workspaces',
    summary: 'Remove a member',
    access: 'manage',
    params: inWorkspace.extend({ personId: idSchema }),
    status: 204,
    problems: ['LAST_OWNER'],
  }),
  leaveWorkspace: defineEndpoint({
    id: 'leaveWorkspace',
    method: 'post',
    path: '/workspaces/:workspaceId/leave',
    tag: 'Workspaces',
    summary: 'Leave a workspace',
    access: 'read',
    params: inWorkspace,
    status: 204,
    problems: ['LAST_OWNER', 'SESSION_REQUIRED'],
  }),
  listInvitations: defineEndpoint({
    id: 'listInvitations',
    method: 'get',
    path: '/workspaces/:workspaceId/invitations',
    tag: 'Workspaces',
    summary: 'Open invitations, newest first',
    access: 'manage',
    params: inWorkspace,
    status: 200,
    answer: z.object({ items: z.array(invitationSchema) }),
    problems: [],
  }),
  invite: defineEndpoint({
    id: 'invite',
    method: 'post',
    path: '/workspaces/:workspaceId/invitations',
    tag: 'Workspaces',
    summary: 'Invite a person by mail, for a role',
    access: 'manage',
    params: inWorkspace,
    body: z.object({ email: emailSchema, role: roleSchema }),
    status: 201,
    answer: invitationSchema,
    problems: ['ALREADY_MEMBER', 'ALREADY_INVITED'],
    creates: true,
    limited: 'mail',
  }),
  resendInvitation: defineEndpoint({
    id: 'resendInvitation',
    method: 'post',
    path: '/workspaces/:workspaceId/invitations/:invitationId/resend',
    tag: 'Workspaces',
    summary: 'Mail a new link, which takes the place of the old one',
    access: 'manage',
    params: inWorkspace.extend({ invitationId: idSchema }),
    status: 200,
    answer: invitationSchema,
    problems: [],
    limited: 'mail',
  }),
  withdrawInvitation: defineEndpoint({
    id: 'withdrawInvitation',
    method: 'delete',
    path: '/workspaces/:workspaceId/invitations/:invitationId',
    tag: 'Workspaces',
    summary: 'Withdraw an invitation',
    access: 'manage',
    params: inWorkspace.extend({ invitationId: idSchema }),
    status: 204,
    problems: [],
  }),
  readInvitation: defineEndpoint({
    id: 'readInvitation',
    method: 'post',
    path: '/invitations/preview',
    tag: 'Workspaces',
    summary: 'What an invitation link leads to',
    access: 'anyone',
    body: z.object({ token: oneTimeTokenSchema }),
    status: 200,
    answer: invitationPreviewSchema,
    problems: ['LINK_INVALID'],
    limited: 'sign-in',
  }),
  acceptInvitation: defineEndpoint({
    id: 'acceptInvitation',
    method: 'post',
    path: '/invitations/accept',
    tag: 'Workspaces',
    summary: 'Join the workspace as the signed-in person',
    access: 'session',
    body: z.object({ token: oneTimeTokenSchema }),
    status: 200,
    answer: membershipSchema,
    problems: ['LINK_INVALID', 'INVITATION_FOR_OTHER', 'ALREADY_MEMBER'],
  }),
  listActivity: defineEndpoint({
    id: 'listActivity',
    method: 'get',
    path: '/workspaces/:workspaceId/activity',
    tag: 'Workspaces',
    summary: 'Who did what, newest first',
    access: 'read',
    params: inWorkspace,
    query: pageQuerySchema.extend({
      subjectId: z
        .string()
        .max(40)
        .optional()
        .meta({ description: 'Only what was done to this study, part or person' }),
    }),
    status: 200,
    answer: pageOf(activitySchema),
    problems: [],
  }),
} as const;
