import { useMutation, useQueryClient } from '@tanstack/react-query';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { devicesKey } from './list-devices.ts';

/** Changes the password; every other device is signed out. */
export function useChangePassword() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: { presentPassword: string; newPassword: string }) =>
      callApi(accountEndpoints.changePassword, { body }),
    onSuccess: () => client.invalidateQueries({ queryKey: devicesKey }),
  });
}
