import type { SessionStudyInput } from '@voltiplano/engine';
import type { LibraryItem, LibraryKind } from '../../../../../server/src/contract/library.ts';
import type { NewStudy } from '../api/create-study.ts';
import { titled } from './judge-file.ts';

/** Parts of a session that the library holds, in the order they are chosen. */
export const sessionParts = [
  'pack',
  'cell',
  'thermal',
  'inlet',
  'station',
  'strategy',
] as const satisfies LibraryKind[];
export type SessionPart = (typeof sessionParts)[number];

export const partLabels: Record<SessionPart, string> = {
  pack: 'Pack',
  cell: 'Cell',
  thermal: 'Cooling',
  inlet: 'Inlet',
  station: 'Station',
  strategy: 'Strategy',
};

/** Id of the item that stands for a part; empty where the example's own is kept. */
export type Chosen = Record<SessionPart, string>;

export const nothingChosen: Chosen = { pack: '', cell: '', thermal: '', inlet: '', station: '', strategy: '' };

export type PutTogether = Required<Pick<NewStudy, 'parts'>> & { inputs: SessionStudyInput };

/**
 * A session of chosen parts, the rest as an example has it.
 *
 * @param title  empty for one made of the names of pack and station
 */
export function putTogether(
  example: SessionStudyInput,
  library: readonly LibraryItem[],
  chosen: Chosen,
  title: string,
): PutTogether {
  const items = itemsOf(library, chosen);
  const bodies = Object.fromEntries(items.map(({ kind, body }) => [kind, body]));
  const inputs = { ...example, ...bodies };
  return {
    inputs: titled(inputs, title.trim() || namedTitle(inputs)),
    parts: items.map(({ kind, id, revision }) => ({ part: kind, itemId: id, revision })),
  };
}

function itemsOf(library: readonly LibraryItem[], chosen: Chosen): LibraryItem[] {
  return sessionParts.flatMap((part) => library.find(({ id, kind }) => id === chosen[part] && kind === part) ?? []);
}

/** "Vicuña 86 at Salar Tola 150". */
function namedTitle({ pack, station }: SessionStudyInput): string {
  return [pack.name, station.name].filter(Boolean).join(' at ') || 'Untitled';
}
