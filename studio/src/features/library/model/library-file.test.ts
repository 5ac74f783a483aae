import { expect, test } from 'vitest';
import vicuna from '../../../../../examples/vicuna-warm-arrival.json';
import type { LibraryFile, LibraryItem } from '../../../../../server/src/contract/library.ts';
import { fileIssues, importPlan, readLibraryText, refusedIssues } from './library-file.ts';

const item = (kind: LibraryItem['kind'], name: string, body: object) => ({
  kind,
  name,
  notes: '',
  source: '',
  body: body as LibraryItem['body'],
});
const fileOf = (...items: LibraryFile['items']): LibraryFile => ({ format: 'voltiplano/library', version: 1, items });
const station = item('station', 'Salar Tola', vicuna.station);
const issuesOf = (text: string) => {
  const read = readLibraryText(text);
  return 'issues' in read ? read.issues : [];
};

test('a library file is read', () => {
  expect(readLibraryText(JSON.stringify(fileOf(station)))).toEqual({ file: fileOf(station) });
});

test('what is no library file says why', () => {
  expect(issuesOf('{')[0]!.message).toMatch(/^This is no JSON: /);
  expect(issuesOf('[]')[0]!.message).toMatch(/must be “voltiplano\/library”, but it has none/);
  expect(issuesOf(JSON.stringify(vicuna))[0]!.message).toMatch(/but it says "voltiplano\/study"/);
});

test('a wrong item is named, with the field', () => {
  const wrong = { ...fileOf(station), items: [station, { ...station, kind: 'wheel' }, { ...station, name: '' }] };
  expect(issuesOf(JSON.stringify(wrong)).map(({ item: of, path }) => [of, path])).toEqual([
    ['Item 2', 'kind'],
    ['Station “”', 'name'],
  ]);
});

test('what the engine does not take of an item is said by item and path', () => {
  const bad = item('strategy', 'Vicuña ledges', { ...vicuna.strategy, hotDerate: { fromC: 40, toC: 30 } });
  expect(fileIssues(fileOf(station, bad))).toEqual([
    {
      item: 'Strategy “Vicuña ledges”',
      path: 'hotDerate.toC',
      message: 'hotDerate.toC must lie above fromC (40), but is 30',
    },
  ]);
});

test('a body without its own name takes the item’s', () => {
  const { name: _name, ...body } = vicuna.station;
  expect(fileIssues(fileOf(item('station', 'Salar Tola', body)))).toEqual([]);
});

test('what the server refused is said by item and path', () => {
  const errors = [{ path: 'body.file.items.0.body.powerMaxKw', message: 'must be above 0' }];
  expect(refusedIssues(fileOf(station), errors)).toEqual([
    { item: 'Station “Salar Tola”', path: 'powerMaxKw', message: 'must be above 0' },
  ]);
});

test('importPlan says what becomes of each part, and takes each part there once', () => {
  const there = { ...station, archivedAt: null, body: { ...station.body, name: 'Salar Tola' } };
  const other = item('station', 'Salar Tola', { ...vicuna.station, powerMaxKw: 90 });
  const fresh = item('station', 'Salar Cima', vicuna.station);
  const fates = (sameName: 'revise' | 'add' | 'skip', ...items: LibraryFile['items']) =>
    importPlan(fileOf(...items), [there], sameName).map(({ fate }) => fate);
  expect(fates('revise', other, fresh)).toEqual(['revised', 'added']);
  expect(fates('add', other, fresh)).toEqual(['added', 'added']);
  expect(fates('skip', other, fresh)).toEqual(['left', 'added']);
  expect(fates('revise', station)).toEqual(['left']);
  expect(fates('revise', other, station)).toEqual(['added', 'left']);
  expect(importPlan(fileOf(other), [{ ...there, archivedAt: '2026-01-01T00:00:00Z' }], 'revise')[0]!.fate).toBe(
    'added',
  );
});
