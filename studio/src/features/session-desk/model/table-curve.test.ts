import { expect, test } from 'vitest';
import { tableCurve } from './table-curve.ts';

test('tableCurve goes through every row of a cubic table and stays monotone between them', () => {
  const rows = [
    [0, 0],
    [1, 1],
    [2, 1],
    [4, 5],
  ];
  const { x, y, points } = tableCurve(rows, 'cubic', 0);
  expect(points).toEqual(rows);
  for (const [px, py] of rows) expect(y[x.findIndex((at) => Math.abs(at - px!) < 1e-9)]).toBeCloseTo(py!, 12);
  expect(y.every((value, i) => i === 0 || value >= y[i - 1]! - 1e-12)).toBe(true);
});

test('tableCurve holds ledges from their soc on, and leaves out what is no number', () => {
  const { x, y } = tableCurve(
    [
      [0, 300],
      [40, 'x'],
      [50, 100],
    ],
    'from',
    100,
  );
  expect(x).toEqual([0, 50, 50, 100]);
  expect(y).toEqual([300, 300, 100, 100]);
});

test('tableCurve holds voltage ledges until their voltage, the last to the end', () => {
  const { x, y, points } = tableCurve(
    [
      [3.5, 200],
      [3.7, 100],
      [null, 50],
    ],
    'until',
    0,
  );
  expect(points.map(([at]) => at)).toEqual([3.5, 3.7]);
  expect(y).toEqual([200, 200, 100, 100, 50, 50]);
  expect(x.slice(1, 5)).toEqual([3.5, 3.5, 3.7, 3.7]);
});
