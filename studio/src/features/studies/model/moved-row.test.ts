import { expect, test } from 'vitest';
import type { StudyPage } from '../api/list-studies.ts';
import { withRowMoved } from './moved-row.ts';

const row = (id: string, state = 'draft') => ({ id, state }) as StudyPage['items'][number];
const page = (...items: StudyPage['items']): StudyPage => ({
  items,
  nextCursor: null,
  total: 60,
  archivedTotal: 12,
  inReviewTotal: 4,
});
const list = { pages: [page(row('a'), row('b', 'in-review')), page(row('c'))], pageParams: [null, 'next'] };
const shown = ({ pages }: typeof list) => pages.map(({ items }) => items.map(({ id }) => id));
const counts = ({ pages }: typeof list) => pages.map((one) => [one.total, one.archivedTotal, one.inReviewTotal]);

test('a study that goes into the archive leaves the list, and every page counts so', () => {
  const after = withRowMoved(list, { archived: 'no' }, { studyId: 'c', toArchive: true });
  expect(shown(after)).toEqual([['a', 'b'], []]);
  expect(counts(after)).toEqual([
    [59, 13, 4],
    [59, 13, 4],
  ]);
  expect(after.pageParams).toEqual(list.pageParams);
});

test('one in review no longer waits there', () => {
  const after = withRowMoved(list, {}, { studyId: 'b', toArchive: true });
  expect(counts(after)[0]).toEqual([59, 13, 3]);
});

test('a study that is taken out leaves the archive', () => {
  const after = withRowMoved(list, { archived: 'yes' }, { studyId: 'a', toArchive: false });
  expect(shown(after)).toEqual([['b'], ['c']]);
  expect(counts(after)[0]).toEqual([59, 11, 4]);
});

test('a list that the study comes into keeps its rows and counts the archive', () => {
  const after = withRowMoved(list, { archived: 'no' }, { studyId: 'z', toArchive: false });
  expect(shown(after)).toEqual(shown(list));
  expect(counts(after)[0]).toEqual([60, 11, 4]);
});
