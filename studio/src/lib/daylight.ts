import { useSyncExternalStore } from 'react';
import { storedValue, useStoredValue } from './stored-value.ts';

export const daylights = ['system', 'day', 'night'] as const;

/** Which palette a person wants; `system` follows the device. */
export type Daylight = (typeof daylights)[number];

// public/daylight.js reads the same key before the first paint.
const chosen = storedValue<Daylight>('voltiplano.daylight', 'system', (value): value is Daylight =>
  daylights.includes(value as Daylight),
);

export function setDaylight(daylight: Daylight): void {
  const { classList } = document.documentElement;
  classList.toggle('day', daylight === 'day');
  classList.toggle('night', daylight === 'night');
  // Told last: who draws with the tokens reads them from the page.
  chosen.set(daylight);
}

export function useDaylight(): Daylight {
  return useStoredValue(chosen);
}

const darkSystem = () => window.matchMedia('(prefers-color-scheme: dark)');

function subscribeToSystem(listener: () => void): () => void {
  const query = darkSystem();
  query.addEventListener('change', listener);
  return () => query.removeEventListener('change', listener);
}

/** True while the night palette is shown, whoever asked for it. */
export function useIsNight(): boolean {
  const daylight = useDaylight();
  const systemIsDark = useSyncExternalStore(subscribeToSystem, () => darkSystem().matches);
  return daylight === 'system' ? systemIsDark : daylight === 'night';
}
