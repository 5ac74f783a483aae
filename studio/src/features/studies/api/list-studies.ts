import { infiniteQueryOptions, keepPreviousData, useInfiniteQuery } from '@tanstack/react-query';
import type { AnswerOf } from '../../../../../server/src/contract/endpoint.ts';
import { studyEndpoints } from '../../../../../server/src/contract/study.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import type { StudiesQuery } from '../model/list-view.ts';
import { studiesKey } from './studies-key.ts';

export type StudyPage = AnswerOf<typeof studyEndpoints.listStudies>;

export const listKey = (workspaceId: string) => [...studiesKey(workspaceId), 'list'] as const;

/** What one list was asked for, as it stands at the end of its key. */
export type ListQuery = Partial<StudiesQuery>;

function studiesQuery(workspaceId: string, query: ListQuery) {
  return infiniteQueryOptions({
    queryKey: [...listKey(workspaceId), query],
    queryFn: ({ pageParam, signal }) =>
      callApi(studyEndpoints.listStudies, {
        params: { workspaceId },
        query: { ...query, ...(pageParam === null ? {} : { cursor: pageParam }) },
        signal,
      }),
    initialPageParam: null as string | null,
    getNextPageParam: (page: StudyPage) => page.nextCursor,
    placeholderData: keepPreviousData,
    // The desk changes rows: whoever comes back from it sees them as they are.
    staleTime: 0,
  });
}

/** Studies in pages; what was asked for before stays until the answer is here. */
export function useStudies(workspaceId: string, query: ListQuery) {
  return useInfiniteQuery(studiesQuery(workspaceId, query));
}
