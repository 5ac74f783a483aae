import { limitCodes, type LimitCode } from '../session/limits.ts';
import { sliceValues, type Slice } from './slice.ts';
import type { GridPlan } from './sweep-plan.ts';
import type { SweepResult } from './sweep-result.ts';

/**
 * A piece of the border between two limits, between neighbouring cells. Coordinates count cells: cell (i, j) reaches from
 * i − ½ to i + ½ along x and from j − ½ to j + ½ along y.
 */
export type LimitBorder = {
  x1: number;
  y1: number;
  x2: number;
  y2: number;
  /** Dominant limits of the cell on the lower side (left of, or below, the border) and on the upper one. */
  lower: LimitCode;
  upper: LimitCode;
};

/** Where the dominant limit changes between neighbours of a slice. Cells without numbers have no borders. */
export function limitBorders(plan: GridPlan, result: SweepResult, slice: Slice): LimitBorder[] {
  const rows = sliceValues(plan, result, 'dominantLimit', slice);
  const borders: LimitBorder[] = [];
  const add = (lower: number, upper: number, x1: number, y1: number, x2: number, y2: number) => {
    if (lower === upper || Number.isNaN(lower) || Number.isNaN(upper)) return;
    borders.push({ x1, y1, x2, y2, lower: limitCodes[lower], upper: limitCodes[upper] });
  };
  rows.forEach((row, j) =>
    row.forEach((here, i) => {
      if (i + 1 < row.length) add(here, row[i + 1], i + 0.5, j - 0.5, i + 0.5, j + 0.5);
      if (j + 1 < rows.length) add(here, rows[j + 1][i], i - 0.5, j + 0.5, i + 0.5, j + 0.5);
    }),
  );
  return borders;
}
