import { useEffect, type RefObject } from 'react';

/** The key "/" takes the focus to a field, from anywhere but another field, a menu or a dialog. */
export function useSlash(field: RefObject<HTMLInputElement | null>): void {
  // The document's keys.
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      const isPlain = !event.ctrlKey && !event.metaKey && !event.altKey && !event.defaultPrevented;
      if (event.key !== '/' || !isPlain) return;
      const at = event.target instanceof Element ? event.target : null;
      if (at?.closest('input, textarea, select, [contenteditable], [role="dialog"], [role="menu"]')) return;
      event.preventDefault();
      field.current?.focus();
      field.current?.select();
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, [field]);
}
