import { useMutation, useQueryClient } from '@tanstack/react-query';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import type { SentBodyOf } from '../../../../../server/src/contract/endpoint.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { setMe } from '../../../lib/session/me-query.ts';

/** Signs in with e-mail and password. */
export function useSignIn() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: SentBodyOf<typeof accountEndpoints.signIn>) => callApi(accountEndpoints.signIn, { body }),
    onSuccess: (me) => setMe(client, me),
  });
}
