import { expect, test } from 'vitest';
import { comparedOf } from './compared.ts';

test('comparedOf reads two revisions that are there, in either order', () => {
  expect(comparedOf('2..5', 5)).toEqual({ from: 2, to: 5 });
  expect(comparedOf('5..2', 5)).toEqual({ from: 5, to: 2 });
});

test.each([null, '', '2', '2..2', '0..1', '2..6', 'a..b', '1..2..3'])('comparedOf leaves %s aside', (text) => {
  expect(comparedOf(text, 5)).toBeNull();
});
