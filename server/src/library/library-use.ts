import type { LibraryUse } from '../contract/library.ts';
import type { Page, PageQuery } from '../contract/common.ts';
import type { Core } from '../core.ts';
import { cutPage, readCursor } from '../db/paging.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { getItem } from './library-repository.ts';

/** Studies whose working copy uses an item, newest first. @throws {HttpProblem} `NOT_FOUND` */
export async function listUse(
  core: Core,
  access: WorkspaceAccess,
  itemId: string,
  { cursor, limit }: PageQuery,
): Promise<Page<LibraryUse>> {
  await getItem(core, access, itemId);
  let query = core.db
    .selectFrom('studyParts')
    .innerJoin('studies', 'studies.id', 'studyParts.studyId')
    .select(['studies.id', 'studies.number', 'studies.title', 'studies.kind', 'studies.archivedAt'])
    .select('studyParts.revision')
    .where('studyParts.itemId', '=', itemId)
    .where('studies.workspaceId', '=', access.workspaceId)
    .orderBy('studies.number', 'desc')
    .limit(limit + 1);
  if (cursor !== undefined) query = query.where('studies.number', '<', readCursor(cursor));
  const { rows, nextCursor } = cutPage(await query.execute(), limit, ({ number }) => number);
  const items = rows.map(({ id, number, title, kind, revision, archivedAt }) => ({
    studyId: id,
    number,
    title,
    kind,
    revision,
    isArchived: archivedAt !== null,
  }));
  return { items, nextCursor };
}
