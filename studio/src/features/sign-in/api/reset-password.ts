import { useMutation } from '@tanstack/react-query';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import type { SentBodyOf } from '../../../../../server/src/contract/endpoint.ts';
import { callApi } from '../../../lib/api/call-api.ts';

/** Sets a new password by the mailed link. */
export function useResetPassword() {
  return useMutation({
    mutationFn: (body: SentBodyOf<typeof accountEndpoints.resetPassword>) =>
      callApi(accountEndpoints.resetPassword, { body }),
  });
}
