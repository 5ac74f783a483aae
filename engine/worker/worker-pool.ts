import * as Comlink from 'comlink';
import { StudyError } from '../src/index.ts';
import type { Outcome, SessionWorker, WorkerFailure } from './protocol.ts';

/** A job that was called off before it ended. */
export class Cancelled extends Error {
  override readonly name = 'Cancelled';
  constructor(message = 'The run was cancelled.') {
    super(message);
  }
}

/** A job whose worker broke down; the worker has been replaced. */
export class WorkerCrashed extends Error {
  override readonly name = 'WorkerCrashed';
}

type Remote = Comlink.Remote<SessionWorker>;
type Work<T> = (worker: Remote) => Promise<Outcome<T>>;
type Job<T = unknown> = { work: Work<T>; behind: boolean; resolve: (value: T) => void; reject: (error: Error) => void };
type Seat = { worker: Worker; remote: Remote; job: Job | null };

/** What a job's owner holds: the answer to come, and a way to call it off. */
export type Ticket<T> = { result: Promise<T>; cancel: () => void };

/**
 * Workers that take jobs in turn. A worker that crashes is replaced and its job rejected with `WorkerCrashed`;
 * cancelling a running job ends its worker, since a run does not look up from its work, and puts a new one in its place.
 */
export class WorkerPool {
  private readonly seats: Seat[] = [];
  private readonly waiting: Job[] = [];
  private readonly makeWorker: () => Worker;
  /** Most workers at once. */
  readonly size: number;
  private closed = false;

  /**
   * @param makeWorker  makes one worker running `session-worker.ts`
   * @param size        most workers at once; by default one per core but one, which draws
   */
  constructor(makeWorker: () => Worker, size = Math.max(1, (globalThis.navigator?.hardwareConcurrency ?? 2) - 1)) {
    this.makeWorker = makeWorker;
    this.size = size;
  }

  /** @param behind  lets jobs that are not go first, such as a run that a person waits for before one of thousands */
  run<T>(work: Work<T>, behind = false): Ticket<T> {
    if (this.closed) return { result: Promise.reject(new Cancelled()), cancel: () => {} };
    let job: Job<T> | null = null;
    const result = new Promise<T>((resolve, reject) => {
      job = { work, behind, resolve, reject };
      const at = behind ? -1 : this.waiting.findIndex((one) => one.behind);
      this.waiting.splice(at < 0 ? this.waiting.length : at, 0, job as Job);
    });
    this.deal();
    return { result, cancel: () => this.cancel(job as Job | null) };
  }

  /** Ends all workers; jobs not done are cancelled. */
  close(): void {
    this.closed = true;
    for (const job of this.waiting.splice(0)) job.reject(new Cancelled());
    for (const seat of this.seats.splice(0)) {
      seat.worker.terminate();
      seat.job?.reject(new Cancelled());
    }
  }

  private deal(): void {
    while (this.waiting.length > 0 && !this.closed) {
      const seat = this.seats.find((one) => one.job === null) ?? this.addSeat();
      if (seat === null) return;
      void this.work(seat, this.waiting.shift()!);
    }
  }

  private addSeat(): Seat | null {
    if (this.seats.length >= this.size) return null;
    const worker = this.makeWorker();
    const seat: Seat = { worker, remote: Comlink.wrap<SessionWorker>(worker), job: null };
    const crashed = (event: ErrorEvent | Event) => {
      event.preventDefault?.();
      this.crash(seat, 'message' in event && event.message ? event.message : 'no reason given');
    };
    worker.addEventListener('error', crashed);
    worker.addEventListener('messageerror', crashed);
    this.seats.push(seat);
    return seat;
  }

  private async work(seat: Seat, job: Job): Promise<void> {
    seat.job = job;
    try {
      const outcome = await job.work(seat.remote);
      if (seat.job !== job) return;
      seat.job = null;
      if (outcome.ok) job.resolve(outcome.value);
      else job.reject(asError(outcome.failure));
    } catch (error) {
      if (seat.job !== job) return;
      this.crash(seat, (error as Error).message);
    }
    this.deal();
  }

  private crash(seat: Seat, reason: string): void {
    const job = this.dismiss(seat);
    job?.reject(new WorkerCrashed(`The worker broke down (${reason}). It has been replaced; try again.`));
    this.deal();
  }

  private cancel(job: Job | null): void {
    if (job === null) return;
    const queued = this.waiting.indexOf(job);
    const seat = this.seats.find((one) => one.job === job);
    if (queued >= 0) this.waiting.splice(queued, 1);
    else if (seat) this.dismiss(seat);
    else return;
    job.reject(new Cancelled());
    this.deal();
  }

  private dismiss(seat: Seat): Job | null {
    const { job } = seat;
    seat.job = null;
    seat.worker.terminate();
    const at = this.seats.indexOf(seat);
    if (at >= 0) this.seats.splice(at, 1);
    return job;
  }
}

/** An error as it was thrown in the worker. */
export function asError({ name, message, code, issues }: WorkerFailure): Error {
  if (code && issues) return new StudyError(code, issues);
  return Object.assign(new Error(message), { name });
}
