import { asPersonRef } from '../account/person-ref.ts';
import type { LibraryItem, LibraryKind } from '../contract/library.ts';
import type { Core } from '../core.ts';
import { sortText } from '../db/search-text.ts';
import { newId } from '../db/secret-tokens.ts';
import { HttpProblem } from '../http/problem.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import type { LibraryContent } from './library-content.ts';
import { studyCount } from './study-count.ts';

/** Items of the workspace, each with its newest revision. */
export function selectItems({ db }: Core, access: WorkspaceAccess) {
  access.require('read');
  return db
    .selectFrom('libraryItems as item')
    .innerJoin('libraryRevisions as newest', (join) =>
      join.onRef('newest.itemId', '=', 'item.id').onRef('newest.revision', '=', 'item.revision'),
    )
    .leftJoin('people', 'people.id', 'item.changedBy')
    .select(['item.id', 'item.kind', 'item.name', 'item.sortName', 'item.revision', 'item.changedAt', 'item.changedBy'])
    .select(['item.archivedAt', 'newest.notes', 'newest.source', 'newest.body', 'people.name as personName'])
    .select(studyCount.as('studyCount'))
    .where('item.workspaceId', '=', access.workspaceId);
}

export type ItemRow = Awaited<ReturnType<ReturnType<typeof selectItems>['executeTakeFirstOrThrow']>>;

export function asItem(row: ItemRow): LibraryItem {
  const { id, kind, name, notes, source, revision, studyCount: count, archivedAt } = row;
  return {
    id,
    kind,
    name,
    notes,
    source,
    body: JSON.parse(row.body) as LibraryItem['body'],
    revision,
    changedAt: new Date(row.changedAt).toISOString(),
    changedBy: asPersonRef(row.changedBy, row.personName),
    archivedAt: archivedAt === null ? null : new Date(archivedAt).toISOString(),
    studyCount: count,
  };
}

/** @throws {HttpProblem} `NOT_FOUND` */
export async function getItem(core: Core, access: WorkspaceAccess, id: string): Promise<LibraryItem> {
  const row = await selectItems(core, access).where('item.id', '=', id).executeTakeFirst();
  if (!row) throw new HttpProblem('NOT_FOUND', 'The library has no such part.');
  return asItem(row);
}

/** Adds an item with its first revision. Needs the caller's transaction. */
export async function insertItem(
  core: Core,
  access: WorkspaceAccess,
  kind: LibraryKind,
  content: LibraryContent,
  message: string,
): Promise<LibraryItem> {
  access.require('edit-library');
  const { workspaceId, actor } = access;
  const [id, { name }] = [newId(), content];
  const changed = { changedAt: core.now(), changedBy: actor.personId, archivedAt: null };
  await core.db
    .insertInto('libraryItems')
    .values({ id, workspaceId, kind, name, sortName: sortText(name), revision: 1, ...changed })
    .execute();
  await insertRevision(core, access, { id, revision: 1 }, content, message);
  return getItem(core, access, id);
}

/** Adds the revision that follows the newest one. Needs the caller's transaction. */
export async function addRevision(
  core: Core,
  access: WorkspaceAccess,
  item: LibraryItem,
  content: LibraryContent,
  message: string,
): Promise<LibraryItem> {
  access.require('edit-library');
  const { name } = content;
  const revision = item.revision + 1;
  const changed = { changedAt: core.now(), changedBy: access.actor.personId };
  const { numUpdatedRows } = await core.db
    .updateTable('libraryItems')
    .set({ name, sortName: sortText(name), revision, ...changed })
    .where('id', '=', item.id)
    .where('workspaceId', '=', access.workspaceId)
    .executeTakeFirstOrThrow();
  if (numUpdatedRows !== 1n) throw new HttpProblem('NOT_FOUND', 'The library has no such part.');
  await insertRevision(core, access, { id: item.id, revision }, content, message);
  return getItem(core, access, item.id);
}

async function insertRevision(
  { db, now }: Core,
  { actor }: WorkspaceAccess,
  { id: itemId, revision }: { id: string; revision: number },
  { name, notes, source, body }: LibraryContent,
  message: string,
): Promise<void> {
  const made = { createdAt: now(), createdBy: actor.personId };
  await db
    .insertInto('libraryRevisions')
    .values({ itemId, revision, name, notes, source, body: JSON.stringify(body), message, ...made })
    .execute();
}

/** @param at  since when it lies in the archive [ms]; null takes it out */
export async function setArchived({ db }: Core, access: WorkspaceAccess, id: string, at: number | null): Promise<void> {
  access.require('edit-library');
  await db
    .updateTable('libraryItems')
    .set({ archivedAt: at })
    .where('id', '=', id)
    .where('workspaceId', '=', access.workspaceId)
    .execute();
}
