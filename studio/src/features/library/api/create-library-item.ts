import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { SentBodyOf } from '../../../../../server/src/contract/endpoint.ts';
import { libraryEndpoints } from '../../../../../server/src/contract/library.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { refreshLibrary } from './library-keys.ts';

type Wish = { body: SentBodyOf<typeof libraryEndpoints.createLibraryItem>; idempotencyKey: string };

/** Adds a part. */
export function useCreateLibraryItem(workspaceId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (wish: Wish) => callApi(libraryEndpoints.createLibraryItem, { params: { workspaceId }, ...wish }),
    onSuccess: () => refreshLibrary(client, workspaceId),
  });
}
