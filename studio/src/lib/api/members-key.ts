/** Members of a workspace, wherever they are listed. */
export const membersKey = (workspaceId: string) => ['w', workspaceId, 'members'] as const;
