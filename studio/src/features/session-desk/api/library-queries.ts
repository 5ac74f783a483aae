import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { libraryEndpoints, type LibraryKind } from '../../../../../server/src/contract/library.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { libraryKey } from '../../../lib/api/library-key.ts';

const MOST_SHOWN = 50;

/** One revision of a part of the library. It never changes. */
export function libraryRevisionQuery(workspaceId: string, itemId: string, revision: number) {
  return queryOptions({
    queryKey: [...libraryKey(workspaceId), 'desk', itemId, revision],
    queryFn: ({ signal }) =>
      callApi(libraryEndpoints.readLibraryRevision, { params: { workspaceId, itemId, revision }, signal }),
    staleTime: Infinity,
  });
}

/** Parts of a kind whose names, notes or sources have words that begin so. */
export function libraryFindQuery(workspaceId: string, kind: LibraryKind, words: string) {
  return queryOptions({
    queryKey: [...libraryKey(workspaceId), 'desk', 'find', kind, words],
    queryFn: ({ signal }) =>
      callApi(libraryEndpoints.listLibrary, {
        params: { workspaceId },
        query: { kind, limit: MOST_SHOWN, ...(words === '' ? {} : { q: words }) },
        signal,
      }),
    placeholderData: keepPreviousData,
  });
}
