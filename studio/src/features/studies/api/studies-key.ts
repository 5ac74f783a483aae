/** Prefix of everything that the page keeps of a workspace's studies. */
export const studiesKey = (workspaceId: string) => ['studies', workspaceId] as const;
