import { expect, it } from 'vitest';
import { fringeOf } from './fringe.ts';

it('fringeOf hangs under the curve and stops at the ground', () => {
  const { upper, lower } = fringeOf({ code: 'hot', fromRow: 1, toRow: 2 }, [0, 10, 20], [50, 60, 95], 12, 100);
  expect(upper).toEqual([
    [10, 60],
    [20, 95],
  ]);
  expect(lower).toEqual([
    [10, 72],
    [20, 100],
  ]);
});
