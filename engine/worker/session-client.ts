import * as Comlink from 'comlink';
import type { SessionStudyInput, SweepPlan, TuneProgress, TuneRequestInput, TuneResult } from '../src/index.ts';
import { unpackAnswer } from './pack-series.ts';
import type { Outcome, RunOptions, RunSummary, SessionAnswer } from './protocol.ts';
import { createSweepRun, type ChunkRunner, type SweepRun, type SweepRunOptions } from './sweep-run.ts';
import { tuneOn } from './tune-ticket.ts';
import { asError, Cancelled, WorkerPool, type Ticket } from './worker-pool.ts';

const CHUNK = 8;

export type SessionClient = {
  /** Runs one session; `onProgress` gets the share done, 0 to 1. */
  run(study: SessionStudyInput, options?: RunOptions & { onProgress?: (share: number) => void }): Ticket<SessionAnswer>;
  /**
   * As `run`, for a study that is being edited: of the runs asked for while one is under way only the newest is made,
   * and the others are rejected with `Cancelled`.
   */
  latest(study: SessionStudyInput, options?: RunOptions): Promise<SessionAnswer>;
  /** Headline numbers of many sessions on all workers; entries that fail are errors. `onProgress` gets how many are done. */
  summarise(studies: SessionStudyInput[], onProgress?: (done: number) => void): Ticket<(RunSummary | Error)[]>;
  /** Runs the cells of a sweep on all workers; live runs go between its chunks. */
  sweep(plan: SweepPlan, options?: SweepRunOptions): SweepRun;
  /** Tunes a taper on one worker; cancelling it keeps the worker. */
  tune(request: TuneRequestInput, onProgress?: (progress: TuneProgress) => void): Ticket<TuneResult>;
  close(): void;
};

/** The engine in workers, seen from the page. */
export function createSessionClient(makeWorker: () => Worker, size?: number): SessionClient {
  const pool = new WorkerPool(makeWorker, size);
  const run: SessionClient['run'] = (study, { onProgress, ...options } = {}) => {
    const ticket = pool.run((worker) => worker.run(study, options, onProgress ? Comlink.proxy(onProgress) : null));
    return { result: ticket.result.then(unpackAnswer), cancel: ticket.cancel };
  };
  return {
    run,
    latest: latestOf(run),
    summarise: (studies, onProgress) => summarise(pool, studies, onProgress),
    sweep: (plan, options) => createSweepRun(chunksOf(pool), plan, options),
    tune: (request, onProgress) => tuneOn(pool, request, onProgress),
    close: () => pool.close(),
  };
}

const chunksOf = (pool: WorkerPool): ChunkRunner => ({
  lanes: pool.size,
  run: (plan, indices) => pool.run((worker) => worker.sweepCells(plan, indices), true),
});

type Waiting = { start: () => void; giveWay: () => void };

/** Lets one run go at a time; a newer request takes the place of one that has not begun. */
function latestOf(run: SessionClient['run']): SessionClient['latest'] {
  let busy = false;
  let next: Waiting | null = null;
  const begin = (waiting: Waiting) => {
    busy = true;
    waiting.start();
  };
  const done = () => {
    busy = false;
    const waiting = next;
    next = null;
    if (waiting) begin(waiting);
  };
  return (study, options) =>
    new Promise((resolve, reject) => {
      const waiting: Waiting = {
        start: () => void run(study, options).result.then(resolve, reject).finally(done),
        giveWay: () => reject(new Cancelled('A newer run took its place.')),
      };
      if (!busy) return begin(waiting);
      next?.giveWay();
      next = waiting;
    });
}

function summarise(
  pool: WorkerPool,
  studies: SessionStudyInput[],
  onProgress?: (done: number) => void,
): Ticket<(RunSummary | Error)[]> {
  let done = 0;
  const chunks = Array.from({ length: Math.ceil(studies.length / CHUNK) }, (_, i) =>
    studies.slice(i * CHUNK, (i + 1) * CHUNK),
  );
  const tickets = chunks.map((chunk) => {
    const ticket = pool.run((worker) => worker.summarise(chunk, null));
    return { ...ticket, result: ticket.result.then((part) => (onProgress?.((done += part.length)), part)) };
  });
  const unwrap = (outcome: Outcome<RunSummary>) => (outcome.ok ? outcome.value : asError(outcome.failure));
  return {
    result: Promise.all(tickets.map((ticket) => ticket.result)).then((parts) => parts.flat().map(unwrap)),
    cancel: () => tickets.forEach((ticket) => ticket.cancel()),
  };
}
