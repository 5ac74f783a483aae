import type { UseQueryResult } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { problemSentence } from '../lib/api/api-problem.ts';
import { Notice } from './notice.tsx';

type Props<T> = {
  query: Pick<UseQueryResult<T>, 'data' | 'error' | 'isFetching' | 'refetch'>;
  /** Said while nothing is here yet, such as "Reading the members". */
  loading?: string;
  /** Takes the room of what is on the way, so that nothing jumps when it comes. */
  skeleton?: ReactNode;
  /** Whether what came holds nothing to show. */
  isEmpty?: (data: T) => boolean;
  /** Shown in place of nothing: what to do next. */
  empty?: ReactNode;
  children: (data: T) => ReactNode;
};

/** Server data in each of its states: on the way, failed with a way to try again, empty, here. */
export function AsyncView<T>({ query, loading = 'Reading', skeleton, isEmpty, empty, children }: Props<T>) {
  const { data, error, isFetching, refetch } = query;
  const again = (
    <button className="lnk" disabled={isFetching} onClick={() => void refetch()}>
      {isFetching ? 'Trying again' : 'Try again'}
    </button>
  );
  const failed = error && (
    <Notice kind="stop" action={again}>
      {data === undefined ? problemSentence(error) : `Not up to date. ${problemSentence(error)}`}
    </Notice>
  );
  if (data === undefined) {
    return (
      failed || (
        <>
          <p className={skeleton ? 'unseen' : 'awaited'} role="status">
            {loading}
          </p>
          {skeleton}
        </>
      )
    );
  }
  return (
    <>
      {failed}
      {isEmpty?.(data) ? empty : children(data)}
    </>
  );
}
