import type { QueryClient } from '@tanstack/react-query';
import { libraryKey } from '../../../lib/api/library-key.ts';

/** One item, whatever is known of it. */
export const itemKey = (workspaceId: string, itemId: string) => [...libraryKey(workspaceId), 'item', itemId] as const;

/** Has everything of the library asked for anew, after a change of it. */
export function refreshLibrary(client: QueryClient, workspaceId: string): Promise<void> {
  return client.invalidateQueries({ queryKey: libraryKey(workspaceId) });
}
