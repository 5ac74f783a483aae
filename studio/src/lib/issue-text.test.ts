import { parseStudy, StudyError, type StudyIssue } from '@voltiplano/engine';
import { expect, test } from 'vitest';
import example from '../../../examples/vicuna-warm-arrival.json';
import { measureOf } from '../components/fields/measure.ts';
import { issueSentence } from './issue-text.ts';
import { withValueAt } from './study-path.ts';

const warm = withValueAt(example, 'strategy.hotDerate', { fromC: 45, toC: 55 });

function firstIssue(study: unknown): StudyIssue {
  try {
    parseStudy(study);
  } catch (error) {
    if (error instanceof StudyError) return error.issues[0]!;
  }
  throw new Error('Nothing is wrong with this study');
}

const sentence = (path: string, value: unknown, temperature: '°C' | '°F' = '°C') =>
  issueSentence(firstIssue(withValueAt(warm, path, value)), measureOf(path as never), temperature);

test('issueSentence calls other fields by their labels and gives numbers their unit', () => {
  expect(sentence('strategy.hotDerate.toC', 34)).toBe('Must lie above “Hot limit from” (45 °C), but is 34 °C.');
  expect(sentence('strategy.cellVoltageCeilingV', 4.4)).toBe(
    'Must not pass “Cell voltage, highest allowed” (4.2 V), but is 4.4 V.',
  );
});

test('issueSentence speaks the units on screen', () => {
  expect(sentence('strategy.hotDerate.toC', 35, '°F')).toBe('Must lie above “Hot limit from” (113 °F), but is 95 °F.');
  expect(sentence('session.startSoc', 1.2)).toBe('Must be at most 100 %, but is 120 %.');
});

test('issueSentence names parts and says no unit twice', () => {
  const issue = firstIssue(withValueAt(warm, 'cell.anode', undefined));
  expect(issueSentence(issue, measureOf('strategy.anodeMarginMv'), '°C')).toMatch(
    /^Needs “Anode” of the cell: a margin of 28 mV cannot be guarded/,
  );
});

test('issueSentence asks for what is missing and quotes what is no number', () => {
  expect(sentence('station.currentMaxA', undefined)).toBe('Needs a value.');
  const typed: StudyIssue = { path: 'station.currentMaxA', rule: 'not-a-number', value: '35o', message: '' };
  expect(issueSentence(typed, measureOf('station.currentMaxA'), '°C')).toBe('Must be a number, but is “35o”.');
});
