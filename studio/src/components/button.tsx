import { Slot } from 'radix-ui';
import { useId, type ComponentProps } from 'react';

type Props = Omit<ComponentProps<'button'>, 'disabled'> & {
  /** The one next step on a page; everything else is plain. */
  go?: boolean;
  /** Words shown while the work runs, such as "Exporting"; the button then does nothing. */
  busy?: string;
  /** Why the action cannot be taken now; shown under the button and read with it. */
  unavailable?: string;
  /** Dresses its only child, a link for instance, instead of making a button. */
  asChild?: boolean;
};

/** A word on a rule. Out of reach it stays focusable, so that the reason can be read. */
export function Button({ go, busy, unavailable, asChild, className, onClick, children, ...rest }: Props) {
  const reasonId = useId();
  const idle = Boolean(busy ?? unavailable);
  const look = ['btn', go ? 'go' : '', className ?? ''].join(' ').trim();
  if (asChild) {
    return (
      <Slot.Root className={look} {...rest}>
        {children}
      </Slot.Root>
    );
  }
  const button = (
    <button
      type="button"
      className={look}
      aria-disabled={idle || undefined}
      aria-busy={busy ? true : undefined}
      aria-describedby={unavailable ? reasonId : undefined}
      onClick={idle ? undefined : onClick}
      {...rest}
    >
      {busy ?? children}
    </button>
  );
  if (!unavailable) return button;
  return (
    <span className="inline-block">
      {button}
      <span id={reasonId} className="btn-reason">
        {unavailable}
      </span>
    </span>
  );
}
