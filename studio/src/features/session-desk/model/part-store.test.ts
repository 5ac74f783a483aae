import { expect, test } from 'vitest';
import type { PartBody } from './carriers.ts';
import { issuesOf } from './derived.ts';
import { createPartStore } from './part-store.ts';
import { sampleStudy } from './sample-study.ts';

const strategy = sampleStudy.strategy as PartBody;
const open = (saved: PartBody | null = strategy) =>
  createPartStore('strategy', sampleStudy, { body: strategy, pending: {} }, saved);
const enter = (store: ReturnType<typeof open>, path: string, entry: number | string | null) =>
  store.dispatch({ type: 'entry', path, entry, label: path });

test('an entry that only the carrier would refuse stands, and the carrier gives way', () => {
  const store = open();
  enter(store, 'strategy.cellVoltageCeilingV', 4.4);
  expect(store.entry()).toEqual({ body: { ...strategy, cellVoltageCeilingV: 4.4 }, pending: {} });
  expect(store.get().sheet.draft.study.cell.vMaxV).toBe(4.4);
  store.dispatch({ type: 'undo' });
  expect(store.entry().body).toEqual(strategy);
});

test('an entry that breaks a rule of the part itself waits as it was typed', () => {
  const store = open();
  enter(store, 'strategy.hotDerate.toC', 30);
  enter(store, 'strategy.cellVoltageCeilingV', '4,x');
  enter(store, 'strategy.cutoffA', 12);
  expect(store.entry()).toEqual({
    body: { ...strategy, cutoffA: 12 },
    pending: { 'strategy.hotDerate.toC': 30, 'strategy.cellVoltageCeilingV': '4,x' },
  });
  expect(issuesOf(store.get().sheet.draft).map(({ path }) => path)).toContain('strategy.hotDerate.toC');
  enter(store, 'strategy.cellVoltageCeilingV', 4.5);
  expect(store.entry().pending).toEqual({ 'strategy.hotDerate.toC': 30 });
  enter(store, 'strategy.hotDerate.fromC', 25);
  expect(store.entry().pending).toEqual({});
});

test('entry is the same object until the part changes', () => {
  const store = open();
  const before = store.entry();
  store.dispatch({ type: 'view', view: { axis: 'soc' } });
  store.carryOn({ ...sampleStudy, title: 'Other' });
  expect(store.entry()).toBe(before);
});

test('carryOn shows the part and its past on another study', () => {
  const store = open();
  enter(store, 'strategy.cutoffA', 12);
  store.carryOn({ ...sampleStudy, title: 'Other' });
  expect(store.get().sheet.draft.study.title).toBe('Other');
  store.dispatch({ type: 'undo' });
  expect(store.get().sheet.draft.study.title).toBe('Other');
  expect(store.entry().body).toEqual(strategy);
});

test('replace puts another part in place and keeps the one before under undo', () => {
  const store = open();
  enter(store, 'strategy.hotDerate.toC', 30);
  store.replace({ ...strategy, cellVoltageCeilingV: 4.3 }, 'take theirs');
  expect(store.entry()).toEqual({ body: { ...strategy, cellVoltageCeilingV: 4.3 }, pending: {} });
  store.dispatch({ type: 'undo' });
  expect(store.entry()).toEqual({ body: strategy, pending: { 'strategy.hotDerate.toC': 30 } });
});

test('compareWith marks changes against another part from then on', () => {
  const store = open(null);
  expect(store.get().sheet.baseline).toBeNull();
  store.compareWith({ ...strategy, cutoffA: 1 });
  expect(store.get().sheet.baseline?.strategy.cutoffA).toBe(1);
});
