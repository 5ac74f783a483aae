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
  if (before && before.person.id !== me.person.id) forgetTheRest(client);
  take(client, me);
  sessionEnd.resume();
}

/** Nobody is signed in any more, by their own doing; nothing of theirs stays in the page's memory. */
export function setSignedOut(client: QueryClient): void {
  forgetCsrfToken();
  take(client, null);
  forgetTheRest(client);
  sessionEnd.resume();
}

/** The query of who is signed in stays: the head of the page watches it. */
function forgetTheRest(client: QueryClient): void {
  client.removeQueries({ predicate: ({ queryKey }) => queryKey[0] !== meQuery.queryKey[0] });
}

/** An answer still on its way is older than this. */
function take(client: QueryClient, me: Me | null): void {
  void client.cancelQueries({ queryKey: meQuery.queryKey });
  client.setQueryData(meQuery.queryKey, me);
}
