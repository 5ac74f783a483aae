import type { StripColumns } from './strip-columns.ts';
import { numberAt, placeOn, type RowPlace } from './rows.ts';

/** What the strips run over. */
export type StripAxis = 'time' | 'soc';

/** The column a run lies on: minutes since plug-in, or soc in %. */
export const axisColumn = (columns: StripColumns, axis: StripAxis): number[] =>
  axis === 'time' ? columns.min : columns.socPercent;

/** Whole width of the axis: every run from its plug-in to its end. */
export function fullRange(runs: readonly StripColumns[], axis: StripAxis): [number, number] {
  const columns = runs.map((run) => axisColumn(run, axis));
  const ends = columns.map((column) => column[column.length - 1] ?? 0);
  if (axis === 'time') return [0, Math.max(...ends, 1e-3) * 1.005];
  const from = Math.min(...columns.map((column) => column[0] ?? 0));
  return [from, Math.max(...ends, from + 1)];
}

/** Where a minute stands on the axis. */
export function axisValueAtMinute(columns: StripColumns, axis: StripAxis, minute: number): number {
  return axis === 'time' ? minute : numberAt(columns.socPercent, placeOn(columns.min, minute));
}

/** The minute that stands at an axis value. */
export function minuteAtAxisValue(columns: StripColumns, axis: StripAxis, value: number): number {
  return axis === 'time' ? value : numberAt(columns.min, placeOn(columns.socPercent, value));
}

/** The baseline's row beside the live cursor: the same minute, or the same soc; null past its end. */
export function baselinePlace(baseline: StripColumns, axis: StripAxis, value: number): RowPlace | null {
  const column = axisColumn(baseline, axis);
  const covered = value >= (column[0] ?? 0) && value <= (column[column.length - 1] ?? 0);
  return covered ? placeOn(column, value) : null;
}
