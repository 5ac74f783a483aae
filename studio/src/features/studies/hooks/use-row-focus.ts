import { useCallback, useEffect, useRef, type RefObject } from 'react';

/**
 * Keeps the focus in the register while rows come and go.
 *
 * @param count  rows that are there
 * @returns      says which row, counted from 0, takes the focus once their number has changed
 */
export function useRowFocus(list: RefObject<HTMLElement | null>, count: number): (row: number) => void {
  const wanted = useRef<number | null>(null);
  // The focus of the page.
  useEffect(() => {
    if (wanted.current === null) return;
    const links = [...(list.current?.querySelectorAll<HTMLElement>('.row-link') ?? [])];
    (links[wanted.current] ?? links.at(-1))?.focus();
    wanted.current = null;
  }, [list, count]);
  return useCallback((row) => {
    wanted.current = row;
  }, []);
}
