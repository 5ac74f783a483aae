import { useQuery } from '@tanstack/react-query';
import { meQuery } from './me-query.ts';

/** The query of who is signed in: `data` is null where nobody is, undefined while that is not known. */
export function useMe() {
  return useQuery(meQuery);
}
