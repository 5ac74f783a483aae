import { formatNumber, NOT_REACHED } from '../lib/format.ts';
import { differenceInWords, type DifferenceKind } from './headline-difference.ts';

export type HeadlineNumber = {
  caption: string;
  /** In the unit shown; null where the session did not come to it. */
  value: number | null;
  unit: string;
  digits: number;
  kind: DifferenceKind;
  /** The baseline's value; leave out where there is no baseline. */
  baseline?: number | null;
  /** Said instead of "not reached", where null has another reason: "no anode in this cell". */
  absent?: string;
  /** True where the value passes a bound. */
  over?: boolean;
};

/** Dimensions on one rule: value, unit, the baseline's value, and the difference as amount and word. */
export function HeadlineNumbers({ numbers }: { numbers: readonly HeadlineNumber[] }) {
  return (
    <dl className="heads">
      {numbers.map((number) => (
        <div key={number.caption}>
          <dt>{number.caption}</dt>
          <Value {...number} />
          <Baseline {...number} />
        </div>
      ))}
    </dl>
  );
}

function Value({ value, unit, digits, absent, over }: HeadlineNumber) {
  if (value === null) return <dd className="v words">{absent ?? NOT_REACHED}</dd>;
  return (
    <dd className={over ? 'v over' : 'v'}>
      {formatNumber(value, digits)}
      <small>
        {unit}
        {over && <b> over</b>}
      </small>
    </dd>
  );
}

function Baseline({ value, baseline, digits, kind }: HeadlineNumber) {
  if (baseline === undefined) return null;
  const difference = differenceInWords(value, baseline, digits, kind);
  return (
    <dd className="d">
      <span className="unseen">baseline</span>
      {baseline === null ? <span>{NOT_REACHED}</span> : <span className="b">{formatNumber(baseline, digits)}</span>}
      {difference === 'same' ? <span>same</span> : difference && <b>{difference}</b>}
    </dd>
  );
}
