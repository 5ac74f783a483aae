import { z } from 'zod';
import { emailSchema, idSchema, momentSchema, oneTimeTokenSchema, passwordSchema, personNameSchema } from './common.ts';
import { defineEndpoint } from './endpoint.ts';
import { roleSchema } from './roles.ts';

export const personSchema = z
  .object({ id: idSchema, email: z.string(), name: z.string(), hasPassword: z.boolean() })
  .meta({ id: 'Person' });
export type Person = z.infer<typeof personSchema>;

export const membershipSchema = z
  .object({ workspaceId: idSchema, workspaceName: z.string(), role: roleSchema })
  .meta({ id: 'Membership' });
export type Membership = z.infer<typeof membershipSchema>;

export const meSchema = z
  .object({ person: personSchema, workspaces: z.array(membershipSchema) })
  .meta({ id: 'Me', description: 'The signed-in person and the workspaces they belong to, oldest first' });
export type Me = z.infer<typeof meSchema>;

export const deviceSchema = z
  .object({
    id: idSchema,
    userAgent: z.string().meta({ description: 'What the browser called itself at sign-in' }),
    signedInAt: momentSchema,
    lastUsedAt: momentSchema,
    isThisOne: z.boolean(),
  })
  .meta({ id: 'Device' });
export type Device = z.infer<typeof deviceSchema>;

const newAccount = { email: emailSchema, name: personNameSchema, password: passwordSchema };

/** Calls about signing in and the own account. Success of sign-in, sign-up and refresh sets the cookies. */
export const accountEndpoints = {
  signInOptions: defineEndpoint({
    id: 'signInOptions',
    method: 'get',
    path: '/auth/options',
    tag: 'Signing in',
    summary: 'Ways to sign in that this server offers',
    access: 'anyone',
    status: 200,
    answer: z
      .object({
        provider: z
          .object({ name: z.string(), startUrl: z.string() })
          .nullable()
          .meta({ description: 'The OpenID Connect provider; open its address in the browser' }),
        mailboxUrl: z.string().nullable().meta({ description: 'Where mails can be read, in development only' }),
      })
      .meta({ id: 'SignInOptions' }),
    problems: [],
  }),
  signUp: defineEndpoint({
    id: 'signUp',
    method: 'post',
    path: '/auth/sign-up',
    tag: 'Signing in',
    summary: 'Make an account and its first workspace, and sign in',
    access: 'anyone',
    body: z.object({ ...newAccount, workspaceName: z.string().trim().min(1, 'A name is needed').max(100) }),
    status: 201,
    answer: meSchema,
    problems: ['EMAIL_TAKEN'],
    limited: 'sign-up',
  }),
  signUpInvited: defineEndpoint({
    id: 'signUpInvited',
    method: 'post',
    path: '/auth/sign-up-invited',
    tag: 'Signing in',
    summary: 'Make an account for the e-mail an invitation was sent to, join its workspace, and sign in',
    access: 'anyone',
    body: z.object({ token: oneTimeTokenSchema, name: personNameSchema, password: passwordSchema }),
    status: 201,
    answer: meSchema,
    problems: ['LINK_INVALID', 'EMAIL_TAKEN'],
    limited: 'sign-up',
  }),
  signIn: defineEndpoint({
    id: 'signIn',
    method: 'post',
    path: '/auth/sign-in',
    tag: 'Signing in',
    summary: 'Sign in with e-mail and password',
    access: 'anyone',
    body: z.object({ email: emailSchema, password: z.string().max(200) }),
    status: 200,
    answer: meSchema,
    problems: ['WRONG_CREDENTIALS'],
    limited: 'sign-in',
  }),
  refresh: defineEndpoint({
    id: 'refresh',
    method: 'post',
    path: '/auth/refresh',
    tag: 'Signing in',
    summary: 'Exchange the refresh cookie for new cookies; a spent one that comes back signs the device out',
    access: 'anyone',
    status: 204,
    problems: ['NOT_SIGNED_IN', 'SESSION_ENDED', 'REFRESH_REUSED'],
  }),
  signOut: defineEndpoint({
    id: 'signOut',
    method: 'post',
    path: '/auth/sign-out',
    tag: 'Signing in',
    summary: 'Sign this device out; succeeds also where nobody is signed in',
    access: 'anyone',
    status: 204,
    problems: [],
  }),
  startProvider: defineEndpoint({
    id: 'startProvider',
    method: 'get',
    path: '/auth/oidc/start',
    tag: 'Signing in',
    summary: 'Go to the OpenID Connect provider and come back signed in',
    access: 'anyone',
    query: z.object({
      next: z
        .string()
        .regex(/^\/(?![/\\])[^\\]*$/, 'Must be a path of this server')
        .max(500)
        .default('/')
        .meta({ description: 'Page to open afterwards' }),
    }),
    status: 302,
    problems: ['NOT_FOUND'],
    limited: 'sign-in',
  }),
  finishProvider: defineEndpoint({
    id: 'finishProvider',
    method: 'get',
    path: '/auth/oidc/callback',
    tag: 'Signing in',
    summary: 'Where the provider sends the browser back to; a failure opens /sign-in?problem=CODE',
    access: 'anyone',
    status: 302,
    problems: ['NOT_FOUND'],
    limited: 'sign-in',
  }),
  askReset: defineEndpoint({
    id: 'askReset',
    method: 'post',
    path: '/auth/password-reset',
    tag: 'Signing in',
    summary: 'Mail a link that sets a new password; the answer is the same whether the account exists',
    access: 'anyone',
    body: z.object({ email: emailSchema }),
    status: 202,
    problems: [],
    limited: 'mail',
  }),
  resetPassword: defineEndpoint({
    id: 'resetPassword',
    method: 'post',
    path: '/auth/password-reset/confirm',
    tag: 'Signing in',
    summary: 'Set a new password by the mailed link; every device is signed out',
    access: 'anyone',
    body: z.object({ token: oneTimeTokenSchema, password: passwordSchema }),
    status: 204,
    problems: ['LINK_INVALID'],
    limited: 'sign-in',
  }),
  confirmEmail: defineEndpoint({
    id: 'confirmEmail',
    method: 'post',
    path: '/auth/email-change/confirm',
    tag: 'Account',
    summary: 'Take the new e-mail by the link mailed to it',
    access: 'anyone',
    body: z.object({ token: oneTimeTokenSchema }),
    status: 204,
    problems: ['LINK_INVALID', 'EMAIL_TAKEN'],
    limited: 'sign-in',
  }),
  readMe: defineEndpoint({
    id: 'readMe',
    method: 'get',
    path: '/me',
    tag: 'Account',
    summary: 'Who is signed in',
    access: 'session',
    status: 200,
    answer: meSchema,
    problems: [],
  }),
  renameMe: defineEndpoint({
    id: 'renameMe',
    method: 'patch',
    path: '/me',
    tag: 'Account',
    summary: 'Change the own name',
    access: 'session',
    body: z.object({ name: personNameSchema }),
    status: 200,
    answer: personSchema,
    problems: [],
  }),
  changePassword: defineEndpoint({
    id: 'changePassword',
    method: 'post',
    path: '/me/password',
    tag: 'Account',
    summary: 'Change the password; every other device is signed out',
    access: 'session',
    body: z.object({ presentPassword: z.string().max(200), newPassword: passwordSchema }),
    status: 204,
    problems: ['WRONG_PASSWORD'],
    limited: 'sign-in',
  }),
  askEmailChange: defineEndpoint({
    id: 'askEmailChange',
    method: 'post',
    path: '/me/email-change',
    tag: 'Account',
    summary: 'Mail a link to the new e-mail; the old one is kept until the link is followed',
    access: 'session',
    body: z.object({ newEmail: emailSchema, password: z.string().max(200) }),
    status: 202,
    problems: ['WRONG_PASSWORD', 'EMAIL_TAKEN'],
    limited: 'mail',
  }),
  listDevices: defineEndpoint({
    id: 'listDevices',
    method: 'get',
    path: '/me/devices',
    tag: 'Account',
    summary: 'Devices that are signed in, last used first',
    access: 'session',
    status: 200,
    answer: z.object({ items: z.array(deviceSchema) }),
    problems: [],
  }),
  signOutDevice: defineEndpoint({
    id: 'signOutDevice',
    method: 'delete',
    path: '/me/devices/:deviceId',
    tag: 'Account',
    summary: 'Sign one device out',
    access: 'session',
    params: z.object({ deviceId: idSchema }),
    status: 204,
    problems: ['NOT_FOUND'],
  }),
  signOutEverywhere: defineEndpoint({
    id: 'signOutEverywhere',
    method: 'delete',
    path: '/me/devices',
    tag: 'Account',
    summary: 'Sign every device out, this one too',
    access: 'session',
    status: 204,
    problems: [],
  }),
} as const;
