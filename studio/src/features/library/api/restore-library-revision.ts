import { useMutation, useQueryClient } from '@tanstack/react-query';
import { libraryEndpoints } from '../../../../../server/src/contract/library.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { refreshLibrary } from './library-keys.ts';
import { itemQuery } from './read-library-item.ts';

type Wish = { revision: number; madeFrom: number; idempotencyKey: string };

/** Saves a new revision that says what an older one said. */
export function useRestoreLibraryRevision(workspaceId: string, itemId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ revision, madeFrom, idempotencyKey }: Wish) =>
      callApi(libraryEndpoints.restoreLibraryRevision, {
        params: { workspaceId, itemId, revision },
        ifMatch: `"r${madeFrom}"`,
        idempotencyKey,
      }),
    onSuccess: (item) => {
      client.setQueryData(itemQuery(workspaceId, itemId).queryKey, item);
      return refreshLibrary(client, workspaceId);
    },
  });
}
