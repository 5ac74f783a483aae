import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { SentBodyOf } from '../../../../../server/src/contract/endpoint.ts';
import { libraryEndpoints } from '../../../../../server/src/contract/library.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { refreshLibrary } from './library-keys.ts';
import { itemQuery } from './read-library-item.ts';

type Wish = {
  body: SentBodyOf<typeof libraryEndpoints.reviseLibraryItem>;
  /** The revision that was changed. */
  madeFrom: number;
  idempotencyKey: string;
};

/** Saves a new revision of a part. */
export function useReviseLibraryItem(workspaceId: string, itemId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ body, madeFrom, idempotencyKey }: Wish) =>
      callApi(libraryEndpoints.reviseLibraryItem, {
        params: { workspaceId, itemId },
        body,
        ifMatch: `"r${madeFrom}"`,
        idempotencyKey,
      }),
    onSuccess: (item) => {
      client.setQueryData(itemQuery(workspaceId, itemId).queryKey, item);
      return refreshLibrary(client, workspaceId);
    },
  });
}
