import type { TemperatureUnit } from '../../lib/units.ts';
import { nextRow, readCell, withCell, withoutRow, withRow, withRowMoved, type Grid } from './grid.ts';
import type { Measure } from './measure.ts';
import { splitTable, withBlock } from './paste-grid.ts';

/** A change of a table: the grid after it, its name for undo, and which cell is being typed in, if one is. */
export type GridEdit = { grid: Grid; label: string; typingAt?: string };

type Columns = readonly { label: string; measure: Measure }[];

/** Every change a person can make to a table, by row and column. */
export function tableEdits(title: string, columns: Columns, grid: Grid, temperature: TemperatureUnit, rowWord: string) {
  const name = (row: number) => `${rowWord} ${row + 1}`;
  const read = (cells: string[], from: number) =>
    cells.slice(0, columns.length - from).map((cell, j) => readCell(cell, columns[from + j]!.measure, temperature));
  return {
    name,
    type: (row: number, column: number, text: string): GridEdit => ({
      grid: withCell(grid, row, column, readCell(text, columns[column]!.measure, temperature)),
      label: `${name(row)}, ${columns[column]!.label.toLowerCase()}`,
      typingAt: `${row}:${column}`,
    }),
    add: (): GridEdit => ({
      grid: withRow(grid, grid.length, nextRow(grid, columns.length)),
      label: `add a ${rowWord}`,
    }),
    remove: (row: number): GridEdit => ({ grid: withoutRow(grid, row), label: `delete ${name(row)}` }),
    move: (row: number, by: 1 | -1): GridEdit => ({ grid: withRowMoved(grid, row, by), label: `move ${name(row)}` }),
    paste: (text: string, row: number, column: number): GridEdit => ({
      grid: withBlock(
        grid,
        row,
        column,
        splitTable(text).map((cells) => read(cells, column)),
      ),
      label: `paste into ${title.toLowerCase()}`,
    }),
  };
}
