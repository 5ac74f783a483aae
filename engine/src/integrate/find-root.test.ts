import { describe, expect, test, vi } from 'vitest';
import { findPeak, findRoot } from './find-root.ts';

describe('findRoot', () => {
  const cases: [string, (x: number) => number, number, number, number][] = [
    ['a line', (x) => x - 0.3, 0, 1, 0.3],
    ['an exponential', (x) => Math.exp(x) - 2, 0, 3, Math.LN2],
    ['a ninth power, flat at its root', (x) => (x - 0.4) ** 9, 0, 1, 0.4],
    ['a step', (x) => (x < 0.7 ? -1 : 1), 0, 1, 0.7],
    ['a falling function', (x) => Math.cos(x), 1, 2, Math.PI / 2],
    ['a bracket given from right to left', (x) => x * x - 2, 2, 1, Math.SQRT2],
    ['a steep end', (x) => 1e6 * Math.min(0, x - 0.9) + 1e-6 * Math.max(0, x - 0.9) - 1e-9, 0, 1, 0.901],
  ];

  test.each(cases)('finds the root of %s within its tolerance, with the sign of the far end', (_, f, a, b, root) => {
    const x = findRoot(f, a, f(a), b, f(b), 1e-7);
    expect(Math.abs(x - root)).toBeLessThanOrEqual(1e-7);
    expect(Math.sign(f(x)) * Math.sign(f(b))).toBeGreaterThanOrEqual(0);
  });

  test('returns the far end at once where that is the root', () => {
    const f = vi.fn((x: number) => x - 1);
    expect(findRoot(f, 0, -1, 1, 0, 1e-9)).toBe(1);
    expect(f).not.toHaveBeenCalled();
  });

  test('takes a smooth root in few readings, and any in at most 80', () => {
    const smooth = vi.fn((x: number) => Math.exp(x) - 2);
    findRoot(smooth, 0, -1, 3, Math.exp(3) - 2, 1e-9);
    expect(smooth.mock.calls.length).toBeLessThan(14);
    const step = vi.fn((x: number) => (x < Math.PI ? -1e-9 : 1e9));
    findRoot(step, 0, -1e-9, 1e4, 1e9, 1e-12);
    expect(step.mock.calls.length).toBeLessThanOrEqual(80);
  });
});

describe('findPeak', () => {
  test('finds the top of a parabola, and its height', () => {
    const { x, value } = findPeak((x) => 5 - (x - 0.37) ** 2, 0, 1, 1e-4);
    expect(Math.abs(x - 0.37)).toBeLessThan(1e-4);
    expect(value).toBeCloseTo(5, 7);
  });

  test('finds the end of a function that only rises', () => {
    expect(findPeak((x) => x, 0, 1, 1e-4).x).toBeGreaterThan(1 - 1e-4);
  });
});
