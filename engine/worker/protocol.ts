import type {
  SessionResult,
  SessionStudyInput,
  StudyErrorCode,
  StudyIssue,
  SweepChunk,
  SweepPlan,
  ThermalAnalysis,
  TuneProgress,
  TuneRequestInput,
  TuneResult,
} from '../src/index.ts';

/** What one session run answers: the result, the thermal network under its mean heat, and the time it took [ms]. */
export type SessionAnswer = { result: SessionResult; thermal: ThermalAnalysis; ms: number };

export type RunOptions = { everyS?: number; rtol?: number };

/** An error as it crosses the worker's border. */
export type WorkerFailure = { name: string; message: string; code?: StudyErrorCode; issues?: StudyIssue[] };

export type Outcome<T> = { ok: true; value: T } | { ok: false; failure: WorkerFailure };

/** Headline numbers only, for many runs at once. */
export type RunSummary = Pick<SessionResult, 'metrics' | 'energyLedger'>;

/** Series columns as they cross the border: numbers as one transferred block, the rest as they are. */
export type PackedAnswer = { answer: SessionAnswer; names: string[]; rows: number; block: ArrayBuffer };

/** Cells of a sweep and the time they took [ms]. */
export type TimedChunk = SweepChunk & { ms: number };

/** What a worker offers. `onProgress` gets the share done, 0 to 1. */
export type SessionWorker = {
  run(
    study: SessionStudyInput,
    options: RunOptions,
    onProgress: ((share: number) => void) | null,
  ): Outcome<PackedAnswer>;
  summarise(studies: SessionStudyInput[], onProgress: ((done: number) => void) | null): Outcome<Outcome<RunSummary>[]>;
  sweepCells(plan: SweepPlan, indices: Uint32Array): Outcome<TimedChunk>;
  /** Listens between runs for `cancelTune` with the same number. */
  tune(
    request: TuneRequestInput,
    job: number,
    onProgress: ((progress: TuneProgress) => void) | null,
  ): Promise<Outcome<TuneResult>>;
  cancelTune(job: number): void;
};
