import type { SessionResult, SessionStudyInput } from '@voltiplano/engine';
import { createContext, useContext } from 'react';
import type { RunnerState } from '../model/session-runner.ts';

export type DeskRun = RunnerState & {
  /** The kept baseline's result and study. */
  baseline: { result: SessionResult; study: SessionStudyInput } | null;
  tryAgain: () => void;
};

export const RunContext = createContext<DeskRun | null>(null);

/** The results on the desk. */
export function useRun(): DeskRun {
  const run = useContext(RunContext);
  if (!run) throw new Error('Used outside a session desk');
  return run;
}
