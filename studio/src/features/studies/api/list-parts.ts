import { useQuery } from '@tanstack/react-query';
import { libraryEndpoints, type LibraryItem } from '../../../../../server/src/contract/library.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { libraryKey } from '../../../lib/api/library-key.ts';

const LONGEST_PAGE = 200;

/** Every part of the library outside the archive, by name. */
export function useParts(workspaceId: string) {
  return useQuery({
    queryKey: [...libraryKey(workspaceId), 'all-parts'],
    queryFn: ({ signal }) => allParts(workspaceId, signal),
  });
}

async function allParts(workspaceId: string, signal: AbortSignal): Promise<LibraryItem[]> {
  const parts: LibraryItem[] = [];
  let cursor: string | undefined;
  do {
    const page = await callApi(libraryEndpoints.listLibrary, {
      params: { workspaceId },
      query: { limit: LONGEST_PAGE, ...(cursor ? { cursor } : {}) },
      signal,
    });
    parts.push(...page.items);
    cursor = page.nextCursor ?? undefined;
  } while (cursor);
  return parts;
}
