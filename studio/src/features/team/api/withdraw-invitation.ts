import { useMutation, useQueryClient } from '@tanstack/react-query';
import { workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { invitationsKey } from './list-invitations.ts';

export function useWithdrawInvitation(workspaceId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (invitationId: string) =>
      callApi(workspaceEndpoints.withdrawInvitation, { params: { workspaceId, invitationId } }),
    onSettled: () => client.invalidateQueries({ queryKey: invitationsKey(workspaceId) }),
  });
}
