import { expect, test } from 'vitest';
import { pchipSlopes } from './pchip.ts';

// SciPy 1.10.1: from scipy.interpolate import PchipInterpolator; PchipInterpolator(x, y).derivative()(x)
const scipy: [string, number[], number[], number[]][] = [
  [
    'slopes of a resistance’s shape, 0 at its least row',
    [0, 0.1, 0.2, 0.5, 1],
    [2.1, 1.6, 1.3, 1, 1.3],
    [-6, -3.75, -1.6363636363636365, 0, 1.6],
  ],
  ['three rows with a peak', [0, 1, 3], [0, 1, -4], [2.1666666666666665, 0, -4.833333333333333]],
  ['an end whose three-point slope has the other sign', [0, 1, 2], [0, 0.1, 3], [0, 0.19333333333333333, 4.3]],
  ['a flat stretch', [0, 0.5, 1, 2], [1, 2, 2, 5], [3, 0, 0, 5]],
];

test.each(scipy)('pchipSlopes agrees with SciPy: %s', (_, x, y, slopes) => {
  Array.from(pchipSlopes(x, y)).forEach((slope, i) => expect(slope).toBeCloseTo(slopes[i], 12));
});

test('pchipSlopes holds an end to three secants where the curve turns', () => {
  // Three-point slope ((2·1 + 9)·1 − 1·(−90/9))/(1 + 9) = 2.1 stays; with δ₁ = −100 it is 11.1 and is held to 3.
  expect(pchipSlopes([0, 1, 10], [0, 1, -89])[0]).toBeCloseTo(2.1, 12);
  expect(pchipSlopes([0, 1, 10], [0, 1, -899])[0]).toBe(3);
});

test('pchipSlopes of two rows is the straight line', () => {
  expect(Array.from(pchipSlopes([2, 4], [1, 5]))).toEqual([2, 2]);
});
