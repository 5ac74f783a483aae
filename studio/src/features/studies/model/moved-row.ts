import type { InfiniteData } from '@tanstack/react-query';
import type { ListQuery, StudyPage } from '../api/list-studies.ts';

type List = InfiniteData<StudyPage, string | null>;

/**
 * A list as it will be once a study has gone into the archive, or come out of it. In a list that it comes into, its place
 * is not known: only the counts change there.
 *
 * @param query  what the list was asked for
 */
export function withRowMoved(
  list: List,
  query: ListQuery,
  { studyId, toArchive }: { studyId: string; toArchive: boolean },
): List {
  const row = list.pages.flatMap(({ items }) => items).find(({ id }) => id === studyId);
  const isLeaving = row !== undefined && (query.archived === 'yes') !== toArchive;
  const step = toArchive ? 1 : -1;
  const waits = row?.state === 'in-review' ? step : 0;
  const pages = list.pages.map((page) => ({
    ...page,
    items: isLeaving ? page.items.filter(({ id }) => id !== studyId) : page.items,
    total: page.total - (isLeaving ? 1 : 0),
    archivedTotal: page.archivedTotal + step,
    inReviewTotal: page.inReviewTotal - waits,
  }));
  return { ...list, pages };
}
