import { accountEndpoints } from '../../../../server/src/contract/account.ts';
import { callApi } from '../api/call-api.ts';

/** Signs this device out. */
export function signOutHere(): Promise<void> {
  return callApi(accountEndpoints.signOut);
}
