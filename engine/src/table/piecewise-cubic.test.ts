import { describe, expect, test } from 'vitest';
import { electrodePairs, potentialsOf } from '../cell/electrodes.ts';
import { PiecewiseCubic } from './piecewise-cubic.ts';

// SciPy 1.10.1: p = PchipInterpolator(x, y); float(p(.37)), float(p.integrate(.05, .9))
const scipy: { x: number[]; y: number[]; at037: number; area: number }[] = [
  { x: [0, 0.1, 0.2, 0.5, 1], y: [2.1, 1.6, 1.3, 1, 1.3], at037: 1.0679414141414143, area: 0.9800126799242426 },
  { x: [0, 1, 3], y: [0, 1, -4], at037: 0.6275755, area: 0.5781844618055556 },
  { x: [0, 1, 2], y: [0, 0.1, 3], at037: 0.01426498, area: 0.024822065972222224 },
  { x: [0, 0.5, 1, 2], y: [1, 2, 2, 5], at037: 1.907388, area: 1.55875625 },
];

describe('PiecewiseCubic.pchip', () => {
  test.each(scipy)('value and integral agree with SciPy on $x', ({ x, y, at037, area }) => {
    const curve = PiecewiseCubic.pchip({ x, y });
    expect(curve.value(0.37)).toBeCloseTo(at037, 12);
    expect(curve.integral(0.05, 0.9)).toBeCloseTo(area, 12);
    expect(curve.integral(0.9, 0.05)).toBeCloseTo(-area, 12);
  });

  test('scales values and integral, and passes through every row', () => {
    const table = { x: [0, 0.2, 1], y: [-0.3, 0.1, 0.2] };
    const curve = PiecewiseCubic.pchip(table, 1e-3);
    table.x.forEach((x, i) => expect(curve.value(x)).toBeCloseTo(1e-3 * table.y[i], 15));
    expect(curve.integral(0, 1)).toBeCloseTo(1e-3 * PiecewiseCubic.pchip(table).integral(0, 1), 15);
  });

  test('holds its end values outside, in the integral too', () => {
    const curve = PiecewiseCubic.pchip({ x: [0, 0.5, 1], y: [2, 3, 5] });
    expect([curve.value(-3), curve.value(0), curve.value(1), curve.value(9)]).toEqual([2, 2, 5, 5]);
    expect(curve.integral(-2, 0)).toBe(4);
    expect(curve.integral(1, 1.5)).toBeCloseTo(2.5, 12);
  });

  test('finds the piece from wherever it was asked last', () => {
    const x = Array.from({ length: 30 }, (_, i) => i * i);
    const curve = PiecewiseCubic.linear(x, x);
    for (const at of [0.5, 800, 3, 840.9, 0.1, 400, 401, 2]) expect(curve.value(at)).toBeCloseTo(at, 12);
  });
});

describe('PiecewiseCubic.linear', () => {
  test('is straight between rows and has the trapezoids’ area', () => {
    const curve = PiecewiseCubic.linear([-10, 0, 30], [0.1, 0.5, 3], 200);
    expect(curve.value(-5)).toBeCloseTo(60, 12);
    expect(curve.value(15)).toBeCloseTo(350, 12);
    expect(curve.integral(-10, 30)).toBeCloseTo(200 * (10 * 0.3 + 30 * 1.75), 9);
    expect([curve.value(-40), curve.value(99)]).toEqual([20, 600]);
  });
});

test('PiecewiseCubic.constant is the same everywhere', () => {
  const curve = PiecewiseCubic.constant(1.25);
  for (const x of [-5, 0, 0.3, 1, 7]) expect(curve.value(x)).toBe(1.25);
  expect(curve.integral(-1, 3)).toBeCloseTo(5, 12);
});

describe('PiecewiseCubic.tabulated', () => {
  const pieces = 2080;

  test.each(electrodePairs)('stays within 1e-8 V of the formulas of %s, 1e-6 V in the steepest foot', (pair) => {
    for (const formula of Object.values(potentialsOf[pair])) {
      const curve = PiecewiseCubic.tabulated(formula, -0.02, 1.02, pieces);
      let foot = 0;
      let rest = 0;
      for (let i = 0; i <= 20_000; i++) {
        const z = i / 20_000;
        const off = Math.abs(curve.value(z) - formula(z));
        if (z < 0.02) foot = Math.max(foot, off);
        else rest = Math.max(rest, off);
      }
      expect(foot).toBeLessThan(1e-6);
      expect(rest).toBeLessThan(1e-8);
    }
  });

  test('is the formula itself outside', () => {
    const curve = PiecewiseCubic.tabulated(Math.exp, 0, 1, 50);
    expect([curve.value(-2), curve.value(3)]).toEqual([Math.exp(-2), Math.exp(3)]);
  });

  test('integrates as the formula does', () => {
    expect(PiecewiseCubic.tabulated(Math.exp, 0, 1, 200).integral(0.2, 0.9)).toBeCloseTo(
      Math.exp(0.9) - Math.exp(0.2),
      10,
    );
  });
});
