import type { Activity } from '../contract/workspace.ts';
import type { Page, PageQuery } from '../contract/common.ts';
import type { Core } from '../core.ts';
import { newId } from '../db/secret-tokens.ts';
import { cutPage, readCursor } from '../db/paging.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';

/** What somebody did in a workspace. `detail` holds names and values as they were then. */
export type Deed = {
  workspaceId: string;
  personId: string;
  action:
    | 'workspace.created'
    | 'workspace.renamed'
    | 'member.joined'
    | 'member.roleChanged'
    | 'member.removed'
    | 'member.left'
    | 'invitation.sent'
    | 'invitation.resent'
    | 'invitation.withdrawn'
    | 'apiToken.created'
    | 'apiToken.revoked'
    | 'library.added'
    | 'library.revised'
    | 'library.restored'
    | 'library.archived'
    | 'library.unarchived'
    | 'library.imported'
    | 'study.created'
    | 'study.revised'
    | 'study.copied'
    | 'study.archived'
    | 'study.unarchived';
  subjectId?: string;
  detail?: Record<string, string>;
};

/** Writes a deed down, in the transaction that does it. */
export async function recordDeed({ db, now }: Core, deed: Deed): Promise<void> {
  const { workspaceId, personId, action, subjectId = null, detail = {} } = deed;
  await db
    .insertInto('activity')
    .values({ id: newId(), workspaceId, personId, action, subjectId, detail: JSON.stringify(detail), createdAt: now() })
    .execute();
}

/** Deeds of a workspace, or those done to one subject, newest first. */
export async function listDeeds(
  { db }: Core,
  access: WorkspaceAccess,
  { cursor, limit, subjectId }: PageQuery & { subjectId?: string | undefined },
): Promise<Page<Activity>> {
  access.require('read');
  let query = db
    .selectFrom('activity')
    .leftJoin('people', 'people.id', 'activity.personId')
    .selectAll('activity')
    .select('people.name as personName')
    .where('activity.workspaceId', '=', access.workspaceId)
    .orderBy('activity.seq', 'desc')
    .limit(limit + 1);
  if (subjectId !== undefined) query = query.where('activity.subjectId', '=', subjectId);
  if (cursor !== undefined) query = query.where('activity.seq', '<', readCursor(cursor));
  const { rows, nextCursor } = cutPage(await query.execute(), limit, ({ seq }) => seq);
  const items = rows.map((row) => ({
    id: row.id,
    at: new Date(row.createdAt).toISOString(),
    personId: row.personId,
    personName: row.personName,
    action: row.action,
    subjectId: row.subjectId,
    detail: JSON.parse(row.detail) as Record<string, string>,
  }));
  return { items, nextCursor };
}
