import type { TripPart } from './trip-part.ts';

/** A part with what was before it, for undo. */
export type PartHistory = {
  part: TripPart;
  past: { part: TripPart; label: string }[];
  future: { part: TripPart; label: string }[];
  /** The field being typed in: further entries there belong to the same step. */
  typingAt: string | null;
};

export type HistoryAction =
  | { type: 'change'; change: (part: TripPart) => TripPart; label: string; typingAt?: string }
  | { type: 'leave-field' }
  | { type: 'undo' }
  | { type: 'redo' };

/** Steps kept for undo. */
const STEPS_KEPT = 200;

export function freshHistory(part: TripPart): PartHistory {
  return { part, past: [], future: [], typingAt: null };
}

/** The part after an action; typing in one field is one step of undo. */
export function historyReducer(state: PartHistory, action: HistoryAction): PartHistory {
  switch (action.type) {
    case 'change': {
      const goesOn = action.typingAt !== undefined && action.typingAt === state.typingAt;
      const before = { part: state.part, label: action.label };
      const past = goesOn ? state.past : [...state.past, before].slice(-STEPS_KEPT);
      return { part: action.change(state.part), past, future: [], typingAt: action.typingAt ?? null };
    }
    case 'leave-field':
      return state.typingAt === null ? state : { ...state, typingAt: null };
    case 'undo': {
      const step = state.past.at(-1);
      if (!step) return state;
      const future = [{ part: state.part, label: step.label }, ...state.future];
      return { part: step.part, past: state.past.slice(0, -1), future, typingAt: null };
    }
    case 'redo': {
      const [step, ...future] = state.future;
      if (!step) return state;
      const past = [...state.past, { part: state.part, label: step.label }];
      return { part: step.part, past, future, typingAt: null };
    }
  }
}
