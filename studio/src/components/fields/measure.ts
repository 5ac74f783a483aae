import { quantities, type Quantity, type QuantityPath } from '@voltiplano/engine';
import type { TemperatureUnit } from '../../lib/units.ts';

/** How a quantity of the study file is shown and typed: its unit on screen, its least decimals, its step. */
export type Measure = {
  unit: string;
  scale: 'plain' | 'percent' | 'temperature';
  /** Decimals always shown; more are shown where the value has them. */
  decimals: number;
  /** What one press of an arrow key changes, in shown units. */
  step: number;
};

/** Quantities stored as a fraction and shown in %. */
const PERCENT = new Set<string>(['session.startSoc', 'session.targetSoc', 'strategy.taper.soc', 'pack.socWindow[]']);
const CELL_VOLTAGES = new Set<string>([
  'strategy.cellVoltageCeilingV',
  'cell.vMaxV',
  'cell.vMinV',
  'strategy.taper.steps[].untilCellV',
]);

/** The quantity behind a field's path: rows lose their numbers, the taper's columns share their entries. */
export function quantityPathOf(path: string): QuantityPath | undefined {
  const rowless = path.replace(/\[\d+\]/g, '[]');
  const shared: Record<string, QuantityPath> = {
    'strategy.taper.points[].soc': 'strategy.taper.soc',
    'strategy.taper.steps[].fromSoc': 'strategy.taper.soc',
    'strategy.taper.soc[]': 'strategy.taper.soc',
    'strategy.taper.points[].value': 'strategy.taper.value',
    'strategy.taper.steps[].value': 'strategy.taper.value',
    'strategy.taper.values[][]': 'strategy.taper.value',
  };
  const key = shared[rowless] ?? rowless;
  return key in quantities ? (key as QuantityPath) : undefined;
}

/** Least decimals where the trade has a custom; elsewhere the step decides. */
const CUSTOMARY: Record<string, number> = { A: 0, mV: 0, kW: 0, W: 0, min: 0, V: 0, '': 2, '1/K': 3 };
/** Shares and efficiencies are not told apart more finely than this. */
const LEAST_FRACTION_STEP = 0.005;

/** How one of the engine's quantities is shown. */
export function measureOf(path: QuantityPath): Measure {
  const { unit, usual, integer }: Quantity = quantities[path];
  if (PERCENT.has(path)) return { unit: unit === 'of z' ? '% of z' : '%', scale: 'percent', decimals: 0, step: 1 };
  const [low, high] = usual ?? [0, 50];
  const fine = niceStep((high - low) / 50);
  const step = integer ? 1 : unit === '' ? Math.max(fine, LEAST_FRACTION_STEP) : fine;
  if (unit === '°C') return { unit, scale: 'temperature', decimals: 1, step };
  if (CELL_VOLTAGES.has(path)) return { unit, scale: 'plain', decimals: 3, step: 0.005 };
  if (integer) return { unit, scale: 'plain', decimals: 0, step };
  return { unit, scale: 'plain', decimals: CUSTOMARY[unit] ?? Math.max(0, -Math.floor(Math.log10(step))), step };
}

/** The nearest of 1, 2 and 5 times a power of ten that is not above the value. */
function niceStep(value: number): number {
  const power = 10 ** Math.floor(Math.log10(value) + 1e-9);
  const lead = [5, 2, 1].find((digit) => digit * power <= value * (1 + 1e-9)) ?? 1;
  return Number((lead * power).toPrecision(1));
}

/** The unit a measure has on screen. */
export function shownUnit(measure: Measure, temperature: TemperatureUnit): string {
  return measure.scale === 'temperature' ? temperature : measure.unit;
}

/** A stored value in the units on screen. */
export function toShown(stored: number, measure: Measure, temperature: TemperatureUnit): number {
  if (measure.scale === 'percent') return rounded(stored * 100);
  if (measure.scale === 'temperature' && temperature === '°F') return rounded(stored * 1.8 + 32);
  return stored;
}

/** A value typed in the units on screen, as it is stored. */
export function toStored(shown: number, measure: Measure, temperature: TemperatureUnit): number {
  if (measure.scale === 'percent') return rounded(shown / 100);
  if (measure.scale === 'temperature' && temperature === '°F') return rounded((shown - 32) / 1.8);
  return shown;
}

/** Takes away the last binary digits a change of unit leaves behind, so that 0.07 is shown as 7, not 7.000000000000001. */
function rounded(value: number): number {
  return Number(value.toPrecision(12));
}

/** A number as text for a field: at least `decimals`, more where the value has them, six at most. */
export function numberText(value: number, decimals: number): string {
  const least = value.toFixed(decimals);
  const text = Number(least) === value ? least : trimmed(value, Math.max(6, decimals));
  return text.replace('-', '−');
}

function trimmed(value: number, decimals: number): string {
  const fixed = value.toFixed(decimals);
  // A value too small for six decimals keeps its digits rather than reading as 0.
  if (Number(fixed) === 0 && value !== 0) return String(value);
  return fixed.replace(/\.?0+$/, '');
}

/** A stored value as the text of its field. */
export function storedText(stored: number, measure: Measure, temperature: TemperatureUnit): string {
  return numberText(toShown(stored, measure, temperature), measure.decimals);
}

/**
 * Reads a number as people type it: decimal point or comma, any minus sign, a power of ten.
 * A comma is taken for a decimal sign unless a point follows it; spaces between digits are left out.
 *
 * @returns NaN where the text is no number
 */
export function readNumber(text: string): number {
  const plain = text
    .trim()
    .replace(/[−–]/g, '-')
    .replace(/[\s\u00a0\u202f']/g, '');
  const decimal = plain.includes('.') ? plain.replace(/,(?=\d{3}(\D|$))/g, '') : plain.replace(',', '.');
  if (!/^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(decimal)) return Number.NaN;
  return Number(decimal);
}
