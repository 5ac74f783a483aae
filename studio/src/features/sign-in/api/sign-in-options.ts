import { useQuery } from '@tanstack/react-query';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import { callApi } from '../../../lib/api/call-api.ts';

/** Ways to sign in that the server offers. */
export function useSignInOptions() {
  return useQuery({
    queryKey: ['sign-in-options'],
    queryFn: ({ signal }) => callApi(accountEndpoints.signInOptions, { signal }),
    staleTime: Infinity,
  });
}
