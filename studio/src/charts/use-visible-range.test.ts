import { describe, expect, it } from 'vitest';
import { shiftedRange, zoomedRange } from './use-visible-range.ts';

describe('zoomedRange', () => {
  it('keeps the value where it stands', () => expect(zoomedRange([0, 100], [0, 100], 40, 0.5)).toEqual([20, 70]));
  it('stays inside the whole', () => expect(zoomedRange([50, 100], [0, 100], 100, 1.5)).toEqual([25, 100]));
  it('becomes the whole when wide enough', () => expect(zoomedRange([20, 70], [0, 100], 40, 2)).toBeNull());
});

it('shiftedRange moves by a share of itself and stays inside the whole', () => {
  expect(shiftedRange([20, 40], [0, 100], 0.5)).toEqual([30, 50]);
  expect(shiftedRange([20, 40], [0, 100], -2)).toEqual([0, 20]);
  expect(shiftedRange([70, 90], [0, 100], 1)).toEqual([80, 100]);
});
