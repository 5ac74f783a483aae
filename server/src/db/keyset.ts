import { type RawBuilder, type ReferenceExpression, type SelectQueryBuilder, sql } from 'kysely';
import { invalidField } from '../http/problem.ts';

/** A value that a list is sorted by: how SQL has it, and how a row of the answer has it. Never NULL. */
type SortKey<Row> = { sql: RawBuilder<unknown>; of: (row: Row) => string | number };

/**
 * How a list is sorted: by its first key, where that is equal by the next, and so on; the last is unique. All go the
 * same way, so that one comparison of row values finds where a page starts, and an index can do it.
 */
export type Sorting<Row> = {
  /** Told apart from other lists and sorts: their cursors are refused. */
  name: string;
  order: 'asc' | 'desc';
  keys: readonly SortKey<Row>[];
};

/**
 * Reads one page of a sorted list, and one row more, which tells whether there is a next page. Rows that come or go
 * meanwhile move nothing: a page starts after the values of the last row of the page before.
 *
 * @throws {HttpProblem} `INVALID_INPUT` if the cursor is not of this list in this order
 */
export async function readPage<DB, TB extends keyof DB, Row extends object>(
  query: SelectQueryBuilder<DB, TB, Row>,
  sorting: Sorting<Row>,
  { cursor, limit }: { cursor?: string | undefined; limit: number },
): Promise<{ rows: Row[]; nextCursor: string | null }> {
  const { order, keys } = sorting;
  let page = query.limit(limit + 1);
  for (const key of keys) page = page.orderBy(key.sql as ReferenceExpression<DB, TB>, order);
  if (cursor !== undefined) page = page.where(isAfter(sorting, readValues(sorting, cursor)));
  const found = await page.execute();
  const rows = found.slice(0, limit) as Row[];
  const last = rows.at(-1);
  return { rows, nextCursor: found.length > limit && last ? cursorAt(sorting, last) : null };
}

type Values = readonly (string | number)[];

function isAfter<Row>({ order, keys }: Sorting<Row>, values: Values): RawBuilder<boolean> {
  const columns = sql.join(keys.map((key) => key.sql));
  return sql<boolean>`(${columns}) ${sql.raw(order === 'asc' ? '>' : '<')} (${sql.join(values)})`;
}

function cursorAt<Row>({ name, order, keys }: Sorting<Row>, row: Row): string {
  return Buffer.from(JSON.stringify([name, order, ...keys.map((key) => key.of(row))])).toString('base64url');
}

function readValues<Row>({ name, order, keys }: Sorting<Row>, cursor: string): Values {
  const [ofName, ofOrder, ...values] = parseList(cursor);
  const isWhole = values.every((value) => typeof value === 'string' || typeof value === 'number');
  if (ofName === name && ofOrder === order && values.length === keys.length && isWhole) return values;
  throw invalidField('query.cursor', 'Not a cursor of this list in this order');
}

function parseList(cursor: string): unknown[] {
  try {
    const parsed: unknown = JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8'));
    return Array.isArray(parsed) ? parsed : [];
  } catch {
    return [];
  }
}
