import type { ClipboardEvent, KeyboardEvent } from 'react';
import type { Measure } from './measure.ts';
import { steppedText } from './step-number.ts';
import { useReadOnly } from './read-only.ts';
import { useTypedText } from './use-typed-text.ts';

type Props = {
  /** Names row and column: "From soc, ledge 2". */
  label: string;
  text: string;
  unit: string;
  measure: Pick<Measure, 'step' | 'decimals'>;
  state?: 'moved' | 'bad';
  /** Id of the sentence that says what is wrong. */
  errorId?: string;
  onText: (text: string) => void;
  onLeave?: () => void;
  onKey?: (event: KeyboardEvent<HTMLInputElement>) => void;
  onPaste?: (event: ClipboardEvent<HTMLInputElement>) => void;
};

const ANY = { min: Number.NEGATIVE_INFINITY, max: Number.POSITIVE_INFINITY };

/** One number in a table; arrows step it as they do in a field. */
export function TableCell({ label, text, unit, measure, state, errorId, onText, onLeave, onKey, onPaste }: Props) {
  const readOnly = useReadOnly();
  const { shown, setTyped } = useTypedText(text);
  const change = (next: string) => {
    setTyped(next);
    onText(next);
  };
  const press = (event: KeyboardEvent<HTMLInputElement>) => {
    if (readOnly) return;
    const next = steppedText(event, shown, measure, ANY);
    if (next === undefined) return onKey?.(event);
    event.preventDefault();
    change(next);
  };
  return (
    <span className={['in', state ?? ''].join(' ').trim()}>
      <input
        aria-label={label}
        inputMode="text"
        autoComplete="off"
        spellCheck={false}
        value={shown}
        readOnly={readOnly}
        aria-invalid={state === 'bad' ? true : undefined}
        aria-describedby={state === 'bad' ? errorId : undefined}
        onChange={(event) => change(event.target.value)}
        onKeyDown={press}
        onPaste={readOnly ? undefined : onPaste}
        onBlur={() => {
          setTyped(null);
          onLeave?.();
        }}
      />
      {unit && <span aria-hidden="true">{unit}</span>}
    </span>
  );
}
