import type { TemperatureUnit } from '../../lib/units.ts';
import { nextRow, readCell, withCell, withoutRow, withRow, type Cell, type Grid } from './grid.ts';
import type { Measure } from './measure.ts';
import { splitTable, withBlock } from './paste-grid.ts';
import type { GridEdit } from './table-edits.ts';

export type MapKind = { label: string; measure: Measure };
/** What stands in the first column, the first row, and in between. */
export type MapKinds = { rowHead: MapKind; columnHead: MapKind; value: MapKind };

/** Heads and at least two rows and columns of values. */
export const LEAST = 3;

/** What a cell of a map holds. */
export function kindAt(kinds: MapKinds, row: number, column: number): MapKind {
  if (row === 0) return kinds.columnHead;
  return column === 0 ? kinds.rowHead : kinds.value;
}

export function mapCellName(kinds: MapKinds, row: number, column: number): string {
  const { label } = kindAt(kinds, row, column);
  if (row === 0) return `${label}, column ${column}`;
  return column === 0 ? `${label}, row ${row}` : `${label}, row ${row}, column ${column}`;
}

/** Every change a person can make to a map, whose first row and column are its heads. */
export function mapEdits(title: string, kinds: MapKinds, grid: Grid, temperature: TemperatureUnit) {
  const width = grid[0]!.length;
  const read = (text: string, row: number, column: number): Cell =>
    row === 0 && column === 0 ? null : readCell(text, kindAt(kinds, row, column).measure, temperature);
  return {
    type: (row: number, column: number, text: string): GridEdit => ({
      grid: withCell(grid, row, column, read(text, row, column)),
      label: mapCellName(kinds, row, column).toLowerCase(),
      typingAt: `${row}:${column}`,
    }),
    paste: (text: string, row: number, column: number): GridEdit => {
      const block = splitTable(text, true).map((cells, i) => cells.map((cell, j) => read(cell, row + i, column + j)));
      const isWhole = row === 0 && column === 0;
      return {
        grid: isWhole ? squared(block) : withBlock(grid, row, column, block),
        label: `paste into ${title.toLowerCase()}`,
      };
    },
    addRow: (): GridEdit => ({ grid: withRow(grid, grid.length, nextRow(grid, width)), label: 'add a row' }),
    addColumn: (): GridEdit => ({
      grid: grid.map((cells, i) => [...cells, i === 0 ? nextHead(cells) : cells[width - 1]!]),
      label: 'add a column',
    }),
    removeRow: (): GridEdit => ({ grid: withoutRow(grid, grid.length - 1), label: 'delete a row' }),
    removeColumn: (): GridEdit => ({ grid: grid.map((cells) => cells.slice(0, -1)), label: 'delete a column' }),
  };
}

/** Rows of one length, and at least as many rows and columns as a map has. */
function squared(block: Grid): Grid {
  const width = Math.max(LEAST, ...block.map((cells) => cells.length));
  const rows = Math.max(LEAST, block.length);
  return Array.from({ length: rows }, (_, i) => Array.from({ length: width }, (__, j) => block[i]?.[j] ?? null));
}

/** The next head of a row of heads, as far from the last as that is from the one before. */
function nextHead(heads: Cell[]): Cell {
  const last = heads.at(-1);
  const before = heads.at(-2);
  return typeof last === 'number' && typeof before === 'number' ? 2 * last - before : null;
}
