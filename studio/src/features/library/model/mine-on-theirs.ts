import { partIssues } from '@voltiplano/engine';
import type { LibraryKind } from '../../../../../server/src/contract/library.ts';
import type { ItemContent } from './item-content.ts';

/**
 * One's own changes made again on what somebody else saved meanwhile: fields that one changed say what one wrote, all
 * others say theirs; a table counts as one field. Where that is no part that can be used, one's own stands as a whole.
 *
 * @param base  what both began from
 */
export function mineOnTheirs(
  kind: LibraryKind,
  base: ItemContent,
  mine: ItemContent,
  theirs: ItemContent,
): ItemContent {
  const body = merged(base.body, mine.body, theirs.body) as ItemContent['body'];
  const words = (field: 'name' | 'notes' | 'source') => (mine[field] === base[field] ? theirs[field] : mine[field]);
  return {
    name: words('name'),
    notes: words('notes'),
    source: words('source'),
    body: partIssues(kind, body).length === 0 ? body : mine.body,
  };
}

function merged(base: unknown, mine: unknown, theirs: unknown): unknown {
  if (same(mine, base)) return theirs;
  if (![base, mine, theirs].every(isMembers)) return mine;
  const [old, own, other] = [base, mine, theirs] as [Members, Members, Members];
  const names = new Set([...Object.keys(own), ...Object.keys(other)]);
  const pairs = [...names].map((name) => [name, merged(old[name], own[name], other[name])] as const);
  return Object.fromEntries(pairs.filter(([, value]) => value !== undefined));
}

type Members = Record<string, unknown>;

function isMembers(value: unknown): value is Members {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

const same = (a: unknown, b: unknown) => JSON.stringify(a) === JSON.stringify(b);
