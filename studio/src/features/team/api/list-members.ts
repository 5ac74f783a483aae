import { useQuery } from '@tanstack/react-query';
import { workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { membersKey } from '../../../lib/api/members-key.ts';

/** Members by name. */
export function useMembers(workspaceId: string) {
  return useQuery({
    queryKey: membersKey(workspaceId),
    queryFn: ({ signal }) => callApi(workspaceEndpoints.listMembers, { params: { workspaceId }, signal }),
  });
}
