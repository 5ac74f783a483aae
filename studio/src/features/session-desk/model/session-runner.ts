import { StudyError, type SessionStudyInput } from '@voltiplano/engine';
import type { SessionAnswer } from '@voltiplano/engine/worker';

/** Why there is no result for the present study: its issues, or the breakdown of a worker in words. */
export type RunFailure = { kind: 'refused'; sentences: string[] } | { kind: 'crashed'; message: string };

export type RunnerState = {
  /** The last good answer and the study it answers. */
  answer: SessionAnswer | null;
  study: SessionStudyInput | null;
  /** A newer run has been under way for longer than `STALE_MS`. */
  isWorking: boolean;
  failure: RunFailure | null;
};

/** How long a run may take before the curves are shown as those of an older study. */
export const STALE_MS = 300;

const IDLE: RunnerState = { answer: null, study: null, isWorking: false, failure: null };

/** Runs the study asked for last, and keeps the last good answer until a newer one is here. */
export class SessionRunner {
  private state = IDLE;
  private asked = 0;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private readonly listeners = new Set<() => void>();
  private readonly run: (study: SessionStudyInput) => Promise<SessionAnswer>;

  constructor(run: (study: SessionStudyInput) => Promise<SessionAnswer>) {
    this.run = run;
  }

  readonly get = (): RunnerState => this.state;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  ask(study: SessionStudyInput): void {
    const number = ++this.asked;
    clearTimeout(this.timer);
    this.timer = setTimeout(() => this.set({ isWorking: true }), STALE_MS);
    this.run(study).then(
      (answer) => this.answered(number, { answer, study, failure: null }),
      (error: unknown) => this.failed(number, error as Error),
    );
  }

  /** Forgets the answer, as when there is no longer anything to run. */
  forget(): void {
    this.asked++;
    clearTimeout(this.timer);
    this.set(IDLE);
  }

  private answered(number: number, change: Partial<RunnerState>): void {
    // An answer to an older question still is newer than what is shown: curves follow the hand.
    this.set(number === this.asked ? { ...change, ...this.settled() } : change);
  }

  private failed(number: number, error: Error): void {
    if (error.name === 'Cancelled' || number !== this.asked) return;
    const failure: RunFailure =
      error instanceof StudyError
        ? { kind: 'refused', sentences: error.issues.map((issue) => issue.message) }
        : { kind: 'crashed', message: error.message };
    this.set({ failure, ...this.settled() });
  }

  private settled(): Partial<RunnerState> {
    clearTimeout(this.timer);
    return { isWorking: false };
  }

  private set(change: Partial<RunnerState>): void {
    this.state = { ...this.state, ...change };
    this.listeners.forEach((listener) => listener());
  }
}
