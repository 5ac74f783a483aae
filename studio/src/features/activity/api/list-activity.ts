import { useInfiniteQuery } from '@tanstack/react-query';
import { workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { callApi } from '../../../lib/api/call-api.ts';

/** Who did what in a workspace, newest first, a page at a time. */
export function useActivity(workspaceId: string) {
  return useInfiniteQuery({
    queryKey: ['w', workspaceId, 'activity'],
    queryFn: ({ pageParam, signal }) =>
      callApi(workspaceEndpoints.listActivity, {
        params: { workspaceId },
        query: pageParam === null ? {} : { cursor: pageParam },
        signal,
      }),
    // Every deed in the workspace adds to it.
    staleTime: 0,
    initialPageParam: null as string | null,
    getNextPageParam: ({ nextCursor }) => nextCursor,
  });
}
