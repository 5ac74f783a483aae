import type { Judged } from './judge-file.ts';

/** One file of an import: what it is called, what it turned out to be, and what became of it. */
export type ImportEntry = {
  /** Sent with the call, so that a second try makes no second study. */
  key: string;
  name: string;
  judged: Judged | null;
  /** Id of the study made of it; null until then. */
  madeId: string | null;
  /** Why it was not made, in words. */
  problem: string | null;
};

export function newEntry(name: string, key: string): ImportEntry {
  return { key, name, judged: null, madeId: null, problem: null };
}

export type ReadyEntry = ImportEntry & { judged: Extract<Judged, { is: 'study' }> };

/** What can be made now: studies of which none has been made. */
export function readyEntries(entries: readonly ImportEntry[]): ReadyEntry[] {
  return entries.filter((entry): entry is ReadyEntry => entry.judged?.is === 'study' && entry.madeId === null);
}

/** "Import 2 studies"; without anything to import, what to do. */
export function importWord(ready: number): string {
  if (ready === 0) return 'Import';
  return ready === 1 ? 'Import the study' : `Import ${ready} studies`;
}

/** Why nothing can be imported yet; null where something can. */
export function whyNothing(entries: readonly ImportEntry[]): string | null {
  if (readyEntries(entries).length > 0) return null;
  if (entries.some(({ judged }) => judged === null)) return 'Reading.';
  return 'None of these files can be imported.';
}
