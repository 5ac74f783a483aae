import { useMutation, useQueryClient } from '@tanstack/react-query';
import { libraryEndpoints } from '../../../../../server/src/contract/library.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { refreshLibrary } from './library-keys.ts';
import { itemQuery } from './read-library-item.ts';

/** Puts a part into the archive, or takes it out. */
export function useArchiveLibraryItem(workspaceId: string, itemId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (into: boolean) => {
      const params = { workspaceId, itemId };
      return into
        ? callApi(libraryEndpoints.archiveLibraryItem, { params })
        : callApi(libraryEndpoints.unarchiveLibraryItem, { params });
    },
    onSuccess: (item) => {
      client.setQueryData(itemQuery(workspaceId, itemId).queryKey, item);
      return refreshLibrary(client, workspaceId);
    },
  });
}
