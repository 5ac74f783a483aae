import type { Grid, Cell } from '../../../components/fields/grid.ts';
import { measureOf } from '../../../components/fields/measure.ts';

/** A leg as it is typed: numbers may be text or missing while they wait. */
export type TypedLeg = {
  km?: Cell;
  kmPerH?: Cell;
  climbM?: Cell;
  windKmPerH?: Cell;
  ambientC?: Cell;
  station?: Record<string, unknown>;
  depart?: Record<string, unknown>;
};

const KEYS = ['km', 'kmPerH', 'climbM', 'windKmPerH', 'ambientC'] as const;

/** The columns of the table of legs. */
export const legColumns = [
  { label: 'Distance', measure: measureOf('trip.legs[].km') },
  { label: 'Speed', measure: measureOf('trip.legs[].kmPerH') },
  { label: 'Climb', measure: measureOf('trip.legs[].climbM') },
  { label: 'Head wind', measure: measureOf('trip.legs[].windKmPerH') },
  { label: 'Ambient', measure: measureOf('trip.legs[].ambientC') },
];

export function gridOfLegs(legs: readonly TypedLeg[]): Grid {
  return legs.map((leg) => KEYS.map((key) => leg[key] ?? null));
}

/**
 * Legs after the table of them was edited. A row that is the same row as before, wherever it went, keeps its station;
 * so does one that was typed or pasted over in its place.
 *
 * @param before  the grid that was shown, whose rows the edited grid still holds where they were not touched
 */
export function legsOfGrid(legs: readonly TypedLeg[], before: Grid, after: Grid): TypedLeg[] {
  const isSameLength = before.length === after.length;
  return after.map((cells, i) => {
    const from = before.indexOf(cells);
    const origin = from >= 0 ? from : isSameLength || isPasted(before, after) ? i : -1;
    const { station, depart } = legs[origin] ?? {};
    const numbers = KEYS.flatMap((key, j) => (cells[j] === null || cells[j] === undefined ? [] : [[key, cells[j]]]));
    return {
      ...(Object.fromEntries(numbers) as TypedLeg),
      ...(station ? { station } : {}),
      ...(depart ? { depart } : {}),
    };
  });
}

/** A table that shares no row with the one before it was pasted as a whole. */
function isPasted(before: Grid, after: Grid): boolean {
  return !after.some((cells) => before.includes(cells));
}

/** The row and column of a path such as `trip.legs[2].km`. */
export function legCellOf(path: string): { row: number; column: number } | undefined {
  const match = /^trip\.legs\[(\d+)\]\.(\w+)$/.exec(path);
  const column = KEYS.indexOf(match?.[2] as (typeof KEYS)[number]);
  return match && column >= 0 ? { row: Number(match[1]), column } : undefined;
}
