import { simulateSession } from '../session/simulate-session.ts';
import { parseSessionStudy } from '../study/parse-study.ts';
import { StudyError } from '../study/study-error.ts';
import { writeColumns } from './sweep-metrics.ts';
import { cellStudy, type SweepPlan } from './sweep-plan.ts';

export const CELL = { pending: 0, done: 1, failed: 2 } as const;

/** Why a cell has no numbers: a code of `StudyError`, or `UNEXPECTED` or `WORKER`; where, and a sentence. */
export type CellFailure = { code: string; path: string; message: string };

/** What some cells came to. */
export type SweepChunk = {
  /** Cells of the plan; length n. */
  indices: Uint32Array;
  /** `CELL.done` or `CELL.failed`, length n. */
  status: Uint8Array;
  /** Column by column of the plan, n numbers each; NaN where a session does not cover it and for a failed cell. */
  values: Float64Array;
  failures: { index: number; failure: CellFailure }[];
};

/** Runs cells of a plan, each as an ordinary session at default accuracy. A cell that fails stops none of the others. */
export function runCells(plan: SweepPlan, indices: ArrayLike<number>): SweepChunk {
  const n = indices.length;
  const chunk: SweepChunk = {
    indices: Uint32Array.from(indices),
    status: new Uint8Array(n).fill(CELL.failed),
    values: new Float64Array(plan.columns.length * n).fill(NaN),
    failures: [],
  };
  for (let at = 0; at < n; at++) {
    const index = indices[at];
    try {
      const { result } = simulateSession(parseSessionStudy(cellStudy(plan, index)));
      writeColumns(result, plan.columns, chunk.values, n, at);
      chunk.status[at] = CELL.done;
    } catch (error) {
      chunk.failures.push({ index, failure: failureOf(error as Error) });
    }
  }
  return chunk;
}

function failureOf(error: Error): CellFailure {
  if (!(error instanceof StudyError)) return { code: 'UNEXPECTED', path: '', message: error.message };
  return { code: error.code, path: error.issues[0]?.path ?? '', message: error.message };
}

/** A chunk in which every cell failed for the same reason. */
export function failedChunk(plan: SweepPlan, indices: ArrayLike<number>, failure: CellFailure): SweepChunk {
  const n = indices.length;
  return {
    indices: Uint32Array.from(indices),
    status: new Uint8Array(n).fill(CELL.failed),
    values: new Float64Array(plan.columns.length * n).fill(NaN),
    failures: Array.from(indices, (index) => ({ index, failure })),
  };
}
