import { type RawBuilder, sql } from 'kysely';
import type { AnswerOf, QueryOf } from '../contract/endpoint.ts';
import type { studyEndpoints } from '../contract/study.ts';
import type { Core } from '../core.ts';
import { readPage, type Sorting } from '../db/keyset.ts';
import { matchText } from '../db/search-text.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { asStudyRow, selectStudies } from './study-repository.ts';

export type StudyQuery = QueryOf<typeof studyEndpoints.listStudies>;
export type StudyPage = AnswerOf<typeof studyEndpoints.listStudies>;

/** One page of the studies that the query asks for. */
export async function listStudies(core: Core, access: WorkspaceAccess, query: StudyQuery): Promise<StudyPage> {
  access.require('read');
  const { rows, nextCursor } = await readPage(selectPlaces(core, access, query), sortingOf(query), query);
  return {
    items: await rowsOf(core, access, rows),
    nextCursor,
    total: await count(selectFound(core, access, query)),
    archivedTotal: await count(selectOwn(core, access).where('archivedAt', 'is not', null)),
    inReviewTotal: await count(
      selectOwn(core, access).where('archivedAt', 'is', null).where('state', '=', 'in-review'),
    ),
  };
}

/** Whole rows, in the order of their places: what is sorted stays narrow. */
async function rowsOf(core: Core, access: WorkspaceAccess, places: readonly { seq: number }[]) {
  if (places.length === 0) return [];
  const seqs = places.map(({ seq }) => seq);
  const rows = await selectStudies(core, access).where('studies.seq', 'in', seqs).execute();
  const bySeq = new Map(rows.map((row) => [row.seq, asStudyRow(row)]));
  return seqs.flatMap((seq) => bySeq.get(seq) ?? []);
}

function selectOwn({ db }: Core, access: WorkspaceAccess) {
  return db.selectFrom('studies').where('studies.workspaceId', '=', access.workspaceId);
}

async function count(studies: ReturnType<typeof selectOwn>): Promise<number> {
  const { total } = await studies.select(({ fn }) => fn.countAll<number>().as('total')).executeTakeFirstOrThrow();
  return total;
}

function selectFound(core: Core, access: WorkspaceAccess, query: StudyQuery) {
  const { q = '', kind, state, ownerId, itemId, archived } = query;
  const match = matchText(q);
  let found = selectOwn(core, access).where('archivedAt', archived === 'yes' ? 'is not' : 'is', null);
  if (kind) found = found.where('studies.kind', '=', kind);
  if (state) found = found.where('studies.state', '=', state);
  if (ownerId) found = found.where('studies.ownerId', '=', ownerId);
  if (itemId) {
    const using = core.db.selectFrom('studyParts').select('studyId').where('itemId', '=', itemId);
    found = found.where('studies.id', 'in', using);
  }
  // The workspace is one of the words, so that the index passes over everybody else's studies.
  const expression = `workspaceId : "${access.workspaceId}" AND {title partNames messages people} : (${match ?? ''})`;
  if (match) {
    const having = sql<number>`(SELECT rowid FROM studySearch WHERE studySearch MATCH ${expression})`;
    found = found.where('studies.seq', 'in', having);
  }
  return found;
}

/** What a row is sorted by and where it lies, nothing else. */
export function selectPlaces(core: Core, access: WorkspaceAccess, query: StudyQuery) {
  const { value, isMissing } = columns[query.sort];
  const missing = isMissing ? missingLast(isMissing, query.order) : sql.lit(0);
  return selectFound(core, access, query)
    .leftJoin('people as owner', 'owner.id', 'studies.ownerId')
    .select(['studies.seq'])
    .select([value.as('value'), sql<number>`${missing}`.as('missing')]);
}

type Place = { seq: number; value: string | number; missing: number };
type Column = { value: RawBuilder<string | number>; isMissing?: RawBuilder<number> };

/** What each sort compares. A value that may be missing has a stand-in, and `isMissing` puts the row at the end. */
const columns: Record<StudyQuery['sort'], Column> = {
  changed: { value: sql`studies.changedAt` },
  number: { value: sql`studies.number` },
  title: { value: sql`studies.sortTitle` },
  minutes10To80: { value: sql`coalesce(studies.minutes10To80, 0)`, isMissing: sql`studies.minutes10To80 IS NULL` },
  hottestCoreC: { value: sql`coalesce(studies.hottestCoreC, 0)`, isMissing: sql`studies.hottestCoreC IS NULL` },
  owner: { value: sql`coalesce(owner.name, '')`, isMissing: sql`owner.name IS NULL` },
};

/** Rises, or falls, towards the rows without a value: they come last in either order. */
function missingLast(isMissing: RawBuilder<number>, order: 'asc' | 'desc'): RawBuilder<number> {
  return order === 'asc' ? sql`(${isMissing})` : sql`NOT (${isMissing})`;
}

function sortingOf({ sort, order }: StudyQuery): Sorting<Place> {
  const { value, isMissing } = columns[sort];
  const compared = sort === 'owner' ? sql`${value} COLLATE NOCASE` : value;
  return {
    name: `studies by ${sort}`,
    order,
    keys: [
      ...(isMissing ? [{ sql: missingLast(isMissing, order), of: (row: Place) => row.missing }] : []),
      { sql: compared, of: ({ value: own }) => own },
      { sql: sql`studies.seq`, of: ({ seq }) => seq },
    ],
  };
}
