import { useMutation } from '@tanstack/react-query';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import { callApi } from '../../../lib/api/call-api.ts';

/** Signs every device out, this one too. */
export function useSignOutEverywhere() {
  return useMutation({ mutationFn: () => callApi(accountEndpoints.signOutEverywhere) });
}
