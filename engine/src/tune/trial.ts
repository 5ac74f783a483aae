import { simulateSession } from '../session/simulate-session.ts';
import type { SessionStudy, Taper } from '../study/schema.ts';
import type { TuneGoal } from '../study/tune-request.ts';
import { StudyError } from '../study/study-error.ts';
import { excess, type BoundSpec } from './bound-specs.ts';
import { BoundWatch, pieceCount, taperHeld, type Pieces } from './bound-watch.ts';
import { taperOf, type Curve, type TaperSpace } from './taper-space.ts';

/** One set of circumstances in which a taper must hold, as the study that runs it. */
export type Circumstance = { name: string; weight: number; study: SessionStudy };

/** What is tuned: the space of tapers, the bounds, the goal, and the circumstances. */
export type Problem = {
  space: TaperSpace;
  bounds: BoundSpec[];
  goal: TuneGoal;
  circumstances: Circumstance[];
};

/** What one taper does in every circumstance. */
export type Trial = {
  curve: Curve;
  /** Weighted goal, less is better: minutes, or the negative of kWh; ∞ where it is not reached. */
  goal: number;
  /** The goal with a small weight on all of the session, so that the rest of the taper is not left to chance. */
  cost: number;
  /** Excess over each bound, in scales, with its back-off: circumstance by bound by share of a piece; −∞ where nothing was seen. */
  excess: Float64Array;
  /** Highest excess without the back-off. */
  worst: number;
  /** Whether the taper held anything back in each piece, in any circumstance. */
  held: boolean[];
  watches: BoundWatch[];
};

/** Yielded after every run of a session. */
export type Tick = void;

/** Share of the session's whole length in the cost. */
const REST = 1e-4;
/** Looks this far apart tell a peak from a parabola through three of them, also where the anode's potential steps [s]. */
const LOOK_S = 5;

/** Counts what a tuning costs. */
export type Effort = { runs: number; evaluations: number };

export const withTaper = (study: SessionStudy, taper: Taper): SessionStudy => ({
  ...study,
  strategy: { ...study.strategy, taper },
});

export const piecesOf = ({ kind, hi }: TaperSpace, { soc }: Curve): Pieces => ({ kind, soc, hi });

/** Runs a taper in every circumstance. */
export function* tryCurve(problem: Problem, curve: Curve, effort: Effort): Generator<Tick, Trial> {
  const { space, bounds, goal, circumstances } = problem;
  const taper = taperOf(space, curve);
  const pieces = piecesOf(space, curve);
  const watches: BoundWatch[] = [];
  let goalSum = 0;
  let endSum = 0;
  let weights = 0;
  for (const { study, weight } of circumstances) {
    const watch = new BoundWatch(bounds, pieces, goal);
    const endMin = runQuietly(withTaper(study, taper), watch, effort);
    yield;
    watches.push(watch);
    goalSum += weight * goalOf(goal, watch, endMin);
    endSum += weight * endMin;
    weights += weight;
  }
  const perMinute = goal.kind === 'least-minutes' ? REST : (REST * Math.abs(goalSum / weights)) / goal.minutes;
  const reached = goalSum / weights;
  return {
    curve,
    goal: reached,
    cost: reached + (perMinute * endSum) / weights,
    ...excessOf(bounds, watches),
    held: Array.from({ length: pieceCount(pieces) }, (_, i) => watches.some((watch) => taperHeld(watch, i))),
    watches,
  };
}

/** Runs one session; the minutes it took, or ∞ where it cannot be integrated. */
function runQuietly(study: SessionStudy, watch: BoundWatch, effort: Effort): number {
  effort.runs++;
  try {
    const { result, statistics } = simulateSession(study, { everyS: LOOK_S, observer: watch });
    effort.evaluations += statistics.evaluations;
    return result.metrics.endMin;
  } catch (error) {
    if (error instanceof StudyError) return Infinity;
    throw error;
  }
}

/** The goal of one run, less is better; ∞ where it was not reached. */
export function goalOf(goal: TuneGoal, watch: BoundWatch, endMin: number): number {
  if (!Number.isFinite(endMin)) return Infinity;
  const value = goal.kind === 'least-minutes' ? (watch.toS - watch.fromS) / 60 : -watch.energyKwh;
  return Number.isNaN(value) ? Infinity : value;
}

function excessOf(bounds: BoundSpec[], watches: BoundWatch[]): { excess: Float64Array; worst: number } {
  const each = watches[0].worst.length;
  const all = new Float64Array(each * watches.length);
  let worst = -Infinity;
  watches.forEach((watch, w) => {
    const shares = each / bounds.length;
    for (let i = 0; i < each; i++) {
      const bound = bounds[Math.floor(i / shares)];
      const over = excess(bound, bound.sign * watch.worst[i]);
      worst = Math.max(worst, over);
      all[w * each + i] = over + bound.backOff / bound.scale;
    }
  });
  return { excess: all, worst };
}
