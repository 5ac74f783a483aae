import { createSessionClient, type SessionClient } from '@voltiplano/engine/worker';

/** One worker follows the hand, the other runs the baseline. */
const WORKERS = 2;

let client: SessionClient | undefined;

/** The engine in its workers; started when the first desk asks for it, and kept for the next. */
export function sessionClient(): SessionClient {
  client ??= createSessionClient(
    () => new Worker(new URL('../../../../../engine/worker/session-worker.ts', import.meta.url), { type: 'module' }),
    WORKERS,
  );
  return client;
}
