import { queryOptions, useQuery } from '@tanstack/react-query';
import type { LibraryItem, LibraryKind } from '../../../../../server/src/contract/library.ts';
import { libraryEndpoints } from '../../../../../server/src/contract/library.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { libraryKey } from '../../../lib/api/library-key.ts';

const PAGE = 200;

const wholeLibraryQuery = (workspaceId: string, kind?: LibraryKind) =>
  queryOptions({
    queryKey: [...libraryKey(workspaceId), 'whole', kind ?? 'all'],
    queryFn: async ({ signal }) => {
      const items: LibraryItem[] = [];
      let cursor: string | null = null;
      do {
        const query = { limit: PAGE, ...(kind ? { kind } : {}), ...(cursor ? { cursor } : {}) };
        const page: { items: LibraryItem[]; nextCursor: string | null } = await callApi(libraryEndpoints.listLibrary, {
          params: { workspaceId },
          query,
          signal,
        });
        items.push(...page.items);
        cursor = page.nextCursor;
      } while (cursor);
      return items;
    },
  });

/** Every part outside the archive, or every one of a kind, by name. */
export function useWholeLibrary(
  workspaceId: string,
  { kind, enabled = true }: { kind?: LibraryKind; enabled?: boolean } = {},
) {
  return useQuery({ ...wholeLibraryQuery(workspaceId, kind), enabled });
}
