import { expect, test } from 'vitest';
import { draftIssues, entryAt, withEntry, withParts, type Draft } from './draft.ts';
import { sampleStudy } from './sample-study.ts';

const draft: Draft = { study: sampleStudy, pending: {} };

test('withEntry moves a right value into the study', () => {
  const after = withEntry(draft, 'station.currentMaxA', 350);
  expect(after.study.station.currentMaxA).toBe(350);
  expect(after.pending).toEqual({});
});

test('withEntry keeps what breaks a range beside the last good value', () => {
  const after = withEntry(draft, 'station.currentMaxA', -5);
  expect(after.study.station.currentMaxA).toBe(500);
  expect(entryAt(after, 'station.currentMaxA')).toBe(-5);
  expect(draftIssues(after)).toMatchObject([{ path: 'station.currentMaxA', rule: 'range', value: '-5' }]);
});

test('withEntry keeps text that is no number, and the empty required field', () => {
  const text = withEntry(draft, 'station.currentMaxA', '35o');
  expect(draftIssues(text)).toMatchObject([{ path: 'station.currentMaxA', rule: 'not-a-number', value: '35o' }]);
  const empty = withEntry(draft, 'station.currentMaxA', null);
  expect(empty.study.station.currentMaxA).toBe(500);
  expect(draftIssues(empty)).toMatchObject([{ path: 'station.currentMaxA', rule: 'missing' }]);
});

test('withEntry empties an optional field', () => {
  expect(withEntry(draft, 'inlet.currentMaxA', null).study.inlet).not.toHaveProperty('currentMaxA');
});

test('a rule between two fields holds the entry back until the other is right, then both move', () => {
  const crossed = withEntry(draft, 'strategy.hotDerate.fromC', 60);
  expect(crossed.study.strategy.hotDerate.fromC).toBe(45);
  expect(draftIssues(crossed)).toMatchObject([{ path: 'strategy.hotDerate.toC', rule: 'must-lie-above' }]);
  const mended = withEntry(crossed, 'strategy.hotDerate.toC', 65);
  expect(mended.study.strategy.hotDerate).toEqual({ fromC: 60, toC: 65 });
  expect(mended.pending).toEqual({});
});

test('an entry that waits does not hold up the others', () => {
  const after = withEntry(withEntry(draft, 'strategy.hotDerate.toC', 34), 'station.currentMaxA', 350);
  expect(after.study.station.currentMaxA).toBe(350);
  expect(Object.keys(after.pending)).toEqual(['strategy.hotDerate.toC']);
});

test('a grid waits as a whole and names its cell', () => {
  const broken = withEntry(draft, 'strategy.taper.steps', [
    [0, 360],
    [0.3, 'x'],
    [0.5, 230],
  ]);
  expect(draftIssues(broken)).toMatchObject([{ path: 'strategy.taper.steps[1].value', rule: 'not-a-number' }]);
  const falling = withEntry(draft, 'strategy.taper.steps', [
    [0.4, 360],
    [0.3, 310],
  ]);
  expect(draftIssues(falling)).toMatchObject([{ path: 'strategy.taper.steps[1].fromSoc', rule: 'must-rise' }]);
  expect(falling.study).toBe(draft.study);
  expect(entryAt(falling, 'strategy.taper.steps')).toEqual([
    [0.4, 360],
    [0.3, 310],
  ]);
});

test('withParts drops entries that waited in what it replaces', () => {
  const waiting = withEntry(draft, 'strategy.taper.steps', [[0, 'x']]);
  const after = withParts(waiting, [{ path: 'strategy.taper', value: { shape: 'none' } }]);
  expect(after.pending).toEqual({});
  expect(after.study.strategy.taper).toEqual({ shape: 'none' });
});

test('withParts refuses parts that do not make a study', () => {
  expect(() => withParts(draft, [{ path: 'cell.anode', value: undefined }])).toThrow(/anodeMarginMv/);
});
