import type { Step } from '../integrate/stepper.ts';
import type { SessionSolution } from './happenings.ts';

/**
 * Somebody who watches a session as it runs. Every call comes while the system shows the moment it is about; an observer
 * that looks elsewhere looks back before it returns. What it reads, it may not change.
 */
export type SessionObserver = {
  /** Plug-in; the solution shows t = 0. */
  begin?(solution: SessionSolution): void;
  /** A moment on the way [s], under the limit in force (index in `limitCodes`). Of a jump both sides are shown, at the same moment. */
  sample?(t: number, code: number): void;
  /** The stretch of a step between the last two samples [s]. */
  pass?(step: Step, from: number, to: number): void;
  /** What comes next does not go on from the last sample: a jump, or the end. */
  close?(): void;
  /** A row of the series, under the limit's index; `dropRow` takes the last one back. */
  row?(t: number, code: number): void;
  dropRow?(): void;
};
