import type { LibraryItem } from '../../../../../server/src/contract/library.ts';
import { contentOf, saysTheSame } from './item-content.ts';
import { keepItem, readKeptItem, type KeptItem } from './kept-item.ts';

export type ItemState = KeptItem & {
  isChanged: boolean;
  /** False where this browser could not keep the draft. */
  isKept: boolean;
};

export type ItemStore = {
  get: () => ItemState;
  subscribe: (listener: () => void) => () => void;
  /** Puts another draft, or another revision under it, in place, and keeps it in this browser. */
  update: (change: (now: KeptItem) => KeptItem) => void;
};

/** The draft of an item, as this browser kept it or else as the item stands. */
export function createItemStore(workspaceId: string, item: LibraryItem): ItemStore {
  let state = stateOf(readKeptItem(workspaceId, item.id) ?? untouched(item), true);
  const listeners = new Set<() => void>();
  return {
    get: () => state,
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    update(change) {
      const next = stateOf(change(state), true);
      const { base, draft, isChanged } = next;
      const isKept = keepItem(workspaceId, item.id, isChanged ? { base, draft } : null);
      state = { ...next, isKept };
      listeners.forEach((listener) => listener());
    },
  };
}

/** An item of which nothing is changed. */
export function untouched(item: LibraryItem): KeptItem {
  return { base: item, draft: { ...contentOf(item), pending: {} } };
}

function stateOf({ base, draft }: KeptItem, isKept: boolean): ItemState {
  const isChanged = !saysTheSame(base, draft) || Object.keys(draft.pending).length > 0;
  return { base, draft, isChanged, isKept };
}
