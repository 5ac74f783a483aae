import { useMutation } from '@tanstack/react-query';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import type { SentBodyOf } from '../../../../../server/src/contract/endpoint.ts';
import { callApi } from '../../../lib/api/call-api.ts';

/** Takes a new e-mail by the link mailed to it. */
export function useConfirmEmail() {
  return useMutation({
    mutationFn: (body: SentBodyOf<typeof accountEndpoints.confirmEmail>) =>
      callApi(accountEndpoints.confirmEmail, { body }),
  });
}
