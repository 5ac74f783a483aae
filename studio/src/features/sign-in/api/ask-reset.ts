import { useMutation } from '@tanstack/react-query';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import type { SentBodyOf } from '../../../../../server/src/contract/endpoint.ts';
import { callApi } from '../../../lib/api/call-api.ts';

/** Asks for a link by mail that sets a new password. */
export function useAskReset() {
  return useMutation({
    mutationFn: (body: SentBodyOf<typeof accountEndpoints.askReset>) => callApi(accountEndpoints.askReset, { body }),
  });
}
