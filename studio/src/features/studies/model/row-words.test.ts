import { expect, test } from 'vitest';
import { countLine, partsLine, studiesWord } from './row-words.ts';

test('partsLine says the kind and what the study is made of, as far as that is known', () => {
  const session = { kind: 'session', packName: 'Vicuña 86', stationName: 'Salar Tola 150' } as const;
  expect(partsLine(session)).toBe('Session: Vicuña 86, Salar Tola 150');
  expect(partsLine({ ...session, kind: 'trip', stationName: null })).toBe('Trip: Vicuña 86');
  expect(partsLine({ kind: 'sweep', packName: null, stationName: null })).toBe('Sweep');
});

test('countLine counts the workspace, and with a filter what is shown of it', () => {
  expect(countLine('Puna Mobility', { total: 31, inReviewTotal: 4 }, null)).toBe(
    '31 in Puna Mobility, 4 waiting for a review',
  );
  expect(countLine('Puna Mobility', { total: 31, inReviewTotal: 0 }, 7)).toBe(
    '7 of 31 in Puna Mobility, none waiting for a review',
  );
});

test('studiesWord counts in words', () => {
  expect([0, 1, 12].map(studiesWord)).toEqual(['0 studies', '1 study', '12 studies']);
});
