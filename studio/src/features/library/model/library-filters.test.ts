import { expect, test } from 'vitest';
import { filtersOf, queryOf, searchOf } from './library-filters.ts';

const through = (search: string) => searchOf(filtersOf(new URLSearchParams(search))).toString();

test('filters go through the address and back, and first choices leave no trace there', () => {
  expect(through('')).toBe('');
  expect(through('sort=name&order=asc&archived=no')).toBe('');
  expect(through('kind=pack&q=vic&archived=yes&sort=changed&order=desc')).toBe(
    'kind=pack&q=vic&archived=yes&sort=changed&order=desc',
  );
});

test('what an address says wrongly is as on a first visit', () => {
  expect(through('kind=wheel&sort=colour&order=up')).toBe('');
});

test('queryOf leaves out what is not asked for', () => {
  expect(queryOf(filtersOf(new URLSearchParams('q=+')))).toEqual({ archived: 'no', sort: 'name', order: 'asc' });
});
