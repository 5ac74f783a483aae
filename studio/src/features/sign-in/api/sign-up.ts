import { useMutation, useQueryClient } from '@tanstack/react-query';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import type { SentBodyOf } from '../../../../../server/src/contract/endpoint.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { setMe } from '../../../lib/session/me-query.ts';

/** Makes an account and its first workspace, and signs in. */
export function useSignUp() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: SentBodyOf<typeof accountEndpoints.signUp>) => callApi(accountEndpoints.signUp, { body }),
    onSuccess: (me) => setMe(client, me),
  });
}
