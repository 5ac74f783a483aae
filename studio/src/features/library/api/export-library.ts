import type { QueryOf } from '../../../../../server/src/contract/endpoint.ts';
import { libraryEndpoints } from '../../../../../server/src/contract/library.ts';
import { callApi } from '../../../lib/api/call-api.ts';

/** Parts as a file: all outside the archive, those of a kind, or one. */
export function readLibraryFile(workspaceId: string, query: QueryOf<typeof libraryEndpoints.exportLibrary>) {
  return callApi(libraryEndpoints.exportLibrary, { params: { workspaceId }, query });
}
