import { readNumber } from './measure.ts';
import type { Cell, Grid } from './grid.ts';

/** Whether text from the clipboard is more than one cell. */
export function isTableText(text: string): boolean {
  return /[\t;]|\S\s*[\r\n]+\s*\S/.test(text.trim());
}

/**
 * Splits text from a spreadsheet into rows of cell texts: tabs, else semicolons, else blanks between cells.
 * Empty lines are left out, and so is a first line in which no cell is a number (a header).
 *
 * @param keepsHead  true where the first line belongs to the table, as in a map
 */
export function splitTable(text: string, keepsHead = false): string[][] {
  const lines = text.split(/\r\n|\r|\n/).filter((line) => line.trim() !== '');
  const separator = lines.some((line) => line.includes('\t'))
    ? /\t/
    : lines.some((line) => line.includes(';'))
      ? /;/
      : /\s+/;
  const rows = lines.map((line) =>
    (separator.source === '\\s+' ? line.trim() : line).split(separator).map((cell) => cell.trim()),
  );
  const headless = !keepsHead && rows.length > 1 && rows[0]!.every((cell) => Number.isNaN(readNumber(cell)));
  return headless ? rows.slice(1) : rows;
}

/**
 * Lays a block of cells over a grid from one cell on, with rows added below where it is longer.
 * A block as wide as the table, laid on its first cell, takes the whole table's place.
 */
export function withBlock(grid: Grid, row: number, column: number, block: Grid): Grid {
  const width = grid[0]?.length ?? block[0]?.length ?? 0;
  const fills = row === 0 && column === 0 && block.every((cells) => cells.length >= width);
  if (fills) return block.map((cells) => cells.slice(0, width));
  const rows = Math.max(grid.length, row + block.length);
  return Array.from({ length: rows }, (_, i) =>
    Array.from({ length: width }, (_, j): Cell => block[i - row]?.[j - column] ?? grid[i]?.[j] ?? null),
  );
}
