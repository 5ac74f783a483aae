import { closestOf, limitsIn, worstPassed } from './readings.ts';
import type { Curve } from './taper-space.ts';
import { tryCurve, type Effort, type Problem, type Tick, type Trial } from './trial.ts';
import type { Holding, TunedPart } from './tune-result.ts';

/** Share by which a value is raised to see what stands against it. */
const RAISE = 0.01;
/** Changes of the goal below this share of it count as none. */
const NONE = 1e-7;

/**
 * What holds each part of a tuned taper: its value is raised by a hundredth and run again. A temperature may be passed long
 * after the part that caused it; the answer names the bound, not the place alone.
 */
export function* tunedParts(problem: Problem, trial: Trial, effort: Effort): Generator<Tick, TunedPart[]> {
  const { soc, value } = trial.curve;
  const { space, bounds } = problem;
  const parts: TunedPart[] = [];
  for (let i = 0; i < value.length; i++) {
    const pieces = space.kind === 'ledges' ? [i] : [i, i + 1];
    const limits = limitsIn(trial.watches, pieces);
    parts.push({
      fromSoc: space.kind === 'ledges' ? soc[i] : (soc[i - 1] ?? space.lo),
      toSoc: soc[i + 1] ?? space.hi,
      value: value[i],
      taperMinutes: limits.find(({ code }) => code === 'taper')?.minutes ?? 0,
      holds: yield* holding(problem, trial, i, limits, effort),
      closest: closestOf(bounds, trial.watches, pieces),
    });
  }
  return parts;
}

function* holding(
  problem: Problem,
  trial: Trial,
  i: number,
  limits: (Holding & { by: 'limits' })['limits'],
  effort: Effort,
): Generator<Tick, Holding> {
  const raised: Curve = {
    soc: trial.curve.soc,
    value: trial.curve.value.map((v, k) => (k === i ? v * (1 + RAISE) : v)),
  };
  const higher = yield* tryCurve(problem, raised, effort);
  const passed = worstPassed(problem.bounds, higher);
  if (passed !== null) {
    const { bound, condition, atMin, atSoc } = passed;
    return { by: 'bound', bound, condition, atMin, atSoc };
  }
  if (Math.abs(higher.cost - trial.cost) <= NONE * Math.abs(trial.cost)) return { by: 'limits', limits };
  const { monotone, most } = problem.space;
  const atOrder = monotone && i > 0 && raised.value[i] > raised.value[i - 1];
  return atOrder || raised.value[i] > most ? { by: 'order' } : { by: 'nothing' };
}
