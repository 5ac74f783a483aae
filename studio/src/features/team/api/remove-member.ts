import { useMutation, useQueryClient } from '@tanstack/react-query';
import { workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { membersKey } from '../../../lib/api/members-key.ts';

export function useRemoveMember(workspaceId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (personId: string) => callApi(workspaceEndpoints.removeMember, { params: { workspaceId, personId } }),
    onSettled: () => client.invalidateQueries({ queryKey: membersKey(workspaceId) }),
  });
}
