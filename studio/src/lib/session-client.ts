import { createSessionClient, type SessionClient } from '@voltiplano/engine/worker';

/** One worker follows the hand while another runs what stands beside it, however few the cores. */
const LEAST_WORKERS = 2;

let shared: SessionClient | undefined;

/** The engine in its workers; started when a page first asks for a run, and kept for the next page. */
export function sessionClient(): SessionClient {
  shared ??= makeSessionClient(Math.max(LEAST_WORKERS, navigator.hardwareConcurrency - 1));
  return shared;
}

/** Workers of one's own, for a background job that must not stand before somebody's hand. */
export function makeSessionClient(size: number): SessionClient {
  return createSessionClient(
    () => new Worker(new URL('../../../engine/worker/session-worker.ts', import.meta.url), { type: 'module' }),
    size,
  );
}
