import type { LibraryItem, LibraryKind } from '../../../../../server/src/contract/library.ts';
import { partDifferences, type Difference } from '../../../lib/study-differences.ts';
import type { TemperatureUnit } from '../../../lib/units.ts';

/** What a revision says. */
export type ItemContent = Pick<LibraryItem, 'name' | 'notes' | 'source' | 'body'>;

export function contentOf({ name, notes, source, body }: ItemContent): ItemContent {
  return { name, notes, source, body };
}

/** Whether two revisions would say the same, in whatever order their fields stand. */
export function saysTheSame(a: ItemContent, b: ItemContent): boolean {
  return inOrder(contentOf(a)) === inOrder(contentOf(b));
}

/** JSON with its members in one order. */
function inOrder(value: unknown): string {
  return JSON.stringify(value, (_key, inner: unknown) =>
    typeof inner === 'object' && inner !== null && !Array.isArray(inner)
      ? Object.fromEntries(Object.entries(inner).sort(([a], [b]) => (a < b ? -1 : 1)))
      : inner,
  );
}

const WORDS = [
  ['name', 'Name'],
  ['source', 'Source'],
  ['notes', 'Notes'],
] as const;

/** What differs between two revisions, the words around the part first. */
export function itemDifferences(
  kind: LibraryKind,
  before: ItemContent,
  after: ItemContent,
  temperature: TemperatureUnit,
): Difference[] {
  const words = WORDS.flatMap(([path, label]): Difference[] =>
    before[path] === after[path]
      ? []
      : [
          {
            kind: 'value',
            path,
            section: '',
            label,
            unit: '',
            before: before[path] || null,
            after: after[path] || null,
          },
        ],
  );
  return [...words, ...partDifferences(kind, unnamed(before.body), unnamed(after.body), temperature)];
}

/** The body's own name is the item's, and said once. */
function unnamed({ name: _said, ...body }: ItemContent['body']): ItemContent['body'] {
  return body;
}
