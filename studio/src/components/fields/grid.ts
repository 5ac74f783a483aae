import { readNumber, toStored, type Measure } from './measure.ts';
import type { TemperatureUnit } from '../../lib/units.ts';

/** A cell of a table: a number in file units, text that cannot be read as one, or null for an empty cell. */
export type Cell = number | string | null;
/** Rows of cells, row by row. */
export type Grid = Cell[][];

/** What a person typed into a cell or field, in file units where it is a number; the text itself where it is none. */
export function readCell(text: string, measure: Measure, temperature: TemperatureUnit): Cell {
  if (text.trim() === '') return null;
  const shown = readNumber(text);
  return Number.isNaN(shown) ? text : toStored(shown, measure, temperature);
}

export function withCell(grid: Grid, row: number, column: number, cell: Cell): Grid {
  return grid.map((cells, i) => (i === row ? cells.map((old, j) => (j === column ? cell : old)) : cells));
}

export function withRow(grid: Grid, at: number, cells: Cell[]): Grid {
  return [...grid.slice(0, at), cells, ...grid.slice(at)];
}

export function withoutRow(grid: Grid, row: number): Grid {
  return grid.filter((_, i) => i !== row);
}

/** A row changes places with its neighbour; at the end of the table nothing moves. */
export function withRowMoved(grid: Grid, row: number, by: 1 | -1): Grid {
  const to = row + by;
  if (to < 0 || to >= grid.length) return grid;
  const moved = [...grid];
  [moved[row], moved[to]] = [moved[to]!, moved[row]!];
  return moved;
}

/** A row to follow the last two, carrying on by their difference; a first row is empty. */
export function nextRow(grid: Grid, columns: number): Cell[] {
  const last = grid.at(-1);
  const before = grid.at(-2);
  return Array.from({ length: columns }, (_, j) => {
    const cell = last?.[j] ?? null;
    const earlier = before?.[j];
    if (typeof cell !== 'number') return null;
    return typeof earlier === 'number' && j === 0 ? Number((2 * cell - earlier).toPrecision(12)) : cell;
  });
}
