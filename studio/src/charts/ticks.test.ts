import { describe, expect, it } from 'vitest';
import { rangeAround, rangeFromZero, tickDigits, ticks, tickStep } from './ticks.ts';

describe('ticks', () => {
  it('steps by 1, 2 or 5', () => {
    expect(ticks(0, 110, 10)).toEqual([0, 20, 40, 60, 80, 100]);
    expect(ticks(3.3, 4.25, 2)).toEqual([3.5, 4]);
    expect(ticks(-12, 31, 5)).toEqual([-10, 0, 10, 20, 30]);
  });
  it('keeps bounds that floating point has moved', () => expect(ticks(0.1 + 0.2, 0.9, 3)).toEqual([0.4, 0.6, 0.8]));
  it('has none where there is no span', () => expect(ticks(5, 5, 4)).toEqual([]));
});

it('tickStep never gives more steps than asked', () => {
  for (const span of [0.0031, 0.7, 1, 9.99, 42, 1234])
    for (const n of [2, 5, 10]) expect(span / tickStep(span, n)).toBeLessThanOrEqual(n + 1e-9);
});

it('tickDigits', () => expect([20, 1, 0.5, 0.05].map(tickDigits)).toEqual([0, 0, 1, 2]));

describe('ranges', () => {
  it('rangeFromZero covers the greatest value with air', () => {
    const [from, to] = rangeFromZero(91.2, 3);
    expect(from).toBe(0);
    expect(to).toBe(120);
  });
  it('rangeFromZero of nothing is still an axis', () => expect(rangeFromZero(0, 3)).toEqual([0, 1]));
  it('rangeAround holds all of the data between round values', () => {
    expect(rangeAround(21.6, 53.2, 4)).toEqual([20, 55]);
    expect(rangeAround(25, 25, 4)[1]).toBeGreaterThan(25);
  });
});
