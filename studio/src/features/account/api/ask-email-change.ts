import { useMutation } from '@tanstack/react-query';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import { callApi } from '../../../lib/api/call-api.ts';

/** Has a link mailed to the new e-mail; nothing changes before it is followed. */
export function useAskEmailChange() {
  return useMutation({
    mutationFn: (body: { newEmail: string; password: string }) => callApi(accountEndpoints.askEmailChange, { body }),
  });
}
