import type { SessionResult, SessionStudyInput } from '@voltiplano/engine';
import { useEffect, useState } from 'react';
import { sessionClient } from '../../../lib/session-client.ts';

/**
 * Results of a few fixed studies, each as soon as it is here; null before, and where a run failed.
 *
 * @param studies  the same array on every render
 */
export function useRuns(studies: readonly SessionStudyInput[]): (SessionResult | null)[] {
  const [results, setResults] = useState<(SessionResult | null)[]>(() => studies.map(() => null));
  // Speaks to the worker.
  useEffect(() => {
    const keep = (index: number, result: SessionResult) =>
      setResults((last) => last.map((one, i) => (i === index ? result : one)));
    const tickets = studies.map((study) => sessionClient().run(study));
    tickets.forEach(
      (ticket, i) =>
        void ticket.result.then(
          (answer) => keep(i, answer.result),
          () => undefined,
        ),
    );
    return () => tickets.forEach((ticket) => ticket.cancel());
  }, [studies]);
  return results;
}
