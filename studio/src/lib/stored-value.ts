import { useSyncExternalStore } from 'react';

export type StoredValue<T> = {
  get: () => T;
  set: (value: T) => void;
  subscribe: (listener: () => void) => () => void;
};

/**
 * One small setting kept in this browser and shared by every tab.
 *
 * @param key      name in local storage
 * @param initial  value where nothing, or nothing readable, is kept
 * @param isValid  guards what another version may have written
 */
export function storedValue<T>(key: string, initial: T, isValid: (value: unknown) => value is T): StoredValue<T> {
  const listeners = new Set<() => void>();
  let current = read(key, initial, isValid);
  const tell = () => listeners.forEach((listener) => listener());
  const onStorage = (event: StorageEvent) => {
    if (event.key !== key) return;
    current = read(key, initial, isValid);
    tell();
  };
  return {
    get: () => current,
    set(value) {
      current = value;
      write(key, value);
      tell();
    },
    subscribe(listener) {
      if (listeners.size === 0) window.addEventListener('storage', onStorage);
      listeners.add(listener);
      return () => {
        listeners.delete(listener);
        if (listeners.size === 0) window.removeEventListener('storage', onStorage);
      };
    },
  };
}

/** The value, kept in step with every other place that shows it. */
export function useStoredValue<T>(stored: StoredValue<T>): T {
  return useSyncExternalStore(stored.subscribe, stored.get);
}

function read<T>(key: string, initial: T, isValid: (value: unknown) => value is T): T {
  try {
    const value: unknown = JSON.parse(localStorage.getItem(key) ?? 'null');
    return isValid(value) ? value : initial;
  } catch {
    return initial;
  }
}

function write(key: string, value: unknown): void {
  try {
    localStorage.setItem(key, JSON.stringify(value));
  } catch {
    // Storage may be full or refused: the setting then lasts as long as the page.
  }
}
