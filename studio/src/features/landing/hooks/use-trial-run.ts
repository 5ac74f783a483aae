import type { SessionResult } from '@voltiplano/engine';
import { useEffect, useState } from 'react';
import { sessionClient } from '../../../lib/session-client.ts';
import { trialStudy, type Trial } from '../model/trial-study.ts';

type TrialRun = { result: SessionResult | null; error: Error | null };

/** Runs the trial whenever a ruler has moved; the last good result stays until the next is here. */
export function useTrialRun(trial: Trial): TrialRun {
  const [run, setRun] = useState<TrialRun>({ result: null, error: null });
  // Speaks to the worker.
  useEffect(() => {
    let wanted = true;
    sessionClient()
      .latest(trialStudy(trial))
      .then(
        ({ result }) => wanted && setRun({ result, error: null }),
        (error: Error) => wanted && error.name !== 'Cancelled' && setRun((last) => ({ ...last, error })),
      );
    return () => {
      wanted = false;
    };
  }, [trial]);
  return run;
}
