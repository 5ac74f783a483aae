import { useQuery } from '@tanstack/react-query';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import { callApi } from '../../../lib/api/call-api.ts';

export const devicesKey = ['devices'];

/** Devices that are signed in, last used first. */
export function useDevices() {
  return useQuery({
    queryKey: devicesKey,
    queryFn: ({ signal }) => callApi(accountEndpoints.listDevices, { signal }),
  });
}
