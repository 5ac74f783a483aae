import { RadioGroup } from 'radix-ui';

type Props<T extends string> = {
  /** What the words choose between, read aloud. */
  label: string;
  value: T;
  options: readonly { value: T; label?: string }[];
  onChange: (value: T) => void;
};

/** A choice between a few words; the chosen one stands on the plateau line. Arrow keys move. */
export function WordSwitch<T extends string>({ label, value, options, onChange }: Props<T>) {
  return (
    <RadioGroup.Root
      className="pick"
      aria-label={label}
      orientation="horizontal"
      value={value}
      onValueChange={(chosen) => onChange(chosen as T)}
    >
      {options.map((option) => (
        <RadioGroup.Item key={option.value} value={option.value}>
          {option.label ?? option.value}
        </RadioGroup.Item>
      ))}
    </RadioGroup.Root>
  );
}
