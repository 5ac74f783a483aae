import { expect, test } from 'vitest';
import { deskReducer, deskWith, type DeskAction } from './desk-state.ts';
import { saysOtherwise, whyNotTaken, withReference } from './library-parts.ts';
import { sampleStudy } from './sample-study.ts';

const reference = { part: 'station' as const, itemId: 'tola', revision: 3, keptAgainst: null };
const start = deskWith({ draft: { study: sampleStudy, pending: {} }, references: [reference], baseline: null });
const weaker = { ...sampleStudy.station, currentMaxA: 300 };
const take: DeskAction = {
  type: 'refer',
  references: withReference(start.sheet.references, { ...reference, revision: 4 }),
  parts: [{ path: 'station', value: weaker }],
  label: 'take hall, revision 4',
};

test('taking a revision replaces the part and moves the reference in one step, which undo takes back whole', () => {
  const taken = deskReducer(start, take);
  expect(taken.sheet.draft.study.station).toEqual(weaker);
  expect(taken.sheet.references).toEqual([{ ...reference, revision: 4 }]);
  expect(deskReducer(taken, { type: 'undo' }).sheet).toEqual(start.sheet);
});

test('editing a part keeps where it came from; opening another study does not', () => {
  const entry = { type: 'entry', path: 'station.currentMaxA', entry: 350, label: 'A' } as const;
  expect(deskReducer(start, entry).sheet.references).toEqual([reference]);
  const opened = deskReducer(start, { type: 'open', study: sampleStudy, label: 'open a file' });
  expect(opened.sheet.references).toEqual([]);
  expect(deskReducer(opened, { type: 'undo' }).sheet.references).toEqual([reference]);
});

test('entries that wait in a part go with it when another is taken', () => {
  const typed = deskReducer(start, { type: 'entry', path: 'station.currentMaxA', entry: -1, label: 'A' });
  expect(typed.sheet.draft.pending).toEqual({ 'station.currentMaxA': -1 });
  expect(deskReducer(typed, take).sheet.draft.pending).toEqual({});
});

test('keeping the older revision is a step of its own that changes no input', () => {
  const references = withReference(start.sheet.references, { ...reference, keptAgainst: 4 });
  const kept = deskReducer(start, { type: 'refer', references, parts: [], label: 'keep hall, revision 3' });
  expect(kept.sheet.draft).toBe(start.sheet.draft);
  expect(kept.sheet.references[0]?.keptAgainst).toBe(4);
});

test('saysOtherwise compares what parts mean: a default that is written counts as the same', () => {
  const written = { ...sampleStudy.station, rampAPerS: 20 };
  const usual = { ...sampleStudy.station };
  expect(saysOtherwise('station', usual, { ...usual })).toBe(false);
  expect(saysOtherwise('station', usual, weaker)).toBe(true);
  expect(saysOtherwise('station', undefined, usual)).toBe(true);
  expect(saysOtherwise('pack', { ...sampleStudy.pack }, { ...sampleStudy.pack, busbarMilliohm: undefined })).toBe(
    false,
  );
  expect(saysOtherwise('station', usual, written)).toBe(false);
});

test('whyNotTaken gives the engine’s reason where the study could not be run with the part', () => {
  expect(whyNotTaken(sampleStudy, 'station', weaker)).toBeNull();
  const low = { ...sampleStudy.cell, vMaxV: 3.65 };
  expect(whyNotTaken(sampleStudy, 'cell', low)).toMatch(/cellVoltageCeilingV/);
});

test('a desk that is only read follows the study and refuses every change', () => {
  const reading = { ...start, readOnly: true };
  const refused: DeskAction[] = [
    take,
    { type: 'entry', path: 'station.currentMaxA', entry: 350, label: 'A' },
    { type: 'parts', parts: [{ path: 'title', value: 'x' }], label: 'title' },
    { type: 'open', study: sampleStudy, label: 'open' },
    { type: 'undo' },
    { type: 'redo' },
    { type: 'swap-baseline' },
  ];
  for (const action of refused) expect(deskReducer(reading, action)).toBe(reading);
  expect(deskReducer(reading, { type: 'view', view: { axis: 'soc' } }).view.axis).toBe('soc');
  const based = deskReducer(reading, { type: 'set-baseline', study: sampleStudy, name: 'Revision 2' });
  expect(based.sheet).toMatchObject({ baseline: sampleStudy, baselineName: 'Revision 2' });
  const draft = { study: { ...sampleStudy, title: 'Other' }, pending: {} };
  const followed = deskReducer(reading, { type: 'draft', draft, references: [], label: 'changes' });
  expect(followed.sheet.draft.study.title).toBe('Other');
  expect(followed.past).toEqual([]);
});
