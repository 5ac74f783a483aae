import { parseTuneRequest, StudyError, TuneCancelled, tuneSteps } from '../src/index.ts';
import type { TuneProgress, TuneRequestInput, TuneResult } from '../src/index.ts';
import type { Outcome } from './protocol.ts';

/** How long the worker goes on before it listens for messages, a cancel among them [ms]; runs take a few each. */
const LISTEN_MS = 40;

/** Tunings called off, by the number their owner gave them. */
const cancelled = new Set<number>();

/** Calls a tuning off between two of its runs. */
export function cancelTune(job: number): void {
  cancelled.add(job);
}

/**
 * Tunes in this worker. It pauses between runs to listen, so that it can be called off and goes on living.
 *
 * @param job         a number its owner gave it, for `cancelTune`
 * @param onProgress  told at each pause
 */
export async function tuneJob(
  input: TuneRequestInput,
  job: number,
  onProgress: ((progress: TuneProgress) => void) | null,
): Promise<Outcome<TuneResult>> {
  try {
    return { ok: true, value: await drive(input, job, onProgress) };
  } catch (error) {
    const { name, message } = error as Error;
    const study = error instanceof StudyError ? { code: error.code, issues: error.issues } : {};
    return { ok: false, failure: { name, message, ...study } };
  } finally {
    cancelled.delete(job);
  }
}

async function drive(
  input: TuneRequestInput,
  job: number,
  onProgress: ((progress: TuneProgress) => void) | null,
): Promise<TuneResult> {
  const steps = tuneSteps(parseTuneRequest(input));
  let listened = performance.now();
  for (;;) {
    const next = steps.next();
    if (next.done) return next.value;
    if (performance.now() - listened < LISTEN_MS) continue;
    onProgress?.(next.value);
    await new Promise((resolve) => setTimeout(resolve, 0));
    if (cancelled.has(job)) throw new TuneCancelled();
    listened = performance.now();
  }
}
