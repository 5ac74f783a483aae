import { useQuery } from '@tanstack/react-query';
import { apiTokenEndpoints } from '../../../../../server/src/contract/api-token.ts';
import { callApi } from '../../../lib/api/call-api.ts';

export const apiTokensKey = (workspaceId: string) => ['w', workspaceId, 'api-tokens'];

/** Own tokens of a workspace; an owner's list has those of every member. */
export function useApiTokens(workspaceId: string) {
  return useQuery({
    queryKey: apiTokensKey(workspaceId),
    queryFn: ({ signal }) => callApi(apiTokenEndpoints.listApiTokens, { params: { workspaceId }, signal }),
  });
}
