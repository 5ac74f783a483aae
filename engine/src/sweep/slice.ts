import { indexAt, lengthOf, type GridPlan } from './sweep-plan.ts';
import type { SweepResult } from './sweep-result.ts';

/** Two axes of a grid to look at, and where the others are held; `at` has a coordinate for every axis. */
export type Slice = { x: number; y: number; at: readonly number[] };

/**
 * One number of every cell of a slice, as a map is drawn: one row per value along y, one number per value along x; NaN
 * where a cell has none. A grid of one axis is looked at with x and y both 0, and gives one row.
 */
export function sliceValues(plan: GridPlan, result: SweepResult, column: string, { x, y, at }: Slice): Float64Array[] {
  const values = result.column(column);
  const coordinates = [...at];
  return Array.from({ length: x === y ? 1 : lengthOf(plan.axes[y]) }, (_, j) =>
    Float64Array.from({ length: lengthOf(plan.axes[x]) }, (_, i) => {
      coordinates[y] = j;
      coordinates[x] = i;
      return values[indexAt(plan.axes, coordinates)];
    }),
  );
}
