import * as Comlink from 'comlink';
import type { TuneProgress, TuneRequestInput, TuneResult } from '../src/index.ts';
import type { SessionWorker } from './protocol.ts';
import { Cancelled, type Ticket, type WorkerPool } from './worker-pool.ts';

let jobs = 0;

/**
 * Tunes on one worker of the pool. Called off while it waits it never begins; called off under way it ends between two runs, and
 * its worker goes on to the next job.
 */
export function tuneOn(
  pool: WorkerPool,
  request: TuneRequestInput,
  onProgress?: (progress: TuneProgress) => void,
): Ticket<TuneResult> {
  const job = ++jobs;
  let under: Comlink.Remote<SessionWorker> | null = null;
  const ticket = pool.run((worker) => {
    under = worker;
    return worker.tune(request, job, onProgress ? Comlink.proxy(onProgress) : null);
  });
  let callOff = (_: Cancelled) => {};
  const calledOff = new Promise<never>((_, reject) => (callOff = reject));
  return {
    result: Promise.race([ticket.result, calledOff]),
    cancel: () => {
      callOff(new Cancelled());
      if (under === null) ticket.cancel();
      else void under.cancelTune(job).catch(() => {});
    },
  };
}
