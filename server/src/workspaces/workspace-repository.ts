import type { Workspace } from '../contract/workspace.ts';
import type { Core } from '../core.ts';
import { recordDeed } from '../activity/activity-repository.ts';
import { newId } from '../db/secret-tokens.ts';
import type { WorkspaceAccess } from './workspace-access.ts';

/** Makes a workspace and its owner. Needs the caller's transaction. */
export async function insertWorkspace(core: Core, personId: string, name: string): Promise<Workspace> {
  const { db, now } = core;
  const id = newId();
  const at = now();
  await db.insertInto('workspaces').values({ id, name, createdAt: at }).execute();
  await db.insertInto('members').values({ workspaceId: id, personId, role: 'owner', joinedAt: at }).execute();
  await recordDeed(core, { workspaceId: id, personId, action: 'workspace.created', detail: { name } });
  return { id, name, createdAt: new Date(at).toISOString(), role: 'owner' };
}

export async function readWorkspace({ db }: Core, access: WorkspaceAccess): Promise<Workspace> {
  access.require('read');
  const { id, name, createdAt } = await db
    .selectFrom('workspaces')
    .selectAll()
    .where('id', '=', access.workspaceId)
    .executeTakeFirstOrThrow();
  return { id, name, createdAt: new Date(createdAt).toISOString(), role: access.role };
}

export async function setWorkspaceName({ db }: Core, access: WorkspaceAccess, name: string): Promise<void> {
  access.require('manage');
  await db.updateTable('workspaces').set({ name }).where('id', '=', access.workspaceId).execute();
}

/** Deletes a workspace and, by its foreign keys, everything in it. */
export async function deleteWorkspaceRow({ db }: Core, access: WorkspaceAccess): Promise<void> {
  access.require('manage');
  await db.deleteFrom('workspaces').where('id', '=', access.workspaceId).execute();
}
