import { Stepper, type Derivative } from '../integrate/stepper.ts';
import type { PackSystem } from '../pack/pack-system.ts';
import { shortestTimeConstant } from '../pack/shortest-time-constant.ts';

export type Accuracy = {
  /** Relative tolerance of the integration. */
  rtol?: number;
  /** Most evaluations of the derivative before the run gives up. */
  maxEvaluations?: number;
  /** Puts something around the derivative before it is integrated, such as the bench's clock. */
  around?: (derivative: Derivative) => Derivative;
};

const DEFAULT_RTOL = 2e-6;
const MAX_EVALUATIONS = 500_000;
/**
 * Longest step as a multiple of the shortest time constant: on variations of the examples 4 saves a tenth of the evaluations
 * against 3, and beyond 5 odex rejects more steps than it saves (engine/MODEL.md, section 9).
 */
const STABLE_STEPS = 4;
/** Longest step at all [s]: inside longer ones narrow bands of controllers go unseen, which costs up to 0.2 K at 45 s. */
const LONGEST_STEP_S = 30;
/** First step after a start [s]. */
const FIRST_STEP_S = 2;
const USUAL_K = 30;
const USUAL_V = 0.5;

/** An integrator set up for a pack: tolerances by the size of its states, steps by its shortest time constant. */
export function makeStepper(derivative: Derivative, pack: PackSystem, accuracy: Accuracy): Stepper {
  const shortest = shortestTimeConstant(pack);
  return new Stepper(accuracy.around?.(derivative) ?? derivative, {
    ...tolerances(pack, accuracy.rtol ?? DEFAULT_RTOL),
    maxStepS: Math.min(LONGEST_STEP_S, STABLE_STEPS * shortest.seconds),
    firstStepS: Math.min(FIRST_STEP_S, shortest.seconds),
    maxEvaluations: accuracy.maxEvaluations ?? MAX_EVALUATIONS,
    diagnose: () => `the shortest time constant is ${shortest.seconds.toPrecision(3)} s, of ${shortest.name}`,
  });
}

/** Tolerances of each state from one relative tolerance: absolute ones stand at a usual size of the state. */
function tolerances(pack: PackSystem, rtol: number): { relativeTolerance: number; absoluteTolerance: number[] } {
  const { layout } = pack;
  const scale = new Array<number>(layout.size).fill(0);
  scale[0] = 1;
  scale.fill(USUAL_K, layout.core, layout.rc);
  scale.fill(USUAL_V * pack.cellsPerSegment, layout.rc, layout.loop);
  scale.fill(USUAL_K, layout.loop, layout.integrals);
  // Integrals feed nothing back: their scale is the pack's own energy, so that they never set the step.
  scale.fill(3600 * 4 * pack.capacityAh * pack.cellsPerSegment * layout.segments, layout.integrals);
  return { relativeTolerance: rtol, absoluteTolerance: scale.map((size) => size * rtol) };
}
