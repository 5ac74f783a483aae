import { useQuery } from '@tanstack/react-query';
import { libraryEndpoints } from '../../../../../server/src/contract/library.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { itemKey } from './library-keys.ts';

/** One revision of a part, whole; it never changes. */
export function useLibraryRevision(workspaceId: string, itemId: string, revision: number) {
  return useQuery({
    queryKey: [...itemKey(workspaceId, itemId), 'revision', revision],
    queryFn: ({ signal }) =>
      callApi(libraryEndpoints.readLibraryRevision, { params: { workspaceId, itemId, revision }, signal }),
    staleTime: Infinity,
  });
}
