import { keepPreviousData, useInfiniteQuery } from '@tanstack/react-query';
import type { QueryOf } from '../../../../../server/src/contract/endpoint.ts';
import { libraryEndpoints } from '../../../../../server/src/contract/library.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { libraryKey } from '../../../lib/api/library-key.ts';

export type LibraryQuery = Partial<Omit<QueryOf<typeof libraryEndpoints.listLibrary>, 'cursor' | 'limit'>>;

const PAGE = 50;

/** Parts of the library, page by page; those on screen stay until what was asked for anew is here. */
export function useLibraryList(workspaceId: string, query: LibraryQuery) {
  return useInfiniteQuery({
    queryKey: [...libraryKey(workspaceId), 'list', query],
    queryFn: ({ signal, pageParam }) =>
      callApi(libraryEndpoints.listLibrary, {
        params: { workspaceId },
        query: { ...query, limit: PAGE, ...(pageParam ? { cursor: pageParam } : {}) },
        signal,
      }),
    initialPageParam: null as string | null,
    getNextPageParam: (last) => last.nextCursor,
    placeholderData: keepPreviousData,
    // Studies that take or let go of a part change how many use it.
    staleTime: 0,
  });
}
