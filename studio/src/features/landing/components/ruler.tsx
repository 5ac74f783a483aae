import { useId } from 'react';

type Props = {
  label: string;
  value: number;
  min: number;
  max: number;
  step: number;
  /** The value with its unit, as read beside the label. */
  shown: string;
  onChange: (value: number) => void;
};

/** One input as a ruler with a handle. */
export function Ruler({ label, value, min, max, step, shown, onChange }: Props) {
  const id = useId();
  return (
    <div>
      <div className="ruler-head">
        <label htmlFor={id}>{label}</label>
        <output htmlFor={id}>{shown}</output>
      </div>
      <input
        id={id}
        className="ruler"
        type="range"
        min={min}
        max={max}
        step={step}
        value={value}
        aria-valuetext={shown}
        onChange={(event) => onChange(event.target.valueAsNumber)}
      />
    </div>
  );
}
