import { MutationCache, QueryClient } from '@tanstack/react-query';
import { ApiProblem, isProblem } from './api-problem.ts';
import { meQuery } from '../session/me-query.ts';
import { sessionEnd } from './session-end.ts';

const TRIES = 2;

/** Server data of the page. What the server refuses is not asked again; what did not reach it is. */
export const queryClient: QueryClient = new QueryClient({
  mutationCache: new MutationCache({
    onError: (error) => {
      // The role has changed, or the membership has ended: what is offered must follow.
      if (isProblem(error, 'FORBIDDEN', 'NOT_FOUND'))
        void queryClient.invalidateQueries({ queryKey: meQuery.queryKey });
    },
  }),
  defaultOptions: {
    // Without a connection a call fails and says so, instead of waiting without a word; reads follow when it is back.
    queries: {
      networkMode: 'always',
      refetchOnReconnect: true,
      staleTime: 10_000,
      retry: (failures, error) => !(error instanceof ApiProblem && error.status < 500) && failures < TRIES,
    },
    mutations: { networkMode: 'always', retry: false },
  },
});

// Signed in again, here or in another tab: what failed meanwhile is asked anew.
sessionEnd.subscribe(() => {
  if (sessionEnd.get()) return;
  void queryClient.invalidateQueries({ predicate: ({ queryKey }) => queryKey[0] !== meQuery.queryKey[0] });
});
