import { useMutation } from '@tanstack/react-query';
import { workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { callApi } from '../../../lib/api/call-api.ts';

export function useLeaveWorkspace(workspaceId: string) {
  return useMutation({
    mutationFn: () => callApi(workspaceEndpoints.leaveWorkspace, { params: { workspaceId } }),
  });
}
