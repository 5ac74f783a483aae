import { useMutation, useQueryClient } from '@tanstack/react-query';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { devicesKey } from './list-devices.ts';

/** Signs one other device out. */
export function useSignOutDevice() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (deviceId: string) => callApi(accountEndpoints.signOutDevice, { params: { deviceId } }),
    onSettled: () => client.invalidateQueries({ queryKey: devicesKey }),
  });
}
