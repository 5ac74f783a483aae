import type { SessionResult, SessionStudyInput } from '@voltiplano/engine';
import type { SessionAnswer } from '@voltiplano/engine/worker';
import type { DeskStore } from './desk-store.ts';
import { SessionRunner, type RunnerState } from './session-runner.ts';

export type DeskRun = RunnerState & {
  /** The kept baseline's result and study. */
  baseline: { result: SessionResult; study: SessionStudyInput } | null;
};

type Run = (study: SessionStudyInput) => Promise<SessionAnswer>;

/**
 * Results that follow a desk as it is edited: the newest study is run as soon as a worker is free, and the last good
 * answer stays until then. Nothing is told while a run is under way, so an edit draws its own field and no more.
 */
export class DeskRuns {
  private readonly live: SessionRunner;
  private readonly kept: SessionRunner;
  private readonly listeners = new Set<() => void>();
  private run: DeskRun;
  private asked: SessionStudyInput | undefined;
  private askedBaseline: SessionStudyInput | null = null;

  /**
   * @param runLive  gives way to the next: of runs asked for meanwhile only the newest need be made
   * @param runKept  runs a baseline
   */
  constructor(runLive: Run, runKept: Run) {
    this.live = new SessionRunner(runLive);
    this.kept = new SessionRunner(runKept);
    this.run = { ...this.live.get(), baseline: null };
    this.live.subscribe(() => this.tell({ ...this.run, ...this.live.get() }));
    this.kept.subscribe(() => this.tell({ ...this.run, baseline: baselineOf(this.kept.get()) }));
  }

  readonly get = (): DeskRun => this.run;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  /** Runs what stands on a desk, and again whenever its study or its baseline is another; gives the way to stop. */
  follow(desk: DeskStore): () => void {
    const ask = () => {
      const { draft, baseline } = desk.get().sheet;
      if (draft.study !== this.asked) this.live.ask((this.asked = draft.study));
      if (baseline === this.askedBaseline) return;
      this.askedBaseline = baseline;
      if (baseline) this.kept.ask(baseline);
      else this.kept.forget();
    };
    ask();
    return desk.subscribe(ask);
  }

  /** Runs the study on the desk once more, as after a breakdown. */
  readonly tryAgain = (): void => {
    if (this.asked) this.live.ask(this.asked);
  };

  private tell(run: DeskRun): void {
    this.run = run;
    this.listeners.forEach((listener) => listener());
  }
}

function baselineOf({ answer, study }: RunnerState): DeskRun['baseline'] {
  return answer && study ? { result: answer.result, study } : null;
}
