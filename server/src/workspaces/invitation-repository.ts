import type { Role } from '../contract/roles.ts';
import type { Invitation } from '../contract/workspace.ts';
import type { Core } from '../core.ts';
import { hashSecret, newId } from '../db/secret-tokens.ts';
import { HttpProblem } from '../http/problem.ts';
import type { WorkspaceAccess } from './workspace-access.ts';

/** A week: over a weekend and a short absence [ms]. */
const INVITATION_LIFE_MS = 7 * 24 * 3_600_000;

/** Keeps an invitation; an expired one for the same address gives way. @throws {HttpProblem} `ALREADY_INVITED` */
export async function insertInvitation(
  core: Core,
  access: WorkspaceAccess,
  { email, role, token }: { email: string; role: Role; token: string },
): Promise<Invitation> {
  access.require('manage');
  const { db, now } = core;
  await db
    .updateTable('invitations')
    .set({ withdrawnAt: now() })
    .where('workspaceId', '=', access.workspaceId)
    .where('email', '=', email)
    .where('expiresAt', '<=', now())
    .where('acceptedAt', 'is', null)
    .where('withdrawnAt', 'is', null)
    .execute();
  if ((await listInvitations(core, access)).some((open) => open.email === email)) {
    throw new HttpProblem(
      'ALREADY_INVITED',
      'An open invitation for this e-mail exists. Send it again, or withdraw it.',
    );
  }
  const id = newId();
  await db
    .insertInto('invitations')
    .values({
      id,
      workspaceId: access.workspaceId,
      email,
      role,
      tokenHash: hashSecret(token),
      invitedBy: access.actor.personId,
      createdAt: now(),
      expiresAt: now() + INVITATION_LIFE_MS,
      acceptedAt: null,
      withdrawnAt: null,
    })
    .execute();
  return getInvitation(core, access, id);
}

/** Open invitations, newest first. */
export async function listInvitations(core: Core, access: WorkspaceAccess): Promise<Invitation[]> {
  access.require('manage');
  const rows = await selectOpen(core, access).orderBy('invitations.createdAt', 'desc').execute();
  return rows.map((row) => asInvitation(row, core.now()));
}

/** @throws {HttpProblem} `NOT_FOUND` if there is no such open invitation */
export async function getInvitation(core: Core, access: WorkspaceAccess, id: string): Promise<Invitation> {
  access.require('manage');
  const row = await selectOpen(core, access).where('invitations.id', '=', id).executeTakeFirst();
  if (!row) throw new HttpProblem('NOT_FOUND', 'The workspace has no such open invitation.');
  return asInvitation(row, core.now());
}

/** Gives an invitation a new link and a new week. */
export async function renewInvitation(core: Core, access: WorkspaceAccess, id: string, token: string): Promise<void> {
  access.require('manage');
  await core.db
    .updateTable('invitations')
    .set({ tokenHash: hashSecret(token), expiresAt: core.now() + INVITATION_LIFE_MS })
    .where('id', '=', id)
    .where('workspaceId', '=', access.workspaceId)
    .execute();
}

export async function setWithdrawn({ db, now }: Core, access: WorkspaceAccess, id: string): Promise<void> {
  access.require('manage');
  await db
    .updateTable('invitations')
    .set({ withdrawnAt: now() })
    .where('id', '=', id)
    .where('workspaceId', '=', access.workspaceId)
    .execute();
}

/** The invitation that a link leads to, if it can still be accepted. The link itself is the permission. */
export function findByToken({ db, now }: Core, token: string) {
  return db
    .selectFrom('invitations')
    .innerJoin('workspaces', 'workspaces.id', 'invitations.workspaceId')
    .leftJoin('people', 'people.id', 'invitations.invitedBy')
    .selectAll('invitations')
    .select(['workspaces.name as workspaceName', 'people.name as invitedByName'])
    .where('tokenHash', '=', hashSecret(token))
    .where('acceptedAt', 'is', null)
    .where('withdrawnAt', 'is', null)
    .where('expiresAt', '>', now())
    .executeTakeFirst();
}

/** Makes the holder of a link a member. @throws {HttpProblem} `ALREADY_MEMBER` */
export async function insertMemberByInvitation(
  { db, now }: Core,
  invitation: { id: string; workspaceId: string; role: Role },
  personId: string,
): Promise<void> {
  const { workspaceId, role } = invitation;
  const joined = await db
    .insertInto('members')
    .values({ workspaceId, personId, role, joinedAt: now() })
    .onConflict((conflict) => conflict.doNothing())
    .executeTakeFirst();
  if (joined.numInsertedOrUpdatedRows === 0n) {
    throw new HttpProblem('ALREADY_MEMBER', 'You belong to this workspace already.');
  }
  await db.updateTable('invitations').set({ acceptedAt: now() }).where('id', '=', invitation.id).execute();
}

function selectOpen({ db }: Core, access: WorkspaceAccess) {
  return db
    .selectFrom('invitations')
    .leftJoin('people', 'people.id', 'invitations.invitedBy')
    .selectAll('invitations')
    .select('people.name as invitedByName')
    .where('invitations.workspaceId', '=', access.workspaceId)
    .where('acceptedAt', 'is', null)
    .where('withdrawnAt', 'is', null);
}

type OpenRow = Awaited<ReturnType<ReturnType<typeof selectOpen>['executeTakeFirstOrThrow']>>;

function asInvitation({ id, email, role, invitedByName, createdAt, expiresAt }: OpenRow, now: number): Invitation {
  return {
    id,
    email,
    role,
    invitedByName,
    createdAt: new Date(createdAt).toISOString(),
    expiresAt: new Date(expiresAt).toISOString(),
    isExpired: expiresAt <= now,
  };
}
