import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { SentBodyOf } from '../../../../../server/src/contract/endpoint.ts';
import { workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { invitationsKey } from './list-invitations.ts';

/** Invites a person by mail. */
export function useInvite(workspaceId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: SentBodyOf<typeof workspaceEndpoints.invite>) =>
      callApi(workspaceEndpoints.invite, { params: { workspaceId }, body }),
    onSuccess: () => client.invalidateQueries({ queryKey: invitationsKey(workspaceId) }),
  });
}
