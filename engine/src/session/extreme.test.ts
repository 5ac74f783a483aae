import { describe, expect, test } from 'vitest';
import { Extreme } from './extreme.ts';

/** Samples a function of time as a run does, every `every` seconds, and closes. */
function sampled(value: (t: number) => number, every: number, end: number): Extreme {
  const extreme = new Extreme(value, (t) => t / 1000);
  for (let t = 0; t < end; t += every) extreme.sample(t, value(t));
  extreme.sample(end, value(end));
  extreme.close();
  return extreme;
}

describe('Extreme', () => {
  test('finds a peak between samples, and the first moment within 1e-6 of it', () => {
    // 40 − (t − 123.4)²/1e4 is within 1e-6 from 0.1 s before its top.
    const { value, tS, soc } = sampled((t) => 40 - (t - 123.4) ** 2 / 1e4, 10, 300);
    expect(value).toBeCloseTo(40, 9);
    expect(tS).toBeCloseTo(123.3, 2);
    expect(soc).toBeCloseTo(0.1233, 5);
  });

  test('names the first of two equal peaks, and the second where it is higher by more than 1e-6', () => {
    const humps = (second: number) => (t: number) => {
      const at = t < 150 ? 75 : 225;
      return (t < 150 ? 1 : second) - ((t - at) / 100) ** 2;
    };
    expect(sampled(humps(1), 10, 300).tS).toBeCloseTo(74.9, 1);
    expect(sampled(humps(1 + 5e-7), 10, 300).tS).toBeCloseTo(74.9, 1);
    expect(sampled(humps(1 + 5e-6), 10, 300).tS).toBeCloseTo(224.9, 1);
  });

  test('on a plateau names the moment it is reached', () => {
    const { tS, value } = sampled((t) => Math.min(t, 42.5), 10, 100);
    expect(value).toBe(42.5);
    expect(Math.abs(tS - 42.5)).toBeLessThan(3e-6);
  });

  test('of a quantity that falls from the start names the start', () => {
    expect(sampled((t) => 5 - t, 10, 100)).toMatchObject({ value: 5, tS: 0, soc: 0 });
  });

  test('of a quantity that rises to the end names the end', () => {
    const { tS, value } = sampled((t) => t / 10, 10, 100);
    expect(value).toBe(10);
    expect(Math.abs(tS - 100)).toBeLessThan(2e-5);
  });

  test('does not look across a jump', () => {
    const extreme = new Extreme(
      (t) => (t < 50 ? t : 10),
      () => 0,
    );
    for (const t of [0, 20, 40]) extreme.sample(t, t);
    extreme.sample(49, 49);
    extreme.close();
    for (const t of [50, 60, 70]) extreme.sample(t, 10);
    extreme.close();
    expect(extreme.value).toBe(49);
    expect(Math.abs(extreme.tS - 49)).toBeLessThan(3e-6);
  });
});
