import fc from 'fast-check';
import { expect, test } from 'vitest';
import { coarseToFine } from './coarse-to-fine.ts';

test('every cell stands in the order exactly once, whatever the axes', () => {
  const lengths = fc.array(fc.integer({ min: 1, max: 27 }), { minLength: 1, maxLength: 3 });
  fc.assert(
    fc.property(lengths, (axes) => {
      const size = axes.reduce((product, length) => product * length, 1);
      const order = coarseToFine(axes);
      expect(order.length).toBe(size);
      expect([...order].sort((a, b) => a - b)).toEqual(Array.from({ length: size }, (_, i) => i));
    }),
  );
});

test('one axis of eight is halved again and again', () => {
  expect([...coarseToFine([8])]).toEqual([0, 4, 2, 6, 1, 5, 3, 7]);
});

test('the first sixteenth of a square map has a cell in each of its sixteenths, the first quarter in each of its quarters of those', () => {
  const n = 32;
  const order = coarseToFine([n, n]);
  for (const parts of [4, 8, 16]) {
    const boxes = new Set(
      [...order.slice(0, parts * parts)].map((index) => {
        const [i, j] = [Math.floor(index / n), index % n];
        return Math.floor((i * parts) / n) * parts + Math.floor((j * parts) / n);
      }),
    );
    expect(boxes.size).toBe(parts * parts);
  }
});

test('a long axis beside a short one is spread from its first cells on', () => {
  const first = [...coarseToFine([3, 5000])].slice(0, 16).map((index) => index % 5000);
  expect(Math.max(...first) - Math.min(...first)).toBeGreaterThan(3000);
});
