import { invalidField } from '../http/problem.ts';

/**
 * Reads a cursor, which says where in an ordered list the next page starts.
 *
 * @throws {HttpProblem} `INVALID_INPUT` if this server did not make it
 */
export function readCursor(cursor: string): number {
  const text = Buffer.from(cursor, 'base64url').toString('utf8');
  if (!/^\d{1,15}$/.test(text)) throw invalidField('query.cursor', 'Not a cursor of this list');
  return Number(text);
}

/**
 * Cuts a page off rows of which one more than the page holds was read.
 *
 * @param positionOf  place of a row in the order of the list
 */
export function cutPage<T>(rows: T[], limit: number, positionOf: (row: T) => number) {
  const page = rows.slice(0, limit);
  const last = page.at(-1);
  const nextCursor = rows.length > limit && last ? Buffer.from(String(positionOf(last))).toString('base64url') : null;
  return { rows: page, nextCursor };
}
