import { useSyncExternalStore } from 'react';

let hasEnded = false;
const listeners = new Set<() => void>();

function set(value: boolean): void {
  if (value === hasEnded) return;
  hasEnded = value;
  listeners.forEach((listener) => listener());
}

/** Whether a call found the session ended that this page works under. */
export const sessionEnd = {
  get: () => hasEnded,
  /** A call that needs a signed-in person was refused for want of one. */
  tell: () => set(true),
  /** Somebody signed in again, or the page knows that nobody is. */
  resume: () => set(false),
  /** @returns  ends the subscription */
  subscribe: (listener: () => void) => {
    listeners.add(listener);
    return () => {
      listeners.delete(listener);
    };
  },
};

export function useSessionEnd(): boolean {
  return useSyncExternalStore(sessionEnd.subscribe, sessionEnd.get);
}
