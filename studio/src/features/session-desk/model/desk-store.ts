import { deskReducer, type DeskAction, type DeskState } from './desk-state.ts';

export type DeskStore = {
  get: () => DeskState;
  dispatch: (action: DeskAction) => void;
  subscribe: (listener: () => void) => () => void;
};

/** Holds the desk's state and tells who listens of every change. */
export function createDeskStore(initial: DeskState): DeskStore {
  let state = initial;
  const listeners = new Set<() => void>();
  return {
    get: () => state,
    dispatch(action) {
      const next = deskReducer(state, action);
      if (next === state) return;
      state = next;
      listeners.forEach((listener) => listener());
    },
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}
