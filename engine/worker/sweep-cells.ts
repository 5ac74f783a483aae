import * as Comlink from 'comlink';
import { runCells, type SweepPlan } from '../src/index.ts';
import type { Outcome, TimedChunk } from './protocol.ts';

/** Runs cells of a plan in this worker; their numbers are transferred, not copied. */
export function sweepCells(plan: SweepPlan, indices: Uint32Array): Outcome<TimedChunk> {
  const began = performance.now();
  const chunk = runCells(plan, indices);
  const value = { ...chunk, ms: performance.now() - began };
  const blocks = [chunk.values.buffer, chunk.indices.buffer, chunk.status.buffer] as ArrayBuffer[];
  return Comlink.transfer({ ok: true as const, value }, blocks);
}
