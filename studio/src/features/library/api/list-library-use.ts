import { useInfiniteQuery } from '@tanstack/react-query';
import { libraryEndpoints } from '../../../../../server/src/contract/library.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { itemKey } from './library-keys.ts';

const PAGE = 20;

/** Studies whose working copy uses a part, page by page. */
export function useLibraryUse(workspaceId: string, itemId: string) {
  return useInfiniteQuery({
    queryKey: [...itemKey(workspaceId, itemId), 'studies'],
    queryFn: ({ signal, pageParam }) =>
      callApi(libraryEndpoints.listLibraryUse, {
        params: { workspaceId, itemId },
        query: { limit: PAGE, ...(pageParam ? { cursor: pageParam } : {}) },
        signal,
      }),
    initialPageParam: null as string | null,
    getNextPageParam: (last) => last.nextCursor,
  });
}
