import { expect, test } from 'vitest';
import type { LibraryItem, LibraryKind } from '../../../../../server/src/contract/library.ts';
import { examples } from '../../../lib/examples.ts';
import { issuesOf } from './judge-file.ts';
import { nothingChosen, putTogether, sessionParts } from './put-together.ts';

const load = (title: string) => examples.find((one) => one.title === title)!.load();
const item = (kind: LibraryKind, body: object | undefined, id = `${kind}-1`, revision = 3): LibraryItem => ({
  id,
  kind,
  name: kind,
  notes: '',
  source: '',
  body: body as LibraryItem['body'],
  revision,
  changedAt: '2026-06-03T11:40:00Z',
  changedBy: null,
  archivedAt: null,
  studyCount: 0,
});

test('with nothing chosen it is the example, called by its pack and station', async () => {
  const van = await load('Vicuña, warm arrival');
  expect(putTogether(van, [], nothingChosen, ' ')).toEqual({
    inputs: { ...van, title: 'Vicuña 110, 102 in series at Salar Tola 500 A' },
    parts: [],
  });
});

test('chosen parts take the example’s place, with references to their revisions', async () => {
  const [van, coupe] = [await load('Vicuña, warm arrival'), await load('Suri, full power')];
  const library = sessionParts.map((part) => item(part, coupe[part]));
  const { inputs, parts } = putTogether(van, library, { ...nothingChosen, pack: 'pack-1', cell: 'cell-1' }, 'Mixed');
  expect(inputs).toEqual({ ...van, pack: coupe.pack, cell: coupe.cell, title: 'Mixed' });
  expect(parts).toEqual([
    { part: 'pack', itemId: 'pack-1', revision: 3 },
    { part: 'cell', itemId: 'cell-1', revision: 3 },
  ]);
  expect(issuesOf(inputs)).toEqual([]);
});

test('an id that is not in the library, or of another kind, changes nothing', async () => {
  const van = await load('Vicuña, warm arrival');
  const chosen = { ...nothingChosen, pack: 'cell-1', station: 'gone' };
  expect(putTogether(van, [item('cell', van.cell)], chosen, 'Van')).toEqual({
    inputs: { ...van, title: 'Van' },
    parts: [],
  });
});
