import { expect, test } from 'vitest';
import { deskReducer, freshDesk, type DeskAction, type DeskState } from './desk-state.ts';
import { sampleStudy } from './sample-study.ts';

const start = freshDesk(sampleStudy);
const after = (...actions: DeskAction[]): DeskState => actions.reduce(deskReducer, start);
const current = (entry: number): DeskAction => ({
  type: 'entry',
  path: 'station.currentMaxA',
  entry,
  label: 'Current, most',
});

test('typing in one field is one step of undo', () => {
  const typed = after(current(3), current(35), current(350));
  expect(typed.past).toHaveLength(1);
  expect(deskReducer(typed, { type: 'undo' }).sheet).toEqual(start.sheet);
});

test('leaving the field ends the step', () => {
  const typed = after(current(350), { type: 'leave-field' }, current(360));
  expect(typed.past.map((step) => step.label)).toEqual(['Current, most', 'Current, most']);
  expect(deskReducer(typed, { type: 'undo' }).sheet.draft.study.station.currentMaxA).toBe(350);
});

test('undo and redo walk the same sheets, a new change forgets what was undone', () => {
  const walked = after(current(350), { type: 'undo' }, { type: 'redo' });
  expect(walked.sheet.draft.study.station.currentMaxA).toBe(350);
  expect(after(current(350), { type: 'undo' }, current(360)).future).toEqual([]);
  expect(after({ type: 'undo' })).toBe(start);
});

test('an entry that waits is undone like any other', () => {
  const waiting = after(current(-1));
  expect(waiting.sheet.draft.pending).toEqual({ 'station.currentMaxA': -1 });
  expect(deskReducer(waiting, { type: 'undo' }).sheet.draft.pending).toEqual({});
});

test('baseline is kept, swapped, cleared, each undoable', () => {
  const kept = after({ type: 'keep-baseline' }, current(350));
  expect(kept.sheet.baseline?.station.currentMaxA).toBe(500);
  const swapped = deskReducer(kept, { type: 'swap-baseline' });
  expect(swapped.sheet.baseline?.station.currentMaxA).toBe(350);
  expect(swapped.sheet.draft.study.station.currentMaxA).toBe(500);
  const cleared = deskReducer(swapped, { type: 'clear-baseline' });
  expect(cleared.sheet.baseline).toBeNull();
  expect(deskReducer(cleared, { type: 'undo' }).sheet).toBe(swapped.sheet);
});

test('opening a study keeps the one before under undo', () => {
  const opened = after(current(350), { type: 'open', study: { ...sampleStudy, title: 'Other' }, label: 'open Other' });
  expect(deskReducer(opened, { type: 'undo' }).sheet.draft.study.station.currentMaxA).toBe(350);
});

test('what is shown is no step of undo', () => {
  expect(after({ type: 'view', view: { axis: 'soc' } }).past).toEqual([]);
});
