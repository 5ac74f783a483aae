import { createContext, useContext, useSyncExternalStore } from 'react';
import type { DeskAction, DeskState } from '../model/desk-state.ts';
import type { DeskStore } from '../model/desk-store.ts';

export const DeskContext = createContext<DeskStore | null>(null);

export function useDeskStore(): DeskStore {
  const store = useContext(DeskContext);
  if (!store) throw new Error('Used outside a session desk');
  return store;
}

/**
 * A part of the desk's state; the component is drawn again only when that part changes.
 *
 * @param select  must give the same object for the same state
 */
export function useDesk<T>(select: (state: DeskState) => T): T {
  const store = useDeskStore();
  return useSyncExternalStore(store.subscribe, () => select(store.get()));
}

export function useDispatch(): (action: DeskAction) => void {
  return useDeskStore().dispatch;
}
