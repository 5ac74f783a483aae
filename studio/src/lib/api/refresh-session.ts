import { csrfToken } from './csrf-token.ts';
import { ApiProblem, isProblem, Unreachable } from './api-problem.ts';
import type { Problem } from '../../../../server/src/contract/problem.ts';

const LOCK = 'voltiplano-refresh';

/**
 * Asks again once the session is fresh. Refresh tokens are spent once, so tabs take turns: who comes second asks first,
 * and finds that the other tab has refreshed for both.
 *
 * @param ask  the call that found its access token expired
 */
export function refreshSession<T>(ask: () => Promise<T>): Promise<T> {
  return navigator.locks.request(LOCK, async () => {
    try {
      return await ask();
    } catch (error) {
      if (!isProblem(error, 'ACCESS_EXPIRED')) throw error;
    }
    await refresh();
    return ask();
  });
}

async function refresh(): Promise<void> {
  const csrf = csrfToken();
  let response: Response;
  try {
    response = await fetch('/api/v1/auth/refresh', {
      method: 'POST',
      credentials: 'same-origin',
      headers: csrf ? { 'X-CSRF-Token': csrf } : {},
    });
  } catch (cause) {
    throw new Unreachable('No answer', { cause });
  }
  if (response.ok) return;
  const isJson = response.headers.get('content-type')?.includes('json') === true;
  if (!isJson) throw new Unreachable(`An answer that is not the server’s (${response.status})`);
  throw new ApiProblem((await response.json()) as Problem);
}
