import { useMutation, useQueryClient } from '@tanstack/react-query';
import { workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { meQuery } from '../../../lib/session/me-query.ts';

/** Joins as the signed-in person, who has the workspace from then on. */
export function useAcceptInvitation() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (token: string) => callApi(workspaceEndpoints.acceptInvitation, { body: { token } }),
    onSuccess: () => client.refetchQueries({ queryKey: meQuery.queryKey }),
  });
}
