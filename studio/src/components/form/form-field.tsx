import { Slot } from 'radix-ui';
import { useId, type ReactElement, type ReactNode } from 'react';

type Props = {
  label: string;
  /** The rule, said beforehand. */
  hint?: ReactNode;
  error?: string | undefined;
  /** Something to press at the right of the label. */
  beside?: ReactNode;
  /** One input, select or textarea. */
  children: ReactElement;
};

/** A label above its input, the rule beneath, and what is wrong with it in the rule's place. */
export function FormField({ label, hint, error, beside, children }: Props) {
  const id = useId();
  const noteId = `${id}-note`;
  return (
    <div className="form-field">
      <div className="form-label">
        <label htmlFor={id}>{label}</label>
        {beside}
      </div>
      <Slot.Root
        id={id}
        className={error ? 'form-input bad' : 'form-input'}
        aria-invalid={error ? true : undefined}
        aria-describedby={(error ?? hint) ? noteId : undefined}
      >
        {children}
      </Slot.Root>
      {(error ?? hint) && (
        <p id={noteId} className={error ? 'form-note err' : 'form-note'} role={error ? 'alert' : undefined}>
          {error ?? hint}
        </p>
      )}
    </div>
  );
}
