import { quantities, type Quantity, type QuantityPath } from '@voltiplano/engine';
import { readCell } from '../../../components/fields/grid.ts';
import { measureOf, quantityPathOf, shownUnit, storedText } from '../../../components/fields/measure.ts';
import { NumberField } from '../../../components/fields/number-field.tsx';
import { helpOf, shownBounds } from '../../../components/fields/quantity-help.ts';
import { issueSentence } from '../../../lib/issue-text.ts';
import { useUnits } from '../../../lib/units.ts';
import { useTripPart } from '../hooks/trip-part-context.ts';
import { partValue } from '../model/trip-part.ts';

type Props = {
  /** Path in a study file, such as `trip.legs[2].station.powerMaxKw`. */
  path: string;
  /** The quantity it is, where its own path names none. */
  quantity?: QuantityPath;
  label?: string;
};

/** The field of one quantity of a vehicle or route. */
export function PartField({ path, quantity: given, label }: Props) {
  const { kind, shown, filled, saved, issues, put, leaveField } = useTripPart();
  const { temperatureUnit } = useUnits();
  const name = given ?? quantityPathOf(path)!;
  const quantity: Quantity = quantities[name];
  const measure = measureOf(name);
  const text = (value: unknown) =>
    typeof value === 'number' ? storedText(value, measure, temperatureUnit) : typeof value === 'string' ? value : '';
  const value = partValue(kind, shown, path);
  const before = saved && partValue(kind, saved, path);
  const issue = issues.find((one) => one.path === path);
  const isMoved = saved !== null && JSON.stringify(value ?? null) !== JSON.stringify(before ?? null);
  const heading = label ?? quantity.label;
  return (
    <NumberField
      label={heading}
      help={helpOf(quantity, measure, temperatureUnit)}
      text={text(value)}
      placeholder={value === undefined ? text(partValue(kind, filled as never, path)) || undefined : undefined}
      unit={shownUnit(measure, temperatureUnit)}
      measure={measure}
      {...shownBounds(quantity, measure, temperatureUnit)}
      was={isMoved ? text(before) || 'empty' : undefined}
      error={issue && issueSentence(issue, measure, temperatureUnit)}
      onText={(typed) => put(path, readCell(typed, measure, temperatureUnit) ?? undefined, heading, path)}
      onLeave={leaveField}
    />
  );
}
