import { libraryKinds, type LibraryKind } from '../../../../../server/src/contract/library.ts';

type KindWords = {
  /** Heads a page of one: "Station". */
  one: string;
  /** In a sentence: "a station". */
  article: string;
  /** A choice among kinds: "stations". */
  many: string;
};

/** What the kinds of the library are called. */
export const kindWords: Record<LibraryKind, KindWords> = {
  pack: { one: 'Pack', article: 'a pack', many: 'packs' },
  cell: { one: 'Cell', article: 'a cell', many: 'cells' },
  thermal: { one: 'Cooling', article: 'a cooling system', many: 'cooling' },
  inlet: { one: 'Inlet', article: 'an inlet', many: 'inlets' },
  station: { one: 'Station', article: 'a station', many: 'stations' },
  strategy: { one: 'Strategy', article: 'a strategy', many: 'strategies' },
  vehicle: { one: 'Vehicle', article: 'a vehicle', many: 'vehicles' },
  route: { one: 'Route', article: 'a route', many: 'routes' },
};

/** Kinds in the order in which people ask for them. */
export const kindOrder = Object.keys(kindWords) as LibraryKind[];

/** Kinds whose part of a study file has a name of its own, which is always the item's. */
export const hasOwnName = (kind: LibraryKind) => ['cell', 'pack', 'station', 'strategy'].includes(kind);

export function isLibraryKind(value: unknown): value is LibraryKind {
  return libraryKinds.includes(value as LibraryKind);
}
