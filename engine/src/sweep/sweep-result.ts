import { coarseToFine } from './coarse-to-fine.ts';
import { CELL, type CellFailure, type SweepChunk } from './run-cells.ts';
import { lengthOf, type SweepPlan } from './sweep-plan.ts';

/** What the cells of a plan came to so far. */
export class SweepResult {
  readonly plan: SweepPlan;
  /** `CELL.pending`, `done` or `failed` per cell. */
  readonly status: Uint8Array;
  readonly failures = new Map<number, CellFailure>();
  done = 0;
  failed = 0;
  private readonly values: Float64Array;

  constructor(plan: SweepPlan) {
    this.plan = plan;
    this.status = new Uint8Array(plan.size);
    this.values = new Float64Array(plan.columns.length * plan.size).fill(NaN);
  }

  /** One number of every cell; NaN where it is pending, failed or not covered. A view: not to be written to. */
  column(id: string): Float64Array {
    const at = this.plan.columns.indexOf(id);
    if (at < 0) throw new RangeError(`No column "${id}": this sweep has ${this.plan.columns.join(', ')}`);
    return this.values.subarray(at * this.plan.size, (at + 1) * this.plan.size);
  }

  /** Takes cells in; a cell that is here already stays as it is. */
  merge({ indices, status, values, failures }: SweepChunk): void {
    const { size, columns } = this.plan;
    const n = indices.length;
    const reasons = new Map(failures.map(({ index, failure }) => [index, failure]));
    for (let i = 0; i < n; i++) {
      const index = indices[i];
      if (this.status[index] !== CELL.pending) continue;
      this.status[index] = status[i];
      for (let column = 0; column < columns.length; column++)
        this.values[column * size + index] = values[column * n + i];
      if (status[i] === CELL.done) this.done++;
      else {
        this.failed++;
        this.failures.set(index, reasons.get(index)!);
      }
    }
  }

  /** Cells still to run, in the order to run them: a grid coarse to fine, the others as they stand. */
  pending(): Uint32Array {
    const { plan, status } = this;
    const order =
      plan.kind === 'grid'
        ? coarseToFine(plan.axes.map(lengthOf))
        : Uint32Array.from({ length: plan.size }, (_, i) => i);
    return order.filter((index) => status[index] === CELL.pending);
  }
}
