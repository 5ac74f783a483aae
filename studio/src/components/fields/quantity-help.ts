import type { Quantity } from '@voltiplano/engine';
import type { TemperatureUnit } from '../../lib/units.ts';
import type { FieldHelpText } from './field-help.tsx';
import { numberText, shownUnit, toShown, type Measure } from './measure.ts';

/** Allowed and usual values of a quantity, in shown units. */
export function shownBounds({ min, max, usual }: Quantity, measure: Measure, temperature: TemperatureUnit) {
  const shown = (value: number) => toShown(value, measure, temperature);
  return {
    range: { min: shown(min), max: shown(max) },
    usual: usual && ([shown(usual[0]), shown(usual[1])] as const),
  };
}

/** What stands in a field's help. */
export function helpOf(quantity: Quantity, measure: Measure, temperature: TemperatureUnit): FieldHelpText {
  const { min, max, above, integer, usual, source, what } = quantity;
  const unit = shownUnit(measure, temperature);
  const withUnit = (value: number) => [numberText(value, 0), unit].join(' ').trim();
  const span = (from: number, to: number) => `${numberText(from, 0)} to ${withUnit(to)}`;
  const bounds = shownBounds(quantity, measure, temperature);
  const low = toShown(min, measure, temperature);
  const high = toShown(max, measure, temperature);
  return {
    what,
    ...(usual && bounds.usual ? { usual: span(...bounds.usual) } : {}),
    allowed: `${above ? `above ${numberText(low, 0)}, up to ${withUnit(high)}` : span(low, high)}${integer ? ', whole numbers' : ''}`,
    ...(source ? { source } : {}),
  };
}
