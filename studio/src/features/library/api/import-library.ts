import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { SentBodyOf } from '../../../../../server/src/contract/endpoint.ts';
import { libraryEndpoints } from '../../../../../server/src/contract/library.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { refreshLibrary } from './library-keys.ts';

type Wish = { body: SentBodyOf<typeof libraryEndpoints.importLibrary>; idempotencyKey: string };

/** Takes the parts of a file in: all of them or, where one is wrong, none. */
export function useImportLibrary(workspaceId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (wish: Wish) => callApi(libraryEndpoints.importLibrary, { params: { workspaceId }, ...wish }),
    onSuccess: () => refreshLibrary(client, workspaceId),
  });
}
