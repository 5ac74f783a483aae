import { asPersonRef } from '../account/person-ref.ts';
import type { Page, PageQuery } from '../contract/common.ts';
import type { LibraryRevision, LibraryRevisionRow } from '../contract/library.ts';
import type { Core } from '../core.ts';
import { cutPage, readCursor } from '../db/paging.ts';
import { HttpProblem } from '../http/problem.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { getItem } from './library-repository.ts';

/** Revisions of an item, newest first. @throws {HttpProblem} `NOT_FOUND` */
export async function listRevisions(
  core: Core,
  access: WorkspaceAccess,
  itemId: string,
  { cursor, limit }: PageQuery,
): Promise<Page<LibraryRevisionRow>> {
  await getItem(core, access, itemId);
  let query = selectRevisions(core, access, itemId)
    .orderBy('revision.revision', 'desc')
    .limit(limit + 1);
  if (cursor !== undefined) query = query.where('revision.revision', '<', readCursor(cursor));
  const { rows, nextCursor } = cutPage(await query.execute(), limit, ({ revision }) => revision);
  return { items: rows.map((row) => ({ ...headOf(row), name: row.name })), nextCursor };
}

/** One revision, whole. @throws {HttpProblem} `NOT_FOUND` */
export async function getRevision(
  core: Core,
  access: WorkspaceAccess,
  itemId: string,
  revision: number,
): Promise<LibraryRevision> {
  const row = await selectRevisions(core, access, itemId)
    .select(['revision.notes', 'revision.source', 'revision.body'])
    .where('revision.revision', '=', revision)
    .executeTakeFirst();
  if (!row) throw new HttpProblem('NOT_FOUND', 'The library has no such revision.');
  const { name, notes, source } = row;
  return { ...headOf(row), name, notes, source, body: JSON.parse(row.body) as LibraryRevision['body'] };
}

function selectRevisions({ db }: Core, access: WorkspaceAccess, itemId: string) {
  access.require('read');
  return db
    .selectFrom('libraryRevisions as revision')
    .innerJoin('libraryItems as item', 'item.id', 'revision.itemId')
    .leftJoin('people', 'people.id', 'revision.createdBy')
    .select(['revision.revision', 'revision.message', 'revision.createdAt', 'revision.createdBy', 'revision.name'])
    .select('people.name as personName')
    .where('revision.itemId', '=', itemId)
    .where('item.workspaceId', '=', access.workspaceId);
}

type HeadRow = Awaited<ReturnType<ReturnType<typeof selectRevisions>['executeTakeFirstOrThrow']>>;

function headOf({ revision, message, createdAt, createdBy, personName }: HeadRow) {
  return { revision, message, at: new Date(createdAt).toISOString(), by: asPersonRef(createdBy, personName) };
}
