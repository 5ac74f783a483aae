import { useMutation, useQueryClient } from '@tanstack/react-query';
import { workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { invitationsKey } from './list-invitations.ts';

/** Mails a new link; the one before works no more. */
export function useResendInvitation(workspaceId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (invitationId: string) =>
      callApi(workspaceEndpoints.resendInvitation, { params: { workspaceId, invitationId } }),
    onSettled: () => client.invalidateQueries({ queryKey: invitationsKey(workspaceId) }),
  });
}
