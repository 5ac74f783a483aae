import type { SessionStudyInput } from '@voltiplano/engine';
import type { SessionAnswer } from '@voltiplano/engine/worker';
import { createContext, useContext, useSyncExternalStore } from 'react';
import type { DeskRun, DeskRuns } from '../model/desk-runs.ts';

export const RunContext = createContext<DeskRuns | null>(null);

export function useRuns(): DeskRuns {
  const runs = useContext(RunContext);
  if (!runs) throw new Error('Used outside a session desk');
  return runs;
}

/**
 * A part of the results on the desk; the component is drawn again only when that part changes.
 *
 * @param select  must give the same object for the same results
 */
export function useRun<T>(select: (run: DeskRun) => T): T {
  const runs = useRuns();
  return useSyncExternalStore(runs.subscribe, () => select(runs.get()));
}

/** The last good answer and the study it answers, for what is drawn only where there is one. */
export function useAnswered(): { answer: SessionAnswer; study: SessionStudyInput } {
  const answer = useRun((run) => run.answer);
  const study = useRun((run) => run.study);
  if (!answer || !study) throw new Error('Used before the first answer');
  return { answer, study };
}
