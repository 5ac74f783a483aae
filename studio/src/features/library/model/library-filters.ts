import type { LibraryQuery } from '../api/list-library.ts';
import { isLibraryKind } from './kinds.ts';

const SORTS = ['name', 'kind', 'changed', 'studies'] as const;
type SortBy = (typeof SORTS)[number];

/** What a list of the library shows, as its address says it. */
export type LibraryFilters = {
  kind?: LibraryQuery['kind'];
  q: string;
  archived: boolean;
  sort: { by: SortBy; order: 'asc' | 'desc' };
};

/** Reads the address; what it does not say, or says wrongly, is as on a first visit. */
export function filtersOf(search: URLSearchParams): LibraryFilters {
  const kind = search.get('kind');
  const by = search.get('sort') as SortBy;
  return {
    ...(isLibraryKind(kind) ? { kind } : {}),
    q: search.get('q') ?? '',
    archived: search.get('archived') === 'yes',
    sort: {
      by: SORTS.includes(by) ? by : 'name',
      order: search.get('order') === 'desc' ? 'desc' : 'asc',
    },
  };
}

/** The address of a list; what is as on a first visit is left out. */
export function searchOf({ kind, q, archived, sort }: LibraryFilters): URLSearchParams {
  const search = new URLSearchParams();
  if (kind) search.set('kind', kind);
  if (q) search.set('q', q);
  if (archived) search.set('archived', 'yes');
  if (sort.by !== 'name') search.set('sort', sort.by);
  if (sort.order !== 'asc') search.set('order', sort.order);
  return search;
}

/** The same, as the server is asked. */
export function queryOf({ kind, q, archived, sort }: LibraryFilters): LibraryQuery {
  return {
    ...(kind ? { kind } : {}),
    ...(q.trim() ? { q: q.trim() } : {}),
    archived: archived ? 'yes' : 'no',
    sort: sort.by,
    order: sort.order,
  };
}
