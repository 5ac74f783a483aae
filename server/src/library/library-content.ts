import { isDeepStrictEqual } from 'node:util';
import { partIssues } from '@voltiplano/engine';
import type { LibraryKind, LibraryRevision } from '../contract/library.ts';
import type { FieldError } from '../contract/problem.ts';
import { errorsAt } from '../http/problem.ts';

/** What a revision says. */
export type LibraryContent = Pick<LibraryRevision, 'name' | 'notes' | 'source' | 'body'>;

/** Kinds whose part of a study file has a name of its own. */
const named: ReadonlySet<LibraryKind> = new Set(['cell', 'pack', 'station', 'strategy']);

/**
 * Gives the body the item's name, where its kind has one, and holds it against the engine's schema of the kind.
 *
 * @param place  where the content stood in the request, such as `body`
 * @returns      the content as it is kept, defaults left out as they were, and what is wrong with it
 */
export function judgeContent(
  kind: LibraryKind,
  { name, notes, source, body }: LibraryContent,
  place: string,
): { content: LibraryContent; errors: FieldError[] } {
  const { name: _replaced, ...rest } = body;
  const kept = named.has(kind) ? { name, ...rest } : body;
  const errors = errorsAt(`${place}.body`, partIssues(kind, kept));
  return { content: { name, notes, source, body: kept }, errors };
}

/** Whether two revisions would say the same, in whatever order their fields stand. */
export function sameContent(a: LibraryContent, b: LibraryContent): boolean {
  return isDeepStrictEqual(plain(a), plain(b));
}

/** As it comes back from the database: without −0, which JSON does not have. */
function plain({ name, notes, source, body }: LibraryContent): unknown {
  return JSON.parse(JSON.stringify({ name, notes, source, body }));
}
