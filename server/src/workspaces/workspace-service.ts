import type { Role } from '../contract/roles.ts';
import type { Member, Workspace } from '../contract/workspace.ts';
import type { Core } from '../core.ts';
import { recordDeed } from '../activity/activity-repository.ts';
import { inTransaction } from '../db/database.ts';
import { invalidField } from '../http/problem.ts';
import { deleteMember, deleteOwnMembership, getMember, setMemberRole } from './member-repository.ts';
import type { WorkspaceAccess } from './workspace-access.ts';
import { deleteWorkspaceRow, readWorkspace, setWorkspaceName } from './workspace-repository.ts';

export function renameWorkspace(core: Core, access: WorkspaceAccess, name: string): Promise<Workspace> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const { name: before } = await readWorkspace(inner, access);
    await setWorkspaceName(inner, access, name);
    await record(inner, access, 'workspace.renamed', { from: before, to: name });
    return readWorkspace(inner, access);
  });
}

/** @param name  repeats the workspace's name, so that nobody deletes another one than they mean */
export function deleteWorkspace(core: Core, access: WorkspaceAccess, name: string): Promise<void> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const workspace = await readWorkspace(inner, access);
    if (workspace.name !== name) throw invalidField('body.name', `Repeat the name of the workspace, ${workspace.name}`);
    await deleteWorkspaceRow(inner, access);
    core.logger.warn({ workspaceId: access.workspaceId, personId: access.actor.personId }, 'workspace deleted');
  });
}

/** @throws {HttpProblem} `NOT_FOUND`, `LAST_OWNER` */
export function changeRole(core: Core, access: WorkspaceAccess, personId: string, role: Role): Promise<Member> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const before = await getMember(inner, access, personId);
    await setMemberRole(inner, access, personId, role);
    const detail = { name: before.name, from: before.role, to: role };
    if (before.role !== role) await record(inner, access, 'member.roleChanged', detail, personId);
    return { ...before, role };
  });
}

/** @throws {HttpProblem} `NOT_FOUND`, `LAST_OWNER` */
export function removeMember(core: Core, access: WorkspaceAccess, personId: string): Promise<void> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const { name } = await getMember(inner, access, personId);
    await deleteMember(inner, access, personId);
    await record(inner, access, 'member.removed', { name }, personId);
  });
}

/** @throws {HttpProblem} `LAST_OWNER`, `SESSION_REQUIRED` */
export function leaveWorkspace(core: Core, access: WorkspaceAccess): Promise<void> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const { name } = await getMember(inner, access, access.actor.personId);
    await deleteOwnMembership(inner, access);
    await record(inner, access, 'member.left', { name }, access.actor.personId);
  });
}

function record(
  core: Core,
  { workspaceId, actor: { personId } }: WorkspaceAccess,
  action: Parameters<typeof recordDeed>[1]['action'],
  detail: Record<string, string>,
  subjectId?: string,
): Promise<void> {
  return recordDeed(core, { workspaceId, personId, action, detail, subjectId });
}
