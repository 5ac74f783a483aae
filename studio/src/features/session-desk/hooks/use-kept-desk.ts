import { useEffect, useState } from 'react';
import { formatClock } from '../../../lib/format.ts';
import type { DeskStore } from '../model/desk-store.ts';
import { keptDeskText } from '../model/kept-desk.ts';
import { storedDesk, storeDesk } from './desk-storage.ts';

/** How long the hand rests before the desk is written down. */
const REST_MS = 250;
const JUST_NOW_MS = 60_000;

/** Keeps the desk in this browser, and says in words how that went. */
export function useKeptDesk(store: DeskStore): string {
  const [status, setStatus] = useState(() => (storedDesk() === null ? 'nothing changed yet' : 'in this browser'));
  // Speaks to this browser's storage.
  useEffect(() => {
    let waiting: ReturnType<typeof setTimeout> | undefined;
    let ageing: ReturnType<typeof setTimeout> | undefined;
    const keep = () => {
      clearTimeout(waiting);
      waiting = undefined;
      clearTimeout(ageing);
      const done = storeDesk(keptDeskText(store.get()));
      setStatus(done ? 'just now' : 'not kept: this browser refuses. Save the study as a file');
      const now = new Date();
      if (done)
        ageing = setTimeout(() => setStatus(`at ${formatClock(now.getHours() * 60 + now.getMinutes())}`), JUST_NOW_MS);
    };
    const keepAtOnce = () => {
      if (waiting !== undefined) keep();
    };
    const unsubscribe = store.subscribe(() => {
      clearTimeout(waiting);
      waiting = setTimeout(keep, REST_MS);
    });
    window.addEventListener('pagehide', keepAtOnce);
    document.addEventListener('visibilitychange', keepAtOnce);
    return () => {
      keepAtOnce();
      clearTimeout(ageing);
      unsubscribe();
      window.removeEventListener('pagehide', keepAtOnce);
      document.removeEventListener('visibilitychange', keepAtOnce);
    };
  }, [store]);
  return status;
}
