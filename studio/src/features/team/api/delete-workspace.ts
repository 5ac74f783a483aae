import { useMutation } from '@tanstack/react-query';
import { workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { callApi } from '../../../lib/api/call-api.ts';

/** Deletes a workspace and all that is in it; its name must be repeated. */
export function useDeleteWorkspace(workspaceId: string) {
  return useMutation({
    mutationFn: (body: { name: string }) =>
      callApi(workspaceEndpoints.deleteWorkspace, { params: { workspaceId }, body }),
  });
}
