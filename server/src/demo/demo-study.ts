import type { SessionStudyInput, TripStudyInput } from '@voltiplano/engine';
import type { LibraryKind } from '../contract/library.ts';
import type { StudyFile } from '../contract/study.ts';
import type { DemoDeed } from './demo-item.ts';
import { type DemoItemKey, demoLibrary, itemRevision } from './demo-library.ts';

type OwnPart = 'inlet' | 'station' | 'strategy';

/** What a revision of a study says otherwise than the one before it. */
export type DemoChange = {
  title?: string;
  /** Parts taken from the library: item and revision. */
  take?: { [P in LibraryKind]?: readonly [DemoItemKey, number] };
  /** Fields in which the study departs from what it took. */
  own?: { [P in OwnPart]?: Partial<SessionStudyInput[P]> };
  boost?: SessionStudyInput['boost'];
  session?: Partial<SessionStudyInput['session']>;
  trip?: Partial<Omit<TripStudyInput['trip'], 'legs'>>;
};

export type DemoStudyRevision = DemoDeed & DemoChange & { message: string };

/** A study of the demo, with its history from the first revision on; who made that owns it. */
export type DemoStudy = {
  revisions: readonly [DemoStudyRevision, ...DemoStudyRevision[]];
  /** Typed since, and not a revision yet. */
  unsaved?: DemoDeed & DemoChange;
  archived?: DemoDeed;
};

/** A part taken from the library. */
export type DemoReference = { part: LibraryKind; item: DemoItemKey; revision: number };

/** Kinds whose part of a study file has a name of its own. */
const named: readonly LibraryKind[] = ['cell', 'pack', 'station', 'strategy'];

/**
 * The study file that a history of changes comes to, and what it was taken from.
 *
 * @param changes  from the first on; a later one wins
 */
export function composeStudy(changes: readonly DemoChange[]): { inputs: StudyFile; parts: DemoReference[] } {
  const title = changes.findLast((change) => change.title !== undefined)?.title;
  const parts = referencesOf(changes);
  const { route, ...taken } = Object.fromEntries(parts.map((reference) => [reference.part, bodyOf(reference)]));
  const own = mergedOwn(changes);
  const said = Object.entries(taken).map(([part, body]) => [part, { ...body, ...own[part] }] as const);
  const boost = changes.findLast((change) => change.boost)?.boost;
  const session = merged(changes.map((change) => change.session));
  const trip = merged(changes.map((change) => change.trip));
  const inputs = {
    format: 'voltiplano/study',
    version: 1,
    ...(route ? { kind: 'trip' } : { kind: 'session' }),
    title,
    ...Object.fromEntries(said),
    ...(boost ? { boost } : {}),
    ...(route ? { trip: { ...trip, ...route } } : { session }),
  };
  // Through JSON: as it comes over HTTP, without the fields that are undefined.
  return { inputs: JSON.parse(JSON.stringify(inputs)) as StudyFile, parts };
}

function merged<T extends object>(parts: readonly (T | undefined)[]): Partial<T> {
  return Object.assign({}, ...parts) as Partial<T>;
}

function referencesOf(changes: readonly DemoChange[]): DemoReference[] {
  const take = merged(changes.map((change) => change.take));
  return Object.entries(take).map(([part, [item, revision]]) => ({ part: part as LibraryKind, item, revision }));
}

function bodyOf({ part, item, revision }: DemoReference): object {
  const { body } = itemRevision(item, revision);
  return named.includes(part) ? { ...body, name: demoLibrary[item].name } : body;
}

function mergedOwn(changes: readonly DemoChange[]): Record<string, object> {
  const all: Record<string, object> = {};
  for (const { own = {} } of changes) {
    for (const [part, fields] of Object.entries(own)) all[part] = { ...all[part], ...fields };
  }
  return all;
}
