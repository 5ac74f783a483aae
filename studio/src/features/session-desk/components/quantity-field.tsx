import { NumberField } from '../../../components/fields/number-field.tsx';
import { readNumber } from '../../../components/fields/measure.ts';
import { useQuantityField } from '../hooks/use-quantity-field.ts';
import type { FieldSpec } from '../model/input-sections.ts';
import { HeldNote } from './held-note.tsx';

/** The field of one quantity of the study. */
export function QuantityField({ path, sets, label, emptyAs }: FieldSpec) {
  const field = useQuantityField(path, label, emptyAs);
  const unusual = unusualText(field.text, field.usual, field.help.usual);
  return (
    <NumberField
      {...field}
      note={
        (sets ?? unusual) && (
          <>
            {sets && <HeldNote code={sets} />}
            {unusual && <span>{unusual}</span>}
          </>
        )
      }
    />
  );
}

/** The usual range, where the value lies outside it. */
function unusualText(text: string, usual: readonly [number, number] | undefined, words: string | undefined) {
  const value = readNumber(text);
  if (!usual || Number.isNaN(value) || (value >= usual[0] && value <= usual[1])) return undefined;
  return `usual ${words}`;
}

/** Several fields, one under the other. */
export function QuantityFields({ fields }: { fields: FieldSpec[] }) {
  return fields.map((field) => <QuantityField key={field.path} {...field} />);
}
