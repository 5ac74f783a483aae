import { useEffect, useState } from 'react';
import { addToast, dismissToast, type Toast, useToasts } from './toast-store.ts';

const READING_MS = 7_000;

/** What was just done, in ruled strips along the bottom edge; the page can be scrolled clear of them. */
export function Toasts() {
  const toasts = useToasts();
  return (
    <div className="toasts" role="status">
      {toasts.map((toast) => (
        <Strip key={toast.id} toast={toast} />
      ))}
    </div>
  );
}

function Strip({ toast: { id, text, kind, action } }: { toast: Toast }) {
  const [isHeld, setHeld] = useState(false);
  const stays = isHeld || kind === 'stop';
  useEffect(() => {
    // The clock: a strip that nobody points at goes by itself.
    if (stays) return;
    const timer = setTimeout(() => dismissToast(id), READING_MS);
    return () => clearTimeout(timer);
  }, [id, stays]);
  return (
    <div
      className={kind === 'stop' ? 'toast stop' : 'toast'}
      onPointerEnter={() => setHeld(true)}
      onPointerLeave={() => setHeld(false)}
      onFocus={() => setHeld(true)}
      onBlur={() => setHeld(false)}
    >
      <p>{text}</p>
      {action && (
        <button
          className="lnk"
          onClick={() => {
            dismissToast(id);
            action.take();
          }}
        >
          {action.word}
        </button>
      )}
      <button className="lnk ml-auto" onClick={() => dismissToast(id)}>
        Dismiss
      </button>
    </div>
  );
}

/** Tells what was done. @param kind  `stop` for what failed: it stays until it is dismissed */
export function toast(text: string, { kind = 'plain', action }: Partial<Pick<Toast, 'kind' | 'action'>> = {}): void {
  addToast({ text, kind, action });
}
