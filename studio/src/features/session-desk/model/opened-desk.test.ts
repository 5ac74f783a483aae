import { expect, test } from 'vitest';
import type { WorkingCopy } from '../../../../../server/src/contract/study.ts';
import { deskReducer, deskWith } from './desk-state.ts';
import { heldDesk, heldEditsText, readHeldEdits, type HeldDesk } from './held-edits.ts';
import { keptDeskText } from './kept-desk.ts';
import { openedDesk } from './opened-desk.ts';
import { sampleStudy } from './sample-study.ts';
import { contentBody, contentMark, type Content } from './working-content.ts';

const content = (currentMaxA: number, pending = {}): Content => ({
  draft: { study: { ...sampleStudy, station: { ...sampleStudy.station, currentMaxA } }, pending },
  references: [],
});

const serverHas = (current: number, version: number): WorkingCopy => ({
  ...contentBody(content(current)),
  parts: [],
  version,
  changedAt: '2026-11-02T10:00:00.000Z',
  changedBy: { id: 'p', name: 'Mateo Condori' },
  isChanged: true,
});

type Left = { tabId?: string; isSent?: boolean; at?: number; known?: string[]; pending?: object };

function left(
  current: number,
  version: number,
  { tabId = 'own', isSent = false, at = 1, known, pending }: Left = {},
): HeldDesk {
  const edits = {
    content: content(current, pending),
    version,
    isSent,
    at,
    known: known ?? [contentMark(content(500))],
  };
  const desk = deskWith({ ...edits.content, baseline: null });
  return heldDesk(tabId, readHeldEdits(heldEditsText(edits))!, keptDeskText(desk));
}

const currentOn = ({ desk }: ReturnType<typeof openedDesk>) => desk.sheet.draft.study.station.currentMaxA;
const undone = (opened: ReturnType<typeof openedDesk>) => ({
  ...opened,
  desk: deskReducer(opened.desk, { type: 'undo' }),
});

test('with nothing held the server’s copy is on the desk, what waits included', () => {
  const copy = { ...serverHas(500, 5), pending: { 'station.currentMaxA': '35o', 'not a path': 3 } };
  const opened = openedDesk(copy, null, []);
  expect(opened.desk.sheet.draft.pending).toEqual({ 'station.currentMaxA': '35o' });
  expect(opened).toMatchObject({ conflict: null, found: null, base: { version: 5 } });
});

test('held edits made from the server’s version are on the desk, to be sent', () => {
  const opened = openedDesk(serverHas(500, 5), left(400, 5), []);
  expect(currentOn(opened)).toBe(400);
  expect(opened).toMatchObject({ conflict: null, base: { version: 5, mark: contentMark(content(500)) } });
});

test('held edits whose sending had no answer follow the version that they made', () => {
  const known = [contentMark(content(500)), contentMark(content(400))];
  const opened = openedDesk(serverHas(400, 6), left(410, 5, { known }), []);
  expect(currentOn(opened)).toBe(410);
  expect(opened).toMatchObject({ conflict: null, base: { version: 6 } });
});

test('where the server moved on by another’s hand, held edits lead to a conflict', () => {
  const opened = openedDesk(serverHas(450, 6), left(400, 5), []);
  expect(currentOn(opened)).toBe(400);
  expect(opened).toMatchObject({ conflict: { version: 6 }, base: { version: 5 } });
});

test('edits of a tab that is gone are found, said, and sent by this one', () => {
  const opened = openedDesk(serverHas(500, 5), null, [left(390, 5, { tabId: 'gone' })]);
  expect(currentOn(opened)).toBe(390);
  expect(opened.found).toMatch(/^Found in this browser: changes of a closed tab/);
});

test('of two tabs’ edits the newer is on the desk and the older under undo', () => {
  const opened = openedDesk(serverHas(500, 5), left(400, 5, { at: 1 }), [left(390, 5, { tabId: 'gone', at: 2 })]);
  expect(currentOn(opened)).toBe(390);
  expect(currentOn(undone(opened))).toBe(400);
});

test('a desk whose edits the server has keeps its undo; what others changed since is one step of it', () => {
  const own = left(500, 5, { isSent: true });
  const before = deskReducer(own.desk!, { type: 'keep-baseline' });
  const opened = openedDesk(serverHas(450, 6), { ...own, desk: before }, []);
  expect(currentOn(opened)).toBe(450);
  expect(opened.desk.past.map(({ label }) => label)).toEqual(['keep as baseline', 'changes by Mateo Condori']);
  expect(currentOn(undone(opened))).toBe(500);
});

test('edits written after the desk win over the desk’s own sheet, and what waits comes back', () => {
  const { edits } = left(400, 5, { pending: { 'strategy.hotDerate.toC': 30 } });
  const older = keptDeskText(deskWith({ ...content(399), baseline: sampleStudy }));
  const opened = openedDesk(serverHas(500, 5), heldDesk('own', edits, older), []);
  expect(currentOn(opened)).toBe(400);
  expect(opened.desk.sheet.draft.pending).toEqual({ 'strategy.hotDerate.toC': 30 });
  expect(opened.desk.sheet.baseline).toEqual(sampleStudy);
});

test('readHeldEdits refuses what is no edits or cannot be run', () => {
  for (const text of ['', '{', 'null', '{"format":1}', '{"format":2,"content":{}}'])
    expect(readHeldEdits(text)).toBeUndefined();
  const edits = { content: content(-1), version: 5, isSent: false, known: [], at: 1 };
  expect(readHeldEdits(heldEditsText(edits))).toBeUndefined();
});

test('contentMark is the same for the same content in another order, and leaves references to absent parts out', () => {
  const { station, ...others } = sampleStudy;
  const turned: Content = { draft: { study: { station, ...others }, pending: {} }, references: [] };
  expect(contentMark(turned)).toBe(contentMark({ draft: { study: sampleStudy, pending: {} }, references: [] }));
  const taken = { part: 'vehicle' as const, itemId: 'i', revision: 1, keptAgainst: null };
  expect(contentBody({ ...turned, references: [taken] }).parts).toEqual([]);
  expect(contentMark(content(400))).not.toBe(contentMark(content(401)));
});
