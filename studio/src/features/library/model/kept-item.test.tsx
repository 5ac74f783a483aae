import { afterEach, expect, test } from 'vitest';
import vicuna from '../../../../../examples/vicuna-warm-arrival.json';
import type { LibraryItem } from '../../../../../server/src/contract/library.ts';
import { createItemStore, untouched } from './item-store.ts';
import { readKeptItem } from './kept-item.ts';

afterEach(() => localStorage.clear());

const item = {
  id: 'i',
  kind: 'station',
  name: 'Salar Tola',
  notes: '',
  source: '',
  body: vicuna.station,
  revision: 3,
} as unknown as LibraryItem;
const kept = () => readKeptItem('w', 'i');

test('a draft is kept as soon as something is changed, waiting entries too, and found again', () => {
  const store = createItemStore('w', item);
  expect(store.get().isChanged).toBe(false);
  store.update(({ base, draft }) => ({ base, draft: { ...draft, pending: { 'station.powerMaxKw': 'x' } } }));
  expect(store.get()).toMatchObject({ isChanged: true, isKept: true });
  const next = createItemStore('w', { ...item, revision: 4 });
  expect(next.get().base.revision).toBe(3);
  expect(next.get().draft.pending).toEqual({ 'station.powerMaxKw': 'x' });
  next.update(() => untouched(item));
  expect(kept()).toBeNull();
});

test('what cannot be read is left aside', () => {
  for (const text of ['', '{', '[]', '{"version":1}', '{"version":2}']) {
    localStorage.setItem('voltiplano.library.w.i', text);
    expect(kept()).toBeNull();
  }
});
