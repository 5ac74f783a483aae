import { useMutation, useQueryClient } from '@tanstack/react-query';
import { workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { meQuery } from '../../../lib/session/me-query.ts';

export function useRenameWorkspace(workspaceId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: { name: string }) =>
      callApi(workspaceEndpoints.renameWorkspace, { params: { workspaceId }, body }),
    onSuccess: () => client.refetchQueries({ queryKey: meQuery.queryKey }),
  });
}
