import type { SessionStudyInput } from '@voltiplano/engine';
import type { PartReference } from '../../../../../server/src/contract/study.ts';
import { withEntry, withParts, type Draft, type Entry, type Part } from './draft.ts';

/** What undo brings back: the draft, where its parts came from, and the study kept as baseline. */
export type Sheet = {
  draft: Draft;
  /** Which revision of the library a part was taken from; editing the part keeps it. */
  references: readonly PartReference[];
  baseline: SessionStudyInput | null;
  /** What the baseline is called where that is not its title: "Revision 6". */
  baselineName?: string;
};

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
  /** Nothing of the study may be changed; what is shown and the baseline may. */
  readOnly: boolean;
};

export type DeskAction =
  | { type: 'entry'; path: string; entry: Entry; label: string; typingAt?: string }
  | { type: 'parts'; parts: Part[]; label: string; typingAt?: string }
  | { type: 'open'; study: SessionStudyInput; label: string; references?: readonly PartReference[] }
  /** A draft as a whole, such as another person's. */
  | { type: 'draft'; draft: Draft; references: readonly PartReference[]; label: string }
  /** A part of the library takes the place of a section, or the section is told where it came from. */
  | { type: 'refer'; references: readonly PartReference[]; parts: Part[]; label: string }
  | { type: 'keep-baseline' }
  | { type: 'set-baseline'; study: SessionStudyInput; name: string }
  | { type: 'clear-baseline' }
  | { type: 'swap-baseline' }
  | { type: 'leave-field' }
  | { type: 'undo' }
  | { type: 'redo' }
  | { type: 'view'; view: Partial<View> }
  | { type: 'read-only'; readOnly: boolean };

/** What a desk that is only read still does. */
const WITHOUT_CHANGE = new Set<DeskAction['type']>([
  'view',
  'draft',
  'read-only',
  'leave-field',
  'keep-baseline',
  'set-baseline',
  'clear-baseline',
]);

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
  return deskWith({ draft: draftOf(study), references: [], baseline: null });
}

/** A desk with a sheet on it and nothing to undo. */
export function deskWith(sheet: Sheet): DeskState {
  return { sheet, past: [], future: [], typingAt: null, view: firstView, readOnly: false };
}

/** The desk after an action. Every change of the sheet is one step of undo; typing in one field is one step too. */
export function deskReducer(state: DeskState, action: DeskAction): DeskState {
  if (state.readOnly && !WITHOUT_CHANGE.has(action.type)) return state;
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
    case 'open': {
      const { study, references = [], label } = action;
      return changed(state, { ...sheet, draft: draftOf(study), references }, label);
    }
    case 'draft': {
      const next = { ...sheet, draft: action.draft, references: action.references };
      // A desk that is only read follows the study; it has nothing to undo.
      return state.readOnly ? { ...state, sheet: next } : changed(state, next, action.label);
    }
    case 'refer': {
      const draft = action.parts.length > 0 ? withParts(sheet.draft, action.parts) : sheet.draft;
      return changed(state, { ...sheet, draft, references: action.references }, action.label);
    }
    case 'keep-baseline':
      return changed(state, withBaseline(sheet, sheet.draft.study), 'keep as baseline');
    case 'set-baseline':
      return changed(state, withBaseline(sheet, action.study, action.name), `${action.name} as baseline`);
    case 'clear-baseline':
      return changed(state, withBaseline(sheet, null), 'clear the baseline');
    case 'swap-baseline':
      return sheet.baseline
        ? changed(
            state,
            { ...withBaseline(sheet, sheet.draft.study), draft: draftOf(sheet.baseline) },
            'swap with the baseline',
          )
        : state;
    case 'leave-field':
      return state.typingAt === null ? state : { ...state, typingAt: null };
    case 'undo':
      return undone(state);
    case 'redo':
      return redone(state);
    case 'view':
      return { ...state, view: { ...state.view, ...action.view } };
    case 'read-only':
      return state.readOnly === action.readOnly ? state : { ...state, readOnly: action.readOnly };
  }
}

function draftOf(study: SessionStudyInput): Draft {
  return { study, pending: {} };
}

function withBaseline(sheet: Sheet, baseline: SessionStudyInput | null, name?: string): Sheet {
  const { draft, references } = sheet;
  return { draft, references, baseline, ...(name === undefined ? {} : { baselineName: name }) };
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
