import type { SessionStudyInput } from '@voltiplano/engine';
import { withEntry, withParts, type Draft, type Entry, type Part } from './draft.ts';

/** What undo brings back: the draft and the study kept as baseline. */
export type Sheet = { draft: Draft; baseline: SessionStudyInput | null };

/** A sheet that was left, and the change that left it, in words. */
export type Step = { sheet: Sheet; label: string };

export type View = { axis: 'time' | 'soc'; hiddenStrips: string[]; shut: string[]; unfolded: string[] };

export type DeskState = {
  sheet: Sheet;
  past: Step[];
  future: Step[];
  /** The field being typed in: further entries there belong to the same step. */
  typingAt: string | null;
  view: View;
};

export type DeskAction =
  | { type: 'entry'; path: string; entry: Entry; label: string; typingAt?: string }
  | { type: 'parts'; parts: Part[]; label: string; typingAt?: string }
  | { type: 'open'; study: SessionStudyInput; label: string }
  | { type: 'keep-baseline' }
  | { type: 'clear-baseline' }
  | { type: 'swap-baseline' }
  | { type: 'leave-field' }
  | { type: 'undo' }
  | { type: 'redo' }
  | { type: 'view'; view: Partial<View> };

/** Steps kept for undo. */
const STEPS_KEPT = 200;

export const firstView: View = {
  axis: 'time',
  hiddenStrips: [],
  shut: ['inlet', 'boost', 'cell', 'cooling'],
  unfolded: [],
};

/** A desk with one study on it and nothing to undo. */
export function freshDesk(study: SessionStudyInput): DeskState {
  return { sheet: sheetOf(study, null), past: [], future: [], typingAt: null, view: firstView };
}

/** The desk after an action. Every change of the sheet is one step of undo; typing in one field is one step too. */
export function deskReducer(state: DeskState, action: DeskAction): DeskState {
  const { sheet } = state;
  switch (action.type) {
    case 'entry': {
      const draft = withEntry(sheet.draft, action.path, action.entry);
      // A whole table is typed in cell by cell; a row added or moved is a step of its own.
      const typingAt = action.typingAt ?? (Array.isArray(action.entry) ? undefined : action.path);
      return changed(state, { ...sheet, draft }, action.label, typingAt);
    }
    case 'parts':
      return changed(state, { ...sheet, draft: withParts(sheet.draft, action.parts) }, action.label, action.typingAt);
    case 'open':
      return changed(state, sheetOf(action.study, sheet.baseline), action.label);
    case 'keep-baseline':
      return changed(state, { ...sheet, baseline: sheet.draft.study }, 'keep as baseline');
    case 'clear-baseline':
      return changed(state, { ...sheet, baseline: null }, 'clear the baseline');
    case 'swap-baseline':
      return sheet.baseline
        ? changed(state, sheetOf(sheet.baseline, sheet.draft.study), 'swap with the baseline')
        : state;
    case 'leave-field':
      return state.typingAt === null ? state : { ...state, typingAt: null };
    case 'undo':
      return undone(state);
    case 'redo':
      return redone(state);
    case 'view':
      return { ...state, view: { ...state.view, ...action.view } };
  }
}

function sheetOf(study: SessionStudyInput, baseline: SessionStudyInput | null): Sheet {
  return { draft: { study, pending: {} }, baseline };
}

function changed(state: DeskState, sheet: Sheet, label: string, typingAt?: string): DeskState {
  const goesOn = typingAt !== undefined && typingAt === state.typingAt;
  const past = goesOn ? state.past : [...state.past, { sheet: state.sheet, label }].slice(-STEPS_KEPT);
  return { ...state, sheet, past, future: [], typingAt: typingAt ?? null };
}

function undone(state: DeskState): DeskState {
  const step = state.past.at(-1);
  if (!step) return state;
  const future = [{ sheet: state.sheet, label: step.label }, ...state.future];
  return { ...state, sheet: step.sheet, past: state.past.slice(0, -1), future, typingAt: null };
}

function redone(state: DeskState): DeskState {
  const [step, ...future] = state.future;
  if (!step) return state;
  const past = [...state.past, { sheet: state.sheet, label: step.label }];
  return { ...state, sheet: step.sheet, past, future, typingAt: null };
}
