import type { Step } from './stepper.ts';

/** A system that shows itself at a moment, given the states there. */
type Shown = { at(t: number, y: ArrayLike<number>): void };

/** The solution as far as it is known: any moment of the step under way, or the one before it, can be looked at. */
export class Solution<System extends Shown> {
  /** Physical states at the moment last looked at. */
  readonly seen: number[];
  /** That moment [s]; NaN where the system shows none. */
  at = Number.NaN;
  looks = 0;
  private step: Step | null = null;
  private before: Step | null = null;

  /**
   * @param start     whole state at the start
   * @param physical  how many of its first entries are physical states; the rest are integrals, which are not looked at
   */
  constructor(
    readonly system: System,
    start: readonly number[],
    physical: number,
  ) {
    this.seen = start.slice(0, physical);
  }

  /** Takes the next step in; the system no longer shows a moment, since the integrator has used it. */
  advance(step: Step): void {
    this.before = this.step;
    this.step = step;
    this.at = Number.NaN;
  }

  /** Makes the system show the solution at a moment. */
  look(t: number): void {
    if (t === this.at) return;
    const { step, before, seen } = this;
    const source = before !== null && step !== null && t < step.t0 ? before : step;
    if (source !== null) for (let i = 0; i < seen.length; i++) seen[i] = source.dense(i, t);
    this.decide(t);
  }

  /** Makes the system show the state last looked at again, after something has changed. */
  decide(t: number): void {
    this.looks++;
    this.at = t;
    this.system.at(t, this.seen);
  }

  /** The whole state, ledger integrals too, at a moment of the step under way. */
  stateAt(t: number): number[] {
    const { y, dense } = this.step!;
    return y.map((_, i) => dense(i, t));
  }
}
