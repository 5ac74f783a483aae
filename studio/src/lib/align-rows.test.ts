import fc from 'fast-check';
import { expect, test } from 'vitest';
import { alignedRows } from './align-rows.ts';

test('alignedRows holds rows together that begin alike, so that an inserted row moves no other', () => {
  const before = [
    [0, 500],
    [0.5, 300],
  ];
  const after = [
    [0, 480],
    [0.3, 400],
    [0.5, 280],
  ];
  expect(alignedRows(before, after)).toEqual([
    { before: 0, after: 0 },
    { before: null, after: 1 },
    { before: 1, after: 2 },
  ]);
});

test('alignedRows pairs in order what nothing holds together', () => {
  expect(alignedRows([[1, 2]], [[3, 4], [5, 6]])).toEqual([
    { before: 0, after: 0 },
    { before: null, after: 1 },
  ]); // prettier-ignore
});

test('alignedRows names every row of both sides once, in order', () => {
  const rows = fc.array(fc.tuple(fc.integer({ min: 0, max: 4 }), fc.integer({ min: 0, max: 2 })), { maxLength: 8 });
  fc.assert(
    fc.property(rows, rows, (before, after) => {
      const pairs = alignedRows(before, after);
      const seen = (side: 'before' | 'after') => pairs.flatMap((pair) => pair[side] ?? []);
      expect(seen('before')).toEqual(before.map((_, i) => i));
      expect(seen('after')).toEqual(after.map((_, i) => i));
    }),
  );
});

test('alignedRows pairs every row with itself where nothing changed', () => {
  const rows = fc.array(fc.array(fc.integer(), { maxLength: 3 }), { maxLength: 8 });
  fc.assert(
    fc.property(rows, (all) => {
      expect(alignedRows(all, all)).toEqual(all.map((_, i) => ({ before: i, after: i })));
    }),
  );
});
