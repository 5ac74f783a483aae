import { useQuery } from '@tanstack/react-query';
import { workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { callApi } from '../../../lib/api/call-api.ts';

export const invitationsKey = (workspaceId: string) => ['w', workspaceId, 'invitations'];

/** Open invitations, newest first; for owners. */
export function useInvitations(workspaceId: string) {
  return useQuery({
    queryKey: invitationsKey(workspaceId),
    queryFn: ({ signal }) => callApi(workspaceEndpoints.listInvitations, { params: { workspaceId }, signal }),
  });
}
