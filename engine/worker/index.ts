export { createSessionClient, type SessionClient } from './session-client.ts';
export { Cancelled, WorkerCrashed, type Ticket } from './worker-pool.ts';
export {
  createSweepRun,
  type ChunkRunner,
  type SweepProgress,
  type SweepRun,
  type SweepRunOptions,
} from './sweep-run.ts';
export type { RunOptions, RunSummary, SessionAnswer, TimedChunk } from './protocol.ts';
