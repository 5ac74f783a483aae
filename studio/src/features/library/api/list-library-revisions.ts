import { useInfiniteQuery } from '@tanstack/react-query';
import { libraryEndpoints } from '../../../../../server/src/contract/library.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { itemKey } from './library-keys.ts';

const PAGE = 30;

/** Revisions of a part, newest first, page by page. */
export function useLibraryRevisions(workspaceId: string, itemId: string) {
  return useInfiniteQuery({
    queryKey: [...itemKey(workspaceId, itemId), 'revisions'],
    queryFn: ({ signal, pageParam }) =>
      callApi(libraryEndpoints.listLibraryRevisions, {
        params: { workspaceId, itemId },
        query: { limit: PAGE, ...(pageParam ? { cursor: pageParam } : {}) },
        signal,
      }),
    initialPageParam: null as string | null,
    getNextPageParam: (last) => last.nextCursor,
  });
}
