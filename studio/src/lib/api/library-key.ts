/** Everything that the page keeps of a workspace's library, wherever it is shown. */
export const libraryKey = (workspaceId: string) => ['library', workspaceId] as const;
