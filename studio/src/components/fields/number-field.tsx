import { useId, type KeyboardEvent, type ReactNode } from 'react';
import { FieldHelp, type FieldHelpText } from './field-help.tsx';
import { Gauge } from './gauge.tsx';
import { readNumber, type Measure } from './measure.ts';
import { useReadOnly } from './read-only.ts';
import { steppedText } from './step-number.ts';
import { useTypedText } from './use-typed-text.ts';

type Props = {
  label: string;
  help: FieldHelpText;
  /** The value as text in shown units; empty where there is none. */
  text: string;
  /** What holds while the field is empty. */
  placeholder?: string;
  unit: string;
  measure: Pick<Measure, 'step' | 'decimals'>;
  /** Allowed and usual values, in shown units. */
  range: { min: number; max: number };
  usual?: readonly [number, number];
  /** The baseline's value, where it is another. */
  was?: string;
  /** Why the entry cannot stand, and what the curves use meanwhile. */
  error?: string;
  /** A second line, where it has something to say. */
  note?: ReactNode;
  onText: (text: string) => void;
  onLeave?: () => void;
};

/** One physical quantity: label left, value right-aligned with its unit, the usual range beneath. */
export function NumberField(props: Props) {
  const { label, help, unit, usual, range, was, error, note } = props;
  const id = useId();
  const readOnly = useReadOnly();
  const { shown, setTyped } = useTypedText(props.text);
  const number = readNumber(shown);
  const change = (text: string) => {
    setTyped(text);
    props.onText(text);
  };
  const step = (event: KeyboardEvent) => {
    if (readOnly) return;
    const start = props.placeholder ? readNumber(props.placeholder) : usual?.[0];
    const next = steppedText(event, shown, props.measure, range, start);
    if (next === undefined) return;
    event.preventDefault();
    change(next);
  };
  return (
    <div className="f">
      <div className="f-label">
        <FieldHelp label={label} help={help} />
        {was !== undefined && <span className="was">was {was}</span>}
      </div>
      <label className={['in', error ? 'bad' : was !== undefined ? 'moved' : ''].join(' ')}>
        <input
          aria-label={label}
          inputMode={range.min < 0 ? 'text' : 'decimal'}
          autoComplete="off"
          spellCheck={false}
          value={shown}
          readOnly={readOnly}
          placeholder={props.placeholder}
          aria-invalid={error ? true : undefined}
          aria-describedby={error || note ? id : undefined}
          onChange={(event) => change(event.target.value)}
          onKeyDown={step}
          onBlur={() => {
            setTyped(null);
            props.onLeave?.();
          }}
        />
        <span>{unit}</span>
      </label>
      {usual && <Gauge value={Number.isNaN(number) ? null : number} usual={usual} {...range} />}
      {error ? (
        <p className="note err" id={id}>
          {error}
        </p>
      ) : (
        note && (
          <div className="note" id={id}>
            {note}
          </div>
        )
      )}
    </div>
  );
}
