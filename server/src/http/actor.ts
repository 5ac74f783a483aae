import type { Role } from '../contract/roles.ts';

/** A person at a signed-in device. */
export type SessionActor = { kind: 'session'; personId: string; sessionId: string };

/** A script with an API token, which acts for a person in one workspace. */
export type TokenActor = { kind: 'api-token'; personId: string; tokenId: string; workspaceId: string; role: Role };

/** Who makes a call. */
export type Actor = SessionActor | TokenActor;
