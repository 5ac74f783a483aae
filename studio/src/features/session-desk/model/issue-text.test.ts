import { expect, test } from 'vitest';
import { measureOf } from '../../../components/fields/measure.ts';
import { draftIssues, withEntry } from './draft.ts';
import { issueSentence } from './issue-text.ts';
import { sampleStudy } from './sample-study.ts';

const sentence = (path: string, entry: number | string | null, temperature: '°C' | '°F' = '°C', quantity = path) => {
  const issue = draftIssues(withEntry({ study: sampleStudy, pending: {} }, path, entry))[0]!;
  return issueSentence(issue, measureOf(quantity as Parameters<typeof measureOf>[0]), temperature);
};

test('issueSentence calls other fields by their labels and gives numbers their unit', () => {
  expect(sentence('strategy.hotDerate.toC', 34)).toBe('Must lie above “Hot limit from” (45 °C), but is 34 °C.');
  expect(sentence('strategy.cellVoltageCeilingV', 4.4)).toBe(
    'Must not pass “Cell voltage, highest allowed” (4.25 V), but is 4.4 V.',
  );
});

test('issueSentence speaks the units on screen', () => {
  expect(sentence('strategy.hotDerate.toC', 35, '°F')).toBe('Must lie above “Hot limit from” (113 °F), but is 95 °F.');
  expect(sentence('session.startSoc', 1.2)).toBe('Must be at most 100 %, but is 120 %.');
});

test('issueSentence names parts and says no unit twice', () => {
  const { anode: _none, ...cell } = sampleStudy.cell;
  const { anodeMarginMv: _margin, ...strategy } = sampleStudy.strategy;
  const draft = withEntry({ study: { ...sampleStudy, cell, strategy }, pending: {} }, 'strategy.anodeMarginMv', 20);
  expect(issueSentence(draftIssues(draft)[0]!, measureOf('strategy.anodeMarginMv'), '°C')).toMatch(
    /^Needs “Anode” of the cell: a margin of 20 mV cannot be guarded/,
  );
});

test('issueSentence asks for what is missing and quotes what is no number', () => {
  expect(sentence('station.currentMaxA', null)).toBe('Needs a value.');
  expect(sentence('station.currentMaxA', '35o')).toBe('Must be a number, but is “35o”.');
});
