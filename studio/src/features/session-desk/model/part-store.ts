import { partIssues, type SessionStudyInput } from '@voltiplano/engine';
import { carriedStudy, type PartBody, type SessionPartKind } from './carriers.ts';
import { deskReducer, deskWith, firstView, type DeskState, type Sheet } from './desk-state.ts';
import type { DeskStore } from './desk-store.ts';
import { applied, isReadable, type Draft, type Entry } from './draft.ts';

/** A part being worked on, and what was entered that does not stand in it yet. */
export type PartEntry = { body: PartBody; pending: Record<string, Entry> };

/** Entries out of what was kept somewhere; what cannot be one is left out. */
export function entriesOf(pending: Record<string, unknown>): Record<string, Entry> {
  return Object.fromEntries(Object.entries(pending).filter((pair): pair is [string, Entry] => isEntry(pair[1])));
}

function isEntry(value: unknown): value is Entry {
  const isCell = (one: unknown) => one === null || typeof one === 'number' || typeof one === 'string';
  return isCell(value) || (Array.isArray(value) && value.every((row) => Array.isArray(row) && row.every(isCell)));
}

/** A desk for one part of a study: the rest of the study carries it, and gives way to it. */
export type PartStore = DeskStore & {
  /** The part and what waits, as they are now; the same object until one of them changes. */
  entry: () => PartEntry;
  /** Shows the part, and every step of undo, on another study. */
  carryOn: (base: SessionStudyInput) => void;
  /** Puts another part in place; the one before stays under undo. */
  replace: (body: PartBody, label: string) => void;
  /** What changes are marked against from now on. */
  compareWith: (saved: PartBody) => void;
};

/**
 * @param base   the study that carries the part
 * @param saved  what changes are marked against; null where the part is new
 */
export function createPartStore(
  kind: SessionPartKind,
  base: SessionStudyInput,
  { body, pending }: PartEntry,
  saved: PartBody | null,
): PartStore {
  const draft = { study: carriedStudy(base, kind, body), pending };
  const baseline = saved && carriedStudy(base, kind, saved);
  const view = { ...firstView, shut: [], unfolded: [kind, 'chiller', 'radiator', 'heater'] };
  let state: DeskState = { ...deskWith({ draft, references: [], baseline }), view };
  let entry: PartEntry = { body, pending };
  const listeners = new Set<() => void>();
  const set = (next: DeskState) => {
    if (next === state) return;
    state = next;
    const { study, pending: waiting } = state.sheet.draft;
    const now = bodyOf(study, kind);
    if (now !== entry.body || waiting !== entry.pending) entry = { body: now, pending: waiting };
    listeners.forEach((listener) => listener());
  };
  return {
    get: () => state,
    entry: () => entry,
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    dispatch: (action) => set(fitted(kind, deskReducer(state, action))),
    carryOn: (other) => set(onEachSheet(state, (sheet) => carriedSheet(sheet, kind, other))),
    replace: (next, label) =>
      set(deskReducer(state, { type: 'open', study: carriedStudy(state.sheet.draft.study, kind, next), label })),
    compareWith: (next) =>
      set(onEachSheet(state, (sheet) => ({ ...sheet, baseline: carriedStudy(sheet.draft.study, kind, next) }))),
  };
}

function bodyOf(study: SessionStudyInput, kind: SessionPartKind): PartBody {
  return study[kind] as PartBody;
}

function onEachSheet(state: DeskState, change: (sheet: Sheet) => Sheet): DeskState {
  const step = <S extends { sheet: Sheet }>(one: S): S => ({ ...one, sheet: change(one.sheet) });
  return { ...step(state), past: state.past.map(step), future: state.future.map(step) };
}

function carriedSheet(sheet: Sheet, kind: SessionPartKind, base: SessionStudyInput): Sheet {
  const { draft, baseline } = sheet;
  const on = (study: SessionStudyInput) => carriedStudy(base, kind, bodyOf(study, kind));
  return { ...sheet, draft: { ...draft, study: on(draft.study) }, baseline: baseline && on(baseline) };
}

/** An entry that only a rule between parts holds back moves in, and the rest of the study gives way. */
function fitted(kind: SessionPartKind, state: DeskState): DeskState {
  const { draft } = state.sheet;
  const waiting = Object.entries(draft.pending).filter(([path, entry]) => isReadable(draft, path, entry));
  if (waiting.length === 0) return state;
  const groups = [waiting, ...waiting.map((one) => [one])];
  const settled = groups.reduce((now, group) => withGroup(kind, now, group), draft);
  return settled === draft ? state : { ...state, sheet: { ...state.sheet, draft: settled } };
}

function withGroup(kind: SessionPartKind, draft: Draft, group: [string, Entry][]): Draft {
  if (!group.every(([path]) => path in draft.pending)) return draft;
  const study = applied(draft.study, group);
  const body = bodyOf(study, kind);
  if (partIssues(kind, body).length > 0) return draft;
  const gone = new Set(group.map(([path]) => path));
  const pending = Object.fromEntries(Object.entries(draft.pending).filter(([path]) => !gone.has(path)));
  return { study: carriedStudy(study, kind, body), pending };
}
