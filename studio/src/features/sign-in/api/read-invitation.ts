import { useQuery } from '@tanstack/react-query';
import { workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { callApi } from '../../../lib/api/call-api.ts';

/** What an invitation leads to. */
export function useInvitation(token: string) {
  return useQuery({
    queryKey: ['invitation', token],
    queryFn: ({ signal }) => callApi(workspaceEndpoints.readInvitation, { body: { token }, signal }),
    // It may be used up at any moment, but nobody loses anything by finding that out on joining.
    staleTime: Infinity,
  });
}
