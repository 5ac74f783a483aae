import type { Step } from '../integrate/stepper.ts';
import type { SessionSystem } from './session-system.ts';

/** The solution of a session as far as it is known: any moment of the step under way, or the one before it, can be looked at. */
export class SessionSolution {
  /** Physical states at the moment last looked at. */
  readonly seen: number[];
  /** That moment [s]; NaN where the system shows none. */
  at = Number.NaN;
  looks = 0;
  private step: Step | null = null;
  private before: Step | null = null;

  constructor(readonly system: SessionSystem) {
    this.seen = system.start.slice(0, system.pack.layout.integrals);
  }

  /** Takes the next step in; the system no longer shows a moment, since the integrator has used it. */
  advance(step: Step): void {
    this.before = this.step;
    this.step = step;
    this.at = Number.NaN;
  }

  /** Observes the solution at a moment and decides the current there by all limits. */
  look(t: number): void {
    if (t === this.at) return;
    const { step, before, seen } = this;
    const source = before !== null && step !== null && t < step.t0 ? before : step;
    if (source !== null) for (let i = 0; i < seen.length; i++) seen[i] = source.dense(i, t);
    this.decide(t);
  }

  /** Decides the current again for the state last looked at, after something has changed. */
  decide(t: number): void {
    this.looks++;
    this.at = t;
    this.system.at(t, this.seen);
  }

  /** Current that one limit allows at the moment last looked at [A]. */
  allowedBy(code: number): number {
    return this.system.charge.allowedBy(code, this.at, this.seen[this.system.pack.layout.inlet]);
  }

  /** The whole state, ledger integrals too, at a moment of the step under way. */
  stateAt(t: number): number[] {
    const { y, dense } = this.step!;
    return y.map((_, i) => dense(i, t));
  }
}
