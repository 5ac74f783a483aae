import type { QueryClient } from '@tanstack/react-query';

/** Everything of a workspace's library. */
export const libraryKey = (workspaceId: string) => ['workspace', workspaceId, 'library'] as const;

/** One item, whatever is known of it. */
export const itemKey = (workspaceId: string, itemId: string) => [...libraryKey(workspaceId), 'item', itemId] as const;

/** Has everything of the library asked for anew, after a change of it. */
export function refreshLibrary(client: QueryClient, workspaceId: string): Promise<void> {
  return client.invalidateQueries({ queryKey: libraryKey(workspaceId) });
}
