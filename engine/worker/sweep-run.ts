import { failedChunk, SweepResult, type SweepChunk, type SweepPlan } from '../src/index.ts';
import type { TimedChunk } from './protocol.ts';
import { Cancelled, WorkerCrashed, type Ticket } from './worker-pool.ts';

/** Who runs chunks of cells: so many at once, each with a way to call it off. */
export type ChunkRunner = { lanes: number; run: (plan: SweepPlan, indices: Uint32Array) => Ticket<TimedChunk> };

export type SweepProgress = {
  total: number;
  done: number;
  failed: number;
  /** Time left [ms] at the pace so far; null until a first chunk is back. */
  msLeft: number | null;
};

export type SweepRunOptions = {
  /** Results kept from before, to be carried on; they grow in place. */
  from?: SweepResult;
  /** Called as cells come, after they are merged. */
  onChunk?: (chunk: SweepChunk, result: SweepResult) => void;
  onProgress?: (progress: SweepProgress) => void;
};

export type SweepRun = {
  readonly result: SweepResult;
  /** The results once every cell is done or failed; rejected with `Cancelled` where the run is called off. */
  readonly finished: Promise<SweepResult>;
  readonly state: 'running' | 'paused' | 'done' | 'cancelled';
  /** Starts no more chunks; those under way come in. */
  pause(): void;
  resume(): void;
  /** Calls the run off. Cells that came in stay in `result`. */
  cancel(): void;
};

/** How long a chunk should take [ms]: short beside what a person notices, long beside a message. */
const CHUNK_MS = 100;
const MOST_IN_CHUNK = 500;
const BROKE: { code: string; path: string; message: string } = {
  code: 'WORKER',
  path: '',
  message: 'The run broke the worker, twice.',
};

/** Cells waiting; `again` where the worker broke down over them before. */
type Batch = { indices: Uint32Array; again: boolean };

/**
 * Runs a plan's cells chunk by chunk. Each lane asks for its next chunk only when its last is back, so that between two
 * chunks whatever else waits for a worker, such as the desk's live run, goes first. A chunk over which its worker breaks
 * down is run again in halves, down to the cell that did it, which fails.
 */
export function createSweepRun(runner: ChunkRunner, plan: SweepPlan, options: SweepRunOptions = {}): SweepRun {
  const run = new RunningSweep(runner, plan, options);
  run.start();
  return run;
}

class RunningSweep implements SweepRun {
  readonly result: SweepResult;
  readonly finished: Promise<SweepResult>;
  state: SweepRun['state'] = 'running';

  private readonly waiting: Uint32Array;
  private next = 0;
  private readonly broken: Batch[] = [];
  private readonly underWay = new Set<Ticket<TimedChunk>>();
  private spentMs = 0;
  private spentOn = 0;
  private resolve!: (result: SweepResult) => void;
  private reject!: (error: Error) => void;

  constructor(
    private readonly runner: ChunkRunner,
    private readonly plan: SweepPlan,
    private readonly options: SweepRunOptions,
  ) {
    this.result = options.from ?? new SweepResult(plan);
    if (this.result.plan.hash !== plan.hash) throw new RangeError('The results to carry on belong to another sweep.');
    this.waiting = this.result.pending();
    this.finished = new Promise((resolve, reject) => {
      this.resolve = resolve;
      this.reject = reject;
    });
    // Whoever only looks at chunks need not listen to the end.
    this.finished.catch(() => {});
  }

  start(): void {
    this.tell();
    this.deal();
  }

  pause(): void {
    if (this.state === 'running') this.state = 'paused';
  }

  resume(): void {
    if (this.state !== 'paused') return;
    this.state = 'running';
    this.deal();
  }

  cancel(): void {
    this.stop(new Cancelled('The sweep was cancelled.'));
  }

  private stop(error: Error): void {
    if (this.state === 'done' || this.state === 'cancelled') return;
    this.state = 'cancelled';
    for (const ticket of this.underWay) ticket.cancel();
    this.reject(error);
  }

  private deal(): void {
    while (this.state === 'running' && this.underWay.size < this.runner.lanes) {
      const batch = this.broken.shift() ?? this.nextBatch();
      if (batch === null) break;
      void this.work(batch);
    }
    const over = this.underWay.size === 0 && this.broken.length === 0 && this.next === this.waiting.length;
    if (!over || this.state === 'done' || this.state === 'cancelled') return;
    this.state = 'done';
    this.resolve(this.result);
  }

  private nextBatch(): Batch | null {
    const left = this.waiting.length - this.next;
    if (left === 0) return null;
    // Before anything is measured one cell a lane: some take a hundred times as long as others.
    const fit = this.spentOn === 0 ? 1 : Math.ceil((CHUNK_MS * this.spentOn) / this.spentMs);
    const share = Math.ceil(left / this.runner.lanes);
    const count = Math.max(1, Math.min(fit, share, MOST_IN_CHUNK));
    const indices = this.waiting.slice(this.next, this.next + count);
    this.next += count;
    return { indices, again: false };
  }

  private async work(batch: Batch): Promise<void> {
    const ticket = this.runner.run(this.plan, batch.indices);
    this.underWay.add(ticket);
    try {
      const chunk = await ticket.result;
      this.underWay.delete(ticket);
      if (this.state === 'cancelled') return;
      this.spentMs += chunk.ms;
      this.spentOn += chunk.indices.length;
      this.take(chunk);
    } catch (error) {
      this.underWay.delete(ticket);
      if (!(error instanceof WorkerCrashed)) return this.stop(error as Error);
      this.retry(batch);
    }
    this.deal();
  }

  private take(chunk: SweepChunk): void {
    this.result.merge(chunk);
    this.options.onChunk?.(chunk, this.result);
    this.tell();
  }

  private retry({ indices, again }: Batch): void {
    if (indices.length > 1) {
      const middle = indices.length >> 1;
      this.broken.push({ indices: indices.slice(0, middle), again: true });
      this.broken.push({ indices: indices.slice(middle), again: true });
    } else if (again) this.take(failedChunk(this.plan, indices, BROKE));
    else this.broken.push({ indices, again: true });
  }

  private tell(): void {
    const { done, failed } = this.result;
    const left = this.plan.size - done - failed;
    const lanes = Math.min(this.runner.lanes, Math.max(1, left));
    const msLeft = this.spentOn === 0 ? null : (left * this.spentMs) / this.spentOn / lanes;
    this.options.onProgress?.({ total: this.plan.size, done, failed, msLeft });
  }
}
