import { useSyncExternalStore } from 'react';

/** Often enough for words that count minutes. */
const TICK_MS = 20_000;

let now = Date.now();
let timer: ReturnType<typeof setInterval> | undefined;
const listeners = new Set<() => void>();

function tick(): void {
  now = Date.now();
  listeners.forEach((listener) => listener());
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  if (listeners.size === 1) {
    timer = setInterval(tick, TICK_MS);
    // The clock stood still while nobody looked.
    queueMicrotask(tick);
  }
  return () => {
    listeners.delete(listener);
    if (listeners.size === 0) clearInterval(timer);
  };
}

/** The time [ms since 1970], by a clock that all who ask share, to some seconds. */
export function useNow(): number {
  return useSyncExternalStore(subscribe, () => now);
}
