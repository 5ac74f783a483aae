import type { QueryOf } from '../../../../../server/src/contract/endpoint.ts';
import type { studyEndpoints } from '../../../../../server/src/contract/study.ts';
import {
  studyKinds,
  studyStates,
  type StudyKind,
  type StudyState,
} from '../../../../../server/src/contract/study-words.ts';

export type StudiesQuery = QueryOf<typeof studyEndpoints.listStudies>;
export type SortBy = StudiesQuery['sort'];

/** What the register shows and in which order; stands in the address. */
export type ListView = {
  q: string;
  kind: StudyKind | 'all';
  state: StudyState | 'any';
  /** Of whom: anybody, the reader, or the id of a member. */
  owner: string;
  isArchive: boolean;
  sort: SortBy;
  order: 'asc' | 'desc';
};

/** What can be sorted by: what the sort is called, and the order one asks for first. */
export const sorts: Record<SortBy, { words: Record<'asc' | 'desc', string>; first: 'asc' | 'desc' }> = {
  changed: { words: { desc: 'changed, newest', asc: 'changed, oldest' }, first: 'desc' },
  number: { words: { desc: 'number, highest', asc: 'number, lowest' }, first: 'desc' },
  title: { words: { asc: 'title, A to Z', desc: 'title, Z to A' }, first: 'asc' },
  minutes10To80: { words: { asc: '10–80 %, fastest', desc: '10–80 %, slowest' }, first: 'asc' },
  hottestCoreC: { words: { desc: 'core, hottest', asc: 'core, coolest' }, first: 'desc' },
  owner: { words: { asc: 'owner, A to Z', desc: 'owner, Z to A' }, first: 'asc' },
};

export const wholeList: ListView = {
  q: '',
  kind: 'all',
  state: 'any',
  owner: 'any',
  isArchive: false,
  sort: 'changed',
  order: 'desc',
};

/** The view that an address asks for; what it says wrongly is left aside. */
export function viewOf(params: URLSearchParams): ListView {
  const one = <T extends string>(name: string, words: readonly T[]) => words.find((word) => word === params.get(name));
  const sort = one('sort', Object.keys(sorts) as SortBy[]) ?? wholeList.sort;
  return {
    q: (params.get('q') ?? '').slice(0, 200),
    kind: one('kind', studyKinds) ?? 'all',
    state: one('state', studyStates) ?? 'any',
    owner: /^(mine|[0-9a-hjkmnp-tv-z]{26})$/.exec(params.get('owner') ?? '')?.[0] ?? 'any',
    isArchive: params.get('archive') === 'yes',
    sort,
    order: one('order', ['asc', 'desc']) ?? sorts[sort].first,
  };
}

/** The address of a view: only what differs from the whole list. */
export function paramsOf({ q, kind, state, owner, isArchive, sort, order }: ListView): URLSearchParams {
  const params = new URLSearchParams();
  if (q) params.set('q', q);
  if (kind !== 'all') params.set('kind', kind);
  if (state !== 'any') params.set('state', state);
  if (owner !== 'any') params.set('owner', owner);
  if (isArchive) params.set('archive', 'yes');
  if (sort !== wholeList.sort) params.set('sort', sort);
  if (order !== sorts[sort].first) params.set('order', order);
  return params;
}

/** What the server is asked for. @param personId  the reader */
export function queryOf({ q, kind, state, owner, isArchive, sort, order }: ListView, personId: string) {
  return {
    ...(q.trim() ? { q: q.trim() } : {}),
    ...(kind === 'all' ? {} : { kind }),
    ...(state === 'any' ? {} : { state }),
    ...(owner === 'any' ? {} : { ownerId: owner === 'mine' ? personId : owner }),
    archived: isArchive ? 'yes' : 'no',
    sort,
    order,
  } satisfies Partial<StudiesQuery>;
}

/** Whether anything is left out of the list, or of the archive. */
export function isFiltered({ q, kind, state, owner }: ListView): boolean {
  return q.trim() !== '' || kind !== 'all' || state !== 'any' || owner !== 'any';
}

/** The order after a press on a column's head: another column starts with its usual order, the same one turns round. */
export function sortedBy(view: ListView, by: SortBy): Pick<ListView, 'sort' | 'order'> {
  if (by !== view.sort) return { sort: by, order: sorts[by].first };
  return { sort: by, order: view.order === 'asc' ? 'desc' : 'asc' };
}
