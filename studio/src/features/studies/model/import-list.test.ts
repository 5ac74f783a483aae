import { expect, test } from 'vitest';
import { importWord, newEntry, readyEntries, whyNothing, type ImportEntry } from './import-list.ts';

const study = { is: 'study', kind: 'session', title: 'A', inputs: {} as never } as const;
const wrong = { is: 'wrong', issues: [] } as const;
const entry = (part: Partial<ImportEntry>) => ({ ...newEntry('a.json', 'k'), ...part });

test('readyEntries are studies of which none was made yet', () => {
  const ready = entry({ judged: study });
  const again = entry({ judged: study, problem: 'No answer' });
  const others = [entry({}), entry({ judged: study, madeId: '1' }), entry({ judged: { is: 'library', parts: 1 } })];
  expect(readyEntries([ready, ...others, again])).toEqual([ready, again]);
});

test('whyNothing says what is in the way, and nothing where something can be imported', () => {
  expect(whyNothing([entry({})])).toBe('Reading.');
  expect(whyNothing([entry({ judged: { is: 'wrong', issues: [] } })])).toBe('None of these files can be imported.');
  expect(whyNothing([entry({ judged: study }), entry({ judged: { ...wrong, issues: [] } })])).toBeNull();
});

test('importWord counts', () => {
  expect([0, 1, 3].map(importWord)).toEqual(['Import', 'Import the study', 'Import 3 studies']);
});
