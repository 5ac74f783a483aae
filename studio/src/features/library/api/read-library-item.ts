import { queryOptions, useQuery } from '@tanstack/react-query';
import { libraryEndpoints } from '../../../../../server/src/contract/library.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { itemKey } from './library-keys.ts';

export const itemQuery = (workspaceId: string, itemId: string) =>
  queryOptions({
    queryKey: [...itemKey(workspaceId, itemId), 'newest'],
    queryFn: ({ signal }) => callApi(libraryEndpoints.readLibraryItem, { params: { workspaceId, itemId }, signal }),
  });

/** A part as its newest revision has it. */
export function useLibraryItem(workspaceId: string, itemId: string) {
  return useQuery(itemQuery(workspaceId, itemId));
}
