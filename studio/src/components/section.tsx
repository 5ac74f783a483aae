import type { ReactNode } from 'react';

type Props = {
  title: string;
  /** What the section holds, in a few words, at the right of its head. */
  summary?: ReactNode;
  open?: boolean;
  onToggle?: (open: boolean) => void;
  children: ReactNode;
};

/** A part of the inputs that opens and shuts, its summary always in sight. */
export function Section({ title, summary, open, onToggle, children }: Props) {
  return (
    <details className="sec" open={open} onToggle={(event) => onToggle?.(event.currentTarget.open)}>
      <summary>
        <h3>{title}</h3>
        {summary && <span className="what">{summary}</span>}
      </summary>
      <div className="body">{children}</div>
    </details>
  );
}
