import { useMutation, useQueryClient } from '@tanstack/react-query';
import { workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { meQuery } from '../../../lib/session/me-query.ts';

/** Makes a workspace, whose owner the signed-in person becomes. */
export function useCreateWorkspace() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: { name: string }) => callApi(workspaceEndpoints.createWorkspace, { body }),
    onSuccess: () => client.refetchQueries({ queryKey: meQuery.queryKey }),
  });
}
