import { useReadOnly } from './read-only.ts';

type Props<T extends string> = {
  label: string;
  value: T;
  options: readonly { value: T; label: string }[];
  moved?: boolean;
  onChange: (value: T) => void;
};

/** One of a few named kinds. */
export function ChoiceField<T extends string>({ label, value, options, moved, onChange }: Props<T>) {
  const readOnly = useReadOnly();
  return (
    <label className="f words">
      <span className="f-label">{label}</span>
      <span className={moved ? 'in moved' : 'in'}>
        {readOnly ? (
          <input readOnly value={options.find((option) => option.value === value)?.label ?? value} />
        ) : (
          <select value={value} onChange={(event) => onChange(event.target.value as T)}>
            {options.map((option) => (
              <option key={option.value} value={option.value}>
                {option.label}
              </option>
            ))}
          </select>
        )}
      </span>
    </label>
  );
}
