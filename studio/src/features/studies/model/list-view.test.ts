import fc from 'fast-check';
import { expect, test } from 'vitest';
import { studyKinds, studyStates } from '../../../../../server/src/contract/study-words.ts';
import { studyEndpoints } from '../../../../../server/src/contract/study.ts';
import { isFiltered, paramsOf, queryOf, sortedBy, sorts, viewOf, wholeList, type SortBy } from './list-view.ts';

const me = '0'.repeat(26);
const other = 'z'.repeat(26);
const view = (address: string) => viewOf(new URLSearchParams(address));

test('paramsOf and viewOf undo each other for every view', () => {
  const views = fc.record({
    q: fc.string({ maxLength: 200 }),
    kind: fc.constantFrom('all' as const, ...studyKinds),
    state: fc.constantFrom('any' as const, ...studyStates),
    owner: fc.constantFrom('any', 'mine', other),
    isArchive: fc.boolean(),
    sort: fc.constantFrom(...(Object.keys(sorts) as SortBy[])),
    order: fc.constantFrom('asc' as const, 'desc' as const),
  });
  fc.assert(
    fc.property(views, (one) => {
      expect(view(paramsOf(one).toString())).toEqual(one);
    }),
  );
});

test('the whole list has an address without parameters', () => {
  expect(paramsOf(wholeList).toString()).toBe('');
  expect(view('')).toEqual(wholeList);
});

test('viewOf leaves aside what it does not know', () => {
  expect(view('kind=nap&state=lost&owner=<b>&archive=1&sort=price&order=up')).toEqual(wholeList);
  expect(view(`q=${'x'.repeat(300)}`).q).toHaveLength(200);
});

test('queryOf asks for what the contract takes, and for the reader’s own studies by their id', () => {
  const asked = queryOf(view('q=%20vicu%20&kind=session&owner=mine&archive=yes&sort=title&order=desc'), me);
  expect(asked).toEqual({ q: 'vicu', kind: 'session', ownerId: me, archived: 'yes', sort: 'title', order: 'desc' });
  expect(studyEndpoints.listStudies.query.parse(asked)).toMatchObject(asked);
  expect(queryOf(view(`owner=${other}&q=%20`), me)).toEqual({
    ownerId: other,
    archived: 'no',
    sort: 'changed',
    order: 'desc',
  });
});

test('sorts names every sort of the contract', () => {
  expect(Object.keys(sorts).sort()).toEqual([...studyEndpoints.listStudies.query.shape.sort.unwrap().options].sort());
});

test('sortedBy starts a column with its usual order and turns it round when pressed again', () => {
  const title = { ...wholeList, ...sortedBy(wholeList, 'title') };
  expect(title).toMatchObject({ sort: 'title', order: 'asc' });
  expect(sortedBy(title, 'title')).toEqual({ sort: 'title', order: 'desc' });
  expect(sortedBy(title, 'hottestCoreC')).toEqual({ sort: 'hottestCoreC', order: 'desc' });
});

test('isFiltered does not count the archive or an order', () => {
  expect(isFiltered(view('archive=yes&sort=title'))).toBe(false);
  for (const one of ['q=a', 'kind=trip', 'state=draft', 'owner=mine']) expect(isFiltered(view(one))).toBe(true);
  expect(isFiltered(view('q=%20'))).toBe(false);
});
