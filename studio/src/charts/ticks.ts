/**
 * Round values 1-2-5 between two bounds, both included where they are round.
 *
 * @param count  about how many steps are wanted
 */
export function ticks(from: number, to: number, count: number): number[] {
  const step = tickStep(to - from, count);
  if (step === 0) return [];
  const values: number[] = [];
  // A millionth of a step keeps a bound that floating point moved off its round value.
  for (let k = Math.ceil(from / step - 1e-6); k * step <= to + step * 1e-6; k++) values.push(roundTo(k * step, step));
  return values;
}

/** The round step 1, 2 or 5 times a power of ten that gives at most `count` steps in `span`. */
export function tickStep(span: number, count: number): number {
  if (!(span > 0)) return 0;
  const raw = span / count;
  const power = 10 ** Math.floor(Math.log10(raw));
  return ([1, 2, 5].find((k) => k * power >= raw * (1 - 1e-9)) ?? 10) * power;
}

/** Decimals that a round step needs on its labels. */
export function tickDigits(step: number): number {
  return step > 0 ? Math.max(0, -Math.floor(Math.log10(step) + 1e-9)) : 0;
}

function roundTo(value: number, step: number): number {
  return Number(value.toFixed(tickDigits(step) + 1));
}

/** An axis from nought with air above the greatest value, ending on two fifths of a tick so that it holds still. */
export function rangeFromZero(greatest: number, count: number): [number, number] {
  if (!(greatest > 0)) return [0, 1];
  const wanted = greatest * 1.12;
  const part = tickStep(wanted, count) * 0.4;
  return [0, Math.ceil(wanted / part - 1e-9) * part];
}

/** An axis between round values (half ticks) around the data. */
export function rangeAround(least: number, greatest: number, count: number): [number, number] {
  const half = tickStep(Math.max(greatest - least, 1e-9), count) / 2;
  const from = Math.floor(least / half + 1e-9) * half;
  const to = Math.ceil(greatest / half - 1e-9) * half;
  return [from, to > from ? to : from + half];
}
