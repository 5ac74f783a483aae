import { existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { decodeSweep, encodeSweep, engineVersion, SweepResult, type SweepPlan } from '../src/index.ts';
import type { SweepProgress, SweepRunOptions } from '../worker/index.ts';

const EVERY_MS = 5000;

/**
 * Options of a run whose finished cells are kept in a file: read from it where it is there, written now and then and at the
 * end.
 *
 * @throws {SweepDataError} where the file holds something else than results of this sweep by this engine
 */
export function keptIn(file: string, plan: SweepPlan, onProgress: (progress: SweepProgress) => void): SweepRunOptions {
  const from = existsSync(file) ? decodeSweep(readFileSync(file), plan, engineVersion) : new SweepResult(plan);
  let keptMs = performance.now();
  const keep = () => {
    keptMs = performance.now();
    // First beside it: a file half written would be the end of what was kept before.
    writeFileSync(`${file}.part`, encodeSweep(from, engineVersion));
    renameSync(`${file}.part`, file);
  };
  return {
    from,
    onProgress: (progress) => {
      onProgress(progress);
      const over = progress.done + progress.failed === progress.total;
      if (over || performance.now() > keptMs + EVERY_MS) keep();
    },
  };
}
