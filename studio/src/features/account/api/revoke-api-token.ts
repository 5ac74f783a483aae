import { useMutation, useQueryClient } from '@tanstack/react-query';
import { apiTokenEndpoints } from '../../../../../server/src/contract/api-token.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { apiTokensKey } from './list-api-tokens.ts';

/** Revokes a token; scripts that use it are refused from then on. */
export function useRevokeApiToken(workspaceId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (tokenId: string) => callApi(apiTokenEndpoints.revokeApiToken, { params: { workspaceId, tokenId } }),
    onSettled: () => client.invalidateQueries({ queryKey: apiTokensKey(workspaceId) }),
  });
}
