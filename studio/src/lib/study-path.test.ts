import { expect, test } from 'vitest';
import { isWithin, parsePath, valueAt, withValueAt } from './study-path.ts';

test('parsePath reads members and rows', () => {
  expect(parsePath('strategy.taper.points[3].soc')).toEqual(['strategy', 'taper', 'points', 3, 'soc']);
  expect(parsePath('pack.socWindow[0]')).toEqual(['pack', 'socWindow', 0]);
  expect(() => parsePath('a b')).toThrow(/Not a path/);
});

test('valueAt finds nothing in what is not there', () => {
  expect(valueAt({ a: [{ b: 2 }] }, 'a[0].b')).toBe(2);
  expect(valueAt({ a: 1 }, 'a.b.c')).toBeUndefined();
});

test('withValueAt copies along the path and leaves the rest shared', () => {
  const before = { a: { b: 1 }, c: { d: [1, 2] } };
  const after = withValueAt(before, 'a.b', 5);
  expect(after).toEqual({ a: { b: 5 }, c: { d: [1, 2] } });
  expect(after.c).toBe(before.c);
  expect(before.a.b).toBe(1);
});

test('withValueAt makes what is missing, and takes away with undefined', () => {
  expect(withValueAt({}, 'inlet.currentMaxA', 300)).toEqual({ inlet: { currentMaxA: 300 } });
  expect(withValueAt({ inlet: { currentMaxA: 300 } }, 'inlet.currentMaxA', undefined)).toEqual({ inlet: {} });
  expect(withValueAt({ a: 1 }, 'inlet.currentMaxA', undefined)).toEqual({ a: 1 });
  expect(withValueAt({ a: [0, 1] }, 'a[1]', 9)).toEqual({ a: [0, 9] });
});

test('isWithin does not mistake a longer name for a child', () => {
  expect(isWithin('strategy.taper.steps[0].value', 'strategy.taper')).toBe(true);
  expect(isWithin('strategy.taper', 'strategy.taper')).toBe(true);
  expect(isWithin('strategy.taperOther', 'strategy.taper')).toBe(false);
});
