import { expect, test } from 'vitest';
import { nextRow, readCell, withRowMoved, type Grid } from './grid.ts';
import { measureOf } from './measure.ts';
import { isTableText, splitTable, withBlock } from './paste-grid.ts';

const grid: Grid = [
  [0, 360],
  [0.3, 310],
  [0.5, 230],
];

test('readCell stores file units and keeps what is no number', () => {
  const soc = measureOf('strategy.taper.soc');
  expect(readCell('36', soc, '°C')).toBe(0.36);
  expect(readCell('3,5', soc, '°C')).toBe(0.035);
  expect(readCell('', soc, '°C')).toBeNull();
  expect(readCell('3x', soc, '°C')).toBe('3x');
  expect(readCell('95', measureOf('session.ambientC'), '°F')).toBe(35);
});

test('withRowMoved stops at both ends', () => {
  expect(withRowMoved(grid, 0, 1)[0]).toEqual([0.3, 310]);
  expect(withRowMoved(grid, 0, -1)).toBe(grid);
  expect(withRowMoved(grid, 2, 1)).toBe(grid);
});

test('nextRow carries the first column on and repeats the rest', () => {
  expect(nextRow(grid, 2)).toEqual([0.7, 230]);
  expect(nextRow([], 2)).toEqual([null, null]);
});

test('splitTable reads tabs with decimal commas and leaves a header out', () => {
  expect(splitTable('soc\tA\r\n0\t252,5\r\n36\t216\r\n')).toEqual([
    ['0', '252,5'],
    ['36', '216'],
  ]);
  expect(splitTable('0;1\n2;3')).toEqual([
    ['0', '1'],
    ['2', '3'],
  ]);
  expect(splitTable('0  1\n2 3')).toEqual([
    ['0', '1'],
    ['2', '3'],
  ]);
  expect(splitTable('soc\tcold\n0\t1', true)).toHaveLength(2);
});

test('splitTable keeps a bad cell in its place', () => {
  expect(splitTable('0\t252\n36\tabc')[1]).toEqual(['36', 'abc']);
});

test('isTableText leaves a single value to the field', () => {
  expect(isTableText('36.5')).toBe(false);
  expect(isTableText('36.5\n')).toBe(false);
  expect(isTableText('36\t200')).toBe(true);
  expect(isTableText('36\n50')).toBe(true);
});

test('withBlock replaces the table from its first cell, else lays over it', () => {
  const block: Grid = [
    [0, 1],
    [1, 2],
  ];
  expect(withBlock(grid, 0, 0, block)).toEqual(block);
  expect(withBlock(grid, 2, 0, block)).toEqual([
    [0, 360],
    [0.3, 310],
    [0, 1],
    [1, 2],
  ]);
  expect(withBlock(grid, 0, 1, [[9], [8]])).toEqual([
    [0, 9],
    [0.3, 8],
    [0.5, 230],
  ]);
});
