import type { StripColumns } from './strip-columns.ts';
import { tickStep } from './ticks.ts';
import { numberAt, placeOn, type RowPlace } from './rows.ts';

/** What the strips run over. */
export type StripAxis = 'time' | 'soc';

/** About how many ticks the time axis has on a wide sheet. */
const TIME_TICKS = 10;

/** The column a run lies on: minutes since plug-in, or soc in %. */
export const axisColumn = (columns: StripColumns, axis: StripAxis): number[] =>
  axis === 'time' ? columns.min : columns.socPercent;

/** Whole width of the axis: every run from its plug-in to its end; over time on to half a tick, so that it holds still. */
export function fullRange(runs: readonly StripColumns[], axis: StripAxis): [number, number] {
  const columns = runs.map((run) => axisColumn(run, axis));
  const ends = columns.map((column) => column[column.length - 1] ?? 0);
  if (axis === 'time') {
    const end = Math.max(...ends, 1e-3) * 1.005;
    const half = tickStep(end, TIME_TICKS) / 2;
    return [0, Math.ceil(end / half - 1e-9) * half];
  }
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
