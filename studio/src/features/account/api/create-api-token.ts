import { useMutation, useQueryClient } from '@tanstack/react-query';
import { apiTokenEndpoints } from '../../../../../server/src/contract/api-token.ts';
import type { SentBodyOf } from '../../../../../server/src/contract/endpoint.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { apiTokensKey } from './list-api-tokens.ts';

/** Makes a token; the answer holds its secret, which cannot be had again. */
export function useCreateApiToken(workspaceId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: SentBodyOf<typeof apiTokenEndpoints.createApiToken>) =>
      callApi(apiTokenEndpoints.createApiToken, { params: { workspaceId }, body }),
    onSuccess: () => client.invalidateQueries({ queryKey: apiTokensKey(workspaceId) }),
    // The secret is not kept in memory for longer than it is shown.
    gcTime: 0,
  });
}
