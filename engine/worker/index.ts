export { createSessionClient, type SessionClient } from './session-client.ts';
export { Cancelled, WorkerCrashed, type Ticket } from './worker-pool.ts';
export type { RunOptions, RunSummary, SessionAnswer } from './protocol.ts';
