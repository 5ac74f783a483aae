import { queryOptions, type QueryClient } from '@tanstack/react-query';
import type { Me } from '../../../../server/src/contract/account.ts';
import { csrfToken, forgetCsrfToken } from '../api/csrf-token.ts';
import { sessionEnd } from '../api/session-end.ts';

/** Who is signed in: null where nobody is. A guest's page asks nothing and loads nothing for it. */
export const meQuery = queryOptions({
  queryKey: ['me'],
  queryFn: async ({ signal, client }): Promise<Me | null> => {
    const known = client.getQueryData<Me | null>(['me']) ?? null;
    if (!known && csrfToken() === undefined) return null;
    const { readMe } = await import('./read-me.ts');
    const me = await readMe(signal);
    if (known && me?.person.id !== known.person.id) {
      // Whoever was known stays so, for what they typed: the page offers to sign in again over it.
      sessionEnd.tell();
      return known;
    }
    if (!me) forgetCsrfToken();
    sessionEnd.resume();
    return me;
  },
});

/** Takes a person as signed in, with nothing left of the one before. */
export function setMe(client: QueryClient, me: Me): void {
  const before = client.getQueryData<Me | null>(meQuery.queryKey);
  if (before && before.person.id !== me.person.id) client.clear();
  client.setQueryData(meQuery.queryKey, me);
  sessionEnd.resume();
}
