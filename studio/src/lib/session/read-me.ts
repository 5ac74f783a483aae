import { accountEndpoints, type Me } from '../../../../server/src/contract/account.ts';
import { callApi, isSignedOut } from '../api/call-api.ts';

/** Asks who is signed in; null where nobody is. */
export async function readMe(signal: AbortSignal): Promise<Me | null> {
  try {
    return await callApi(accountEndpoints.readMe, { signal });
  } catch (error) {
    if (isSignedOut(error)) return null;
    throw error;
  }
}
