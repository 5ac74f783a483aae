import { simulateSession } from '../session/simulate-session.ts';
import type { BoundSpec } from './bound-specs.ts';
import { excess } from './bound-specs.ts';
import { BoundWatch } from './bound-watch.ts';
import { improve, keeps } from './improve.ts';
import { cutValues, onGrid, taperOf } from './taper-space.ts';
import { piecesOf, tryCurve, withTaper, type Effort, type Problem, type Tick, type Trial } from './trial.ts';

/** Tolerances and grids [s] at which a certified taper keeps every bound: the ordinary run's, and a far finer one's. */
const PROOFS = [{}, { rtol: 1e-8, everyS: 1 }];
const ROUNDS = 6;
/** Shares to which all values are taken down where nothing else helps. */
const RETREATS = [0.9995, 0.998, 0.995, 0.98, 0.95, 0.9];

/**
 * Makes of a search's end a taper that can be written down: places on the grid of soc, values of five digits, every bound kept in
 * ordinary and in finer runs.
 *
 * @returns null where no retreat from the taper keeps the bounds
 */
export function* certify(problem: Problem, found: Trial, effort: Effort): Generator<Tick, Trial | null> {
  let held = problem;
  let trial = yield* tryCurve(problem, onGrid(problem.space, found.curve), effort);
  for (let round = 0; round < ROUNDS; round++) {
    // Under a wider back-off the same taper counts as further out.
    if (round > 0) trial = yield* tryCurve(held, trial.curve, effort);
    const { best, last } = yield* improve(held, trial, effort, { rounds: 4, radius: 0.05, valuesOnly: true });
    const end = best !== null && best.cost < last.cost ? best : last;
    trial = yield* tryCurve(held, cutValues(problem.space, end.curve), effort);
    const passed = yield* passedBy(problem, trial, effort);
    if (passed === null) return trial;
    held = { ...held, bounds: held.bounds.map((bound, b) => heldBack(bound, passed[b])) };
  }
  for (const share of RETREATS) {
    const value = trial.curve.value.map((v) => v * share);
    const lower = yield* tryCurve(problem, cutValues(problem.space, { ...trial.curve, value }), effort);
    if ((yield* passedBy(problem, lower, effort)) === null) return lower;
  }
  return null;
}

function heldBack(bound: BoundSpec, passed: number): BoundSpec {
  return passed > 0 ? { ...bound, backOff: bound.backOff + 1.5 * passed * bound.scale } : bound;
}

/** By how much each bound is passed in any proof, in scales; null where all are kept and the goal is reached. */
function* passedBy(problem: Problem, trial: Trial, effort: Effort): Generator<Tick, number[] | null> {
  const passed = problem.bounds.map(() => 0);
  if (!Number.isFinite(trial.cost)) return passed;
  if (!keeps(trial)) return worstOf(problem.bounds, trial.watches, passed);
  for (const { study } of problem.circumstances)
    for (const options of PROOFS) {
      const watch = new BoundWatch(problem.bounds, piecesOf(problem.space, trial.curve), problem.goal);
      const run = simulateSession(withTaper(study, taperOf(problem.space, trial.curve)), {
        ...options,
        observer: watch,
      });
      effort.runs++;
      effort.evaluations += run.statistics.evaluations;
      worstOf(problem.bounds, [watch], passed);
      yield;
    }
  return passed.some((over) => over > 0) ? passed : null;
}

function worstOf(bounds: BoundSpec[], watches: BoundWatch[], passed: number[]): number[] {
  bounds.forEach((bound, b) => {
    for (const { worst } of watches) {
      const shares = worst.length / bounds.length;
      for (let i = b * shares; i < (b + 1) * shares; i++)
        passed[b] = Math.max(passed[b], excess(bound, bound.sign * worst[i]));
    }
  });
  return passed;
}
