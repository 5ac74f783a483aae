import { limitCodes, type LimitCode } from '../session/limits.ts';
import { indexAt, lengthOf, type GridPlan } from './sweep-plan.ts';
import type { SweepResult } from './sweep-result.ts';

/** Two axes of a grid to look at, and where the third is held; `at` has a coordinate for every axis. */
export type Slice = { x: number; y: number; at: readonly number[] };

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
export function limitBorders(plan: GridPlan, result: SweepResult, { x, y, at }: Slice): LimitBorder[] {
  const column = result.column('dominantLimit');
  const limitAt = (i: number, j: number): number => {
    const coordinates = at.map((one, axis) => (axis === x ? i : axis === y ? j : one));
    return column[indexAt(plan.axes, coordinates)];
  };
  const [width, height] = [lengthOf(plan.axes[x]), lengthOf(plan.axes[y])];
  const borders: LimitBorder[] = [];
  const add = (lower: number, upper: number, x1: number, y1: number, x2: number, y2: number) => {
    if (lower === upper || Number.isNaN(lower) || Number.isNaN(upper)) return;
    borders.push({ x1, y1, x2, y2, lower: limitCodes[lower], upper: limitCodes[upper] });
  };
  for (let j = 0; j < height; j++)
    for (let i = 0; i < width; i++) {
      const here = limitAt(i, j);
      if (i + 1 < width) add(here, limitAt(i + 1, j), i + 0.5, j - 0.5, i + 0.5, j + 0.5);
      if (j + 1 < height) add(here, limitAt(i, j + 1), i - 0.5, j + 0.5, i + 0.5, j + 0.5);
    }
  return borders;
}
