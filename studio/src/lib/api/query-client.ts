import { QueryClient } from '@tanstack/react-query';
import { ApiProblem } from './api-problem.ts';

const TRIES = 2;

/** Server data of the page. What the server refuses is not asked again; what did not reach it is. */
export const queryClient = new QueryClient({
  defaultOptions: {
    queries: {
      staleTime: 10_000,
      retry: (failures, error) => !(error instanceof ApiProblem && error.status < 500) && failures < TRIES,
    },
    mutations: { retry: false },
  },
});
