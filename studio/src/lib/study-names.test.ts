import { expect, test } from 'vitest';
import { studyNumber } from './study-names.ts';

test('studyNumber has three figures, and more where they are needed', () => {
  expect([1, 31, 1204].map(studyNumber)).toEqual(['001', '031', '1204']);
});
