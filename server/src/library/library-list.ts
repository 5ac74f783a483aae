import { type RawBuilder, sql } from 'kysely';
import type { Page } from '../contract/common.ts';
import type { QueryOf } from '../contract/endpoint.ts';
import type { LibraryItem, libraryEndpoints } from '../contract/library.ts';
import type { Core } from '../core.ts';
import { readPage, type Sorting } from '../db/keyset.ts';
import { matchText } from '../db/search-text.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { asItem, type ItemRow, selectItems } from './library-repository.ts';
import { studyCount } from './study-count.ts';

export type LibraryQuery = QueryOf<typeof libraryEndpoints.listLibrary>;

/** Items by kind, words and archive, sorted, in pages; and how many there are on all pages. */
export async function listItems(
  core: Core,
  access: WorkspaceAccess,
  query: LibraryQuery,
): Promise<Page<LibraryItem> & { total: number }> {
  const { sort, order } = query;
  const isWanted = conditionOf(query);
  const sorting = { name: `library by ${sort}`, order, keys: sortKeys[sort] };
  const { rows, nextCursor } = await readPage(selectItems(core, access).where(isWanted), sorting, query);
  const { total } = await core.db
    .selectFrom('libraryItems as item')
    .select((eb) => eb.fn.countAll<number>().as('total'))
    .where('item.workspaceId', '=', access.workspaceId)
    .where(isWanted)
    .executeTakeFirstOrThrow();
  return { items: rows.map(asItem), nextCursor, total };
}

const byName = [
  { sql: sql`item.sortName`, of: ({ sortName }: ItemRow) => sortName },
  { sql: sql`item.id`, of: ({ id }: ItemRow) => id },
];

const sortKeys: Record<LibraryQuery['sort'], Sorting<ItemRow>['keys']> = {
  name: byName,
  kind: [{ sql: sql`item.kind`, of: ({ kind }) => kind }, ...byName],
  changed: [
    { sql: sql`item.changedAt`, of: ({ changedAt }) => changedAt },
    { sql: sql`item.id`, of: ({ id }) => id },
  ],
  studies: [{ sql: studyCount, of: (row) => row.studyCount }, ...byName],
};

function conditionOf({ kind, q = '', archived }: LibraryQuery): RawBuilder<boolean> {
  const words = matchText(q);
  const conditions = [
    archived === 'yes' ? sql`item.archivedAt IS NOT NULL` : sql`item.archivedAt IS NULL`,
    ...(kind ? [sql`item.kind = ${kind}`] : []),
    ...(words ? [sql`item.seq IN (SELECT rowid FROM librarySearch WHERE librarySearch MATCH ${words})`] : []),
  ];
  return sql<boolean>`${sql.join(conditions, sql` AND `)}`;
}
