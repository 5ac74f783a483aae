import { useMutation, useQueryClient } from '@tanstack/react-query';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import type { SentBodyOf } from '../../../../../server/src/contract/endpoint.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { setMe } from '../../../lib/session/me-query.ts';

/** Makes an account for the e-mail that was invited, joins, and signs in. */
export function useSignUpInvited() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: SentBodyOf<typeof accountEndpoints.signUpInvited>) =>
      callApi(accountEndpoints.signUpInvited, { body }),
    onSuccess: (me) => setMe(client, me),
  });
}
