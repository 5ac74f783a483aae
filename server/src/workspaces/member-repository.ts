import type { Role } from '../contract/roles.ts';
import type { Member } from '../contract/workspace.ts';
import type { Core } from '../core.ts';
import { HttpProblem } from '../http/problem.ts';
import type { WorkspaceAccess } from './workspace-access.ts';

/** Members of the workspace by name. */
export async function listMembers(core: Core, access: WorkspaceAccess): Promise<Member[]> {
  access.require('read');
  const rows = await selectMembers(core, access).orderBy('people.name').orderBy('people.id').execute();
  return rows.map(asMember);
}

/** @throws {HttpProblem} `NOT_FOUND` */
export async function getMember(core: Core, access: WorkspaceAccess, personId: string): Promise<Member> {
  access.require('read');
  const row = await selectMembers(core, access).where('people.id', '=', personId).executeTakeFirst();
  if (!row) throw new HttpProblem('NOT_FOUND', 'The workspace has no such member.');
  return asMember(row);
}

/** @throws {HttpProblem} `LAST_OWNER` if the workspace would be left without an owner */
export async function setMemberRole(core: Core, access: WorkspaceAccess, personId: string, role: Role): Promise<void> {
  access.require('manage');
  if (role !== 'owner') await requireOtherOwner(core, access, personId);
  await core.db
    .updateTable('members')
    .set({ role })
    .where('workspaceId', '=', access.workspaceId)
    .where('personId', '=', personId)
    .execute();
}

/** Takes another member out. @throws {HttpProblem} `LAST_OWNER` */
export async function deleteMember(core: Core, access: WorkspaceAccess, personId: string): Promise<void> {
  access.require('manage');
  await endMembership(core, access, personId);
}

/** Takes the caller out. @throws {HttpProblem} `LAST_OWNER`, `SESSION_REQUIRED` */
export async function deleteOwnMembership(core: Core, access: WorkspaceAccess): Promise<void> {
  await endMembership(core, access, access.requirePerson());
}

/** API tokens of the person for the workspace end with the membership; coming back does not wake them. */
async function endMembership(core: Core, access: WorkspaceAccess, personId: string): Promise<void> {
  const { db, now } = core;
  await requireOtherOwner(core, access, personId);
  await db
    .updateTable('apiTokens')
    .set({ revokedAt: now() })
    .where('workspaceId', '=', access.workspaceId)
    .where('personId', '=', personId)
    .where('revokedAt', 'is', null)
    .execute();
  await db
    .deleteFrom('members')
    .where('workspaceId', '=', access.workspaceId)
    .where('personId', '=', personId)
    .execute();
}

async function requireOtherOwner({ db }: Core, access: WorkspaceAccess, personId: string): Promise<void> {
  const owners = await db
    .selectFrom('members')
    .select('personId')
    .where('workspaceId', '=', access.workspaceId)
    .where('role', '=', 'owner')
    .execute();
  if (owners.length === 1 && owners[0]?.personId === personId) {
    throw new HttpProblem('LAST_OWNER', 'A workspace keeps at least one owner. Make another member owner first.');
  }
}

function selectMembers({ db }: Core, access: WorkspaceAccess) {
  return db
    .selectFrom('members')
    .innerJoin('people', 'people.id', 'members.personId')
    .select(['people.id as personId', 'people.name', 'people.email', 'members.role', 'members.joinedAt'])
    .where('members.workspaceId', '=', access.workspaceId);
}

function asMember({ joinedAt, ...member }: Omit<Member, 'joinedAt'> & { joinedAt: number }): Member {
  return { ...member, joinedAt: new Date(joinedAt).toISOString() };
}
