import { useSyncExternalStore } from 'react';

export type Toast = {
  id: number;
  text: string;
  kind: 'plain' | 'stop';
  /** One thing to do about it, such as "Undo". */
  action?: { word: string; take: () => void } | undefined;
};

/** More than these would be a list to read. */
const MOST = 3;

let toasts: readonly Toast[] = [];
let lastId = 0;
const listeners = new Set<() => void>();

function set(next: readonly Toast[]): void {
  toasts = next;
  listeners.forEach((listener) => listener());
}

export function addToast(toast: Omit<Toast, 'id'>): void {
  lastId += 1;
  set([...toasts.filter(({ text }) => text !== toast.text), { ...toast, id: lastId }].slice(-MOST));
}

export function dismissToast(id: number): void {
  set(toasts.filter((toast) => toast.id !== id));
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

export function useToasts(): readonly Toast[] {
  return useSyncExternalStore(subscribe, () => toasts);
}
