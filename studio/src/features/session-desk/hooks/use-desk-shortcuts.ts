import { useEffect } from 'react';
import type { DeskStore } from '../model/desk-store.ts';

export type DeskCommands = { save: () => void; open: () => void; showShortcuts: () => void };

/** Keys that work anywhere on the desk. Ctrl is Cmd on a Mac. */
export const deskShortcuts: { keys: string; does: string }[] = [
  { keys: 'Ctrl Z', does: 'undo' },
  { keys: 'Ctrl Shift Z', does: 'redo' },
  { keys: 'Ctrl S', does: 'save the study as a file' },
  { keys: 'Ctrl O', does: 'open a study file' },
  { keys: 'Alt B', does: 'keep the present study as baseline' },
  { keys: '?', does: 'show this list' },
  { keys: '↑ ↓', does: 'in a field: one step up or down; with Shift ten' },
  { keys: 'Enter', does: 'in a table: the cell below' },
  { keys: 'Alt ↑ ↓', does: 'in a table: move the row' },
  { keys: 'Alt Delete', does: 'in a table: delete the row' },
  { keys: '← →', does: 'on the strips: move the cursor' },
  { keys: '+ − 0', does: 'on the strips: closer, wider, the whole session' },
];

/** Listens for the desk's keys while it is on the page. */
export function useDeskShortcuts(store: DeskStore, commands: DeskCommands): void {
  // Speaks to the document's keys.
  useEffect(() => {
    const press = (event: KeyboardEvent) => {
      const act = commandOf(event, store, commands);
      if (!act) return;
      event.preventDefault();
      act();
    };
    document.addEventListener('keydown', press);
    return () => document.removeEventListener('keydown', press);
  }, [store, commands]);
}

function commandOf(event: KeyboardEvent, store: DeskStore, commands: DeskCommands): (() => void) | undefined {
  const key = event.key.toLowerCase();
  const chord = (event.ctrlKey || event.metaKey) && !event.altKey;
  if (chord && key === 'z') return () => store.dispatch({ type: event.shiftKey ? 'redo' : 'undo' });
  if (chord && key === 'y') return () => store.dispatch({ type: 'redo' });
  if (chord && key === 's') return commands.save;
  if (chord && key === 'o') return commands.open;
  if (event.altKey && event.code === 'KeyB') return () => store.dispatch({ type: 'keep-baseline' });
  if (key === '?' && !isTyping(event.target)) return commands.showShortcuts;
  return undefined;
}

function isTyping(target: EventTarget | null): boolean {
  return target instanceof HTMLElement && target.matches('input, textarea, select, [contenteditable]');
}
