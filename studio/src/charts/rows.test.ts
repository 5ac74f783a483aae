import { describe, expect, it } from 'vitest';
import { integralOverHours, numberAt, placeOn, valueAt } from './rows.ts';

const t = [0, 10, 20, 20, 30];
const y = [1, 2, 3, 7, 9];

describe('placeOn and valueAt', () => {
  it('interpolates between rows', () => expect(numberAt(y, placeOn(t, 15))).toBe(2.5));
  it('takes the later row at a jump', () => expect(numberAt(y, placeOn(t, 20))).toBe(7));
  it('clamps at both ends', () => {
    expect(numberAt(y, placeOn(t, -5))).toBe(1);
    expect(numberAt(y, placeOn(t, 99))).toBe(9);
  });
  it('has no value beside a gap', () => {
    expect(valueAt([1, null, 3, 4, 5], placeOn(t, 5))).toBeNull();
    expect(valueAt([1, null, 3, 4, 5], placeOn(t, 0))).toBe(1);
  });
  it('works on a single row', () => expect(numberAt([4], placeOn([0], 3))).toBe(4));
});

it('integralOverHours of a step on doubled rows is exact', () => {
  expect(integralOverHours([0, 1800, 1800, 3600], [10, 10, 4, 4])).toEqual([0, 5, 5, 7]);
});
