import { expect, test } from 'vitest';
import { percentile } from './spread-bands.ts';
import { normalQuantile, quantileOf } from './quantiles.ts';
import { seededRandom, shuffled, xoshiro128 } from './random.ts';

test('xoshiro128** from the state 1, 2, 3, 4 gives the numbers of its authors’ program', () => {
  const state = Uint32Array.of(1, 2, 3, 4);
  expect(Array.from({ length: 6 }, () => xoshiro128(state))).toEqual([
    11520, 0, 5927040, 70819200, 2031721883, 1637235492,
  ]);
});

test('seededRandom is even over 0 to 1, the same for a seed, another for the next', () => {
  const draw = (seed: number, n: number) => {
    const random = seededRandom(seed);
    return Array.from({ length: n }, random);
  };
  expect(draw(5, 20)).toEqual(draw(5, 20));
  expect(draw(5, 20)).not.toEqual(draw(6, 20));
  const bins = new Array<number>(20).fill(0);
  for (const u of draw(1, 20_000)) bins[Math.floor(u * 20)]++;
  // χ² with 19 degrees of freedom passes 43.8 once in a thousand.
  expect(bins.reduce((sum, count) => sum + (count - 1000) ** 2 / 1000, 0)).toBeLessThan(43.8);
});

test('shuffled keeps every number', () => {
  expect([...shuffled(100, seededRandom(2))].sort((a, b) => a - b)).toEqual(Array.from({ length: 100 }, (_, i) => i));
});

test.each([
  [0.5, 0],
  [0.75, 0.674489750196082],
  [0.975, 1.959963984540054],
  [0.999, 3.090232306167814],
  [1e-6, -4.753424308822899],
])('normalQuantile(%d) is the tabulated value', (p, z) => {
  expect(Math.abs(normalQuantile(p) - z)).toBeLessThan(1e-8);
});

test('a normal distribution cut off at 0 has its probabilities among what is left', () => {
  const half = quantileOf({ path: '', distribution: 'normal', sd: 1 }, 0, 0, 1e9);
  // Half of a normal variable: |x| lies below 0.6745 with probability ½.
  expect(half(0.5)).toBeCloseTo(0.674489750196082, 7);
  expect(half(0)).toBe(0);
  expect(half(1)).toBeLessThan(9);
});

test('a triangular distribution has its mode where the share below it ends', () => {
  const quantile = quantileOf({ path: '', distribution: 'triangular', from: 0, mode: 2, to: 8 }, 0, 0, 10);
  expect(quantile(0.25)).toBeCloseTo(2, 12);
  expect(quantile(0)).toBe(0);
  expect(quantile(1)).toBe(8);
  expect(quantile(0.8125)).toBeCloseTo(8 - Math.sqrt(0.1875 * 8 * 6), 12);
});

test('percentile is linear between order statistics', () => {
  expect([0, 0.25, 0.5, 0.9, 1].map((p) => percentile([1, 2, 4, 8, 16], p))).toEqual([1, 2, 4, 12.8, 16]);
  expect(percentile([3], 0.95)).toBe(3);
});
