import { z } from 'zod';
import { idSchema, momentSchema } from './common.ts';
import { defineEndpoint } from './endpoint.ts';
import { roleSchema } from './roles.ts';

export const apiTokenSchema = z
  .object({
    id: idSchema,
    name: z.string(),
    role: roleSchema,
    personId: idSchema,
    personName: z.string(),
    createdAt: momentSchema,
    expiresAt: momentSchema,
    lastUsedAt: momentSchema.nullable(),
  })
  .meta({ id: 'ApiToken', description: 'A token that is not revoked; its secret is not kept' });
export type ApiToken = z.infer<typeof apiTokenSchema>;

const inWorkspace = z.object({ workspaceId: idSchema });

/** Calls about tokens for scripts. */
export const apiTokenEndpoints = {
  listApiTokens: defineEndpoint({
    id: 'listApiTokens',
    method: 'get',
    path: '/workspaces/:workspaceId/api-tokens',
    tag: 'API tokens',
    summary: 'Own tokens; an owner sees those of every member',
    access: 'read',
    params: inWorkspace,
    status: 200,
    answer: z.object({ items: z.array(apiTokenSchema) }),
    problems: ['SESSION_REQUIRED'],
  }),
  createApiToken: defineEndpoint({
    id: 'createApiToken',
    method: 'post',
    path: '/workspaces/:workspaceId/api-tokens',
    tag: 'API tokens',
    summary: 'Make a token, for a role not above the own one; its secret is shown this once',
    access: 'read',
    params: inWorkspace,
    body: z.object({
      name: z.string().trim().min(1, 'A name is needed').max(100),
      role: roleSchema,
      days: z.int().min(1).max(366).meta({ description: 'Days until it expires' }),
    }),
    status: 201,
    answer: z
      .object({
        token: z.string().meta({ description: 'Sent as `Authorization: Bearer …`' }),
        apiToken: apiTokenSchema,
      })
      .meta({ id: 'NewApiToken' }),
    problems: ['SESSION_REQUIRED', 'FORBIDDEN'],
    creates: true,
  }),
  revokeApiToken: defineEndpoint({
    id: 'revokeApiToken',
    method: 'delete',
    path: '/workspaces/:workspaceId/api-tokens/:tokenId',
    tag: 'API tokens',
    summary: 'Revoke a token: an own one, or as owner any',
    access: 'read',
    params: inWorkspace.extend({ tokenId: idSchema }),
    status: 204,
    problems: ['SESSION_REQUIRED', 'NOT_FOUND'],
  }),
} as const;
