import type { BoundName } from '../study/tune-bounds.ts';
import type { TuneRequest } from '../study/tune-request.ts';
import { boundSpecs } from './bound-specs.ts';
import { certify } from './certify.ts';
import { improve } from './improve.ts';
import { isBetter } from './stages.ts';
import { taperOf } from './taper-space.ts';
import { tryCurve, type Effort, type Problem, type Tick, type Trial } from './trial.ts';
import type { TradeOffPoint, TunedPart, TuneResult } from './tune-result.ts';

const ROUNDS = 16;
const DEFAULT_STEPS = 6;

/** How far a bound is tightened over the curve where the request does not say, in its own unit or as a share of it. */
const SPANS: Record<BoundName, { by: number } | { share: number }> = {
  hottestCoreMaxC: { by: 5 },
  hottestSurfaceMaxC: { by: 5 },
  lowestAnodeMinMv: { by: 15 },
  highestCellMaxV: { by: 0.05 },
  inletMaxC: { by: 5 },
  stationPowerMaxKw: { share: 0.2 },
  stationCurrentMaxA: { share: 0.2 },
};

/**
 * The goal against one bound, tightened step by step. Each point starts from the one before it and is tuned and proved like the
 * first; a tighter taper that turns out better than a looser one takes its place there, since it keeps that bound too.
 */
export function* tradeOffOf(
  request: TuneRequest,
  problem: Problem,
  tuned: Trial,
  parts: readonly TunedPart[],
  effort: Effort,
): Generator<Tick, TuneResult['tradeOff']> {
  const asked = request.tradeOff === undefined ? { steps: DEFAULT_STEPS } : request.tradeOff;
  if (asked === false) return null;
  const name = ('bound' in asked ? asked.bound : undefined) ?? longestHolding(parts) ?? problem.bounds[0].name;
  const spec = problem.bounds.find((bound) => bound.name === name)!;
  const usual = SPANS[name];
  const span = ('span' in asked ? asked.span : undefined) ?? ('by' in usual ? usual.by : usual.share * spec.limit);
  const steps = asked.steps;
  const margins = Array.from({ length: steps }, (_, k) => (span * k) / (steps - 1));
  const limits = margins.map((margin) => Number((spec.limit - spec.sign * margin).toPrecision(12)));
  const trials: (Trial | null)[] = [tuned];
  for (let k = 1; k < steps; k++) {
    const before = trials[k - 1];
    trials.push(before === null ? null : yield* tightened(request, problem, name, limits[k], before, effort));
  }
  for (let k = steps - 1; k > 1; k--) {
    const [looser, tighter] = [trials[k - 1], trials[k]];
    if (tighter !== null && (looser === null || isBetter(tighter, looser))) trials[k - 1] = tighter;
  }
  const points = trials.map((trial, k) => pointOf(problem, trial, limits[k], margins[k]));
  return { bound: name, unit: spec.unit, points };
}

function* tightened(
  request: TuneRequest,
  problem: Problem,
  name: BoundName,
  limit: number,
  before: Trial,
  effort: Effort,
): Generator<Tick, Trial | null> {
  const studies = problem.circumstances.map(({ study }) => study);
  const tighter = { ...problem, bounds: boundSpecs({ ...request.bounds, [name]: limit }, studies) };
  const start = yield* tryCurve(tighter, before.curve, effort);
  const { best, last } = yield* improve(tighter, start, effort, { rounds: ROUNDS, radius: 0.1 });
  const certified = yield* certify(tighter, last, effort);
  if (certified !== null || best === null) return certified;
  return yield* certify(tighter, best, effort);
}

function pointOf({ space, goal }: Problem, trial: Trial | null, limit: number, margin: number): TradeOffPoint {
  if (trial === null) return { limit, margin, goal: null, taper: null };
  return {
    limit,
    margin,
    goal: goal.kind === 'least-minutes' ? trial.goal : -trial.goal,
    taper: taperOf(space, trial.curve),
  };
}

/** The bound that holds the taper for most of its time. */
function longestHolding(parts: readonly TunedPart[]): BoundName | null {
  const minutes = new Map<BoundName, number>();
  for (const { holds, taperMinutes } of parts)
    if (holds.by === 'bound') minutes.set(holds.bound, (minutes.get(holds.bound) ?? 0) + taperMinutes);
  return [...minutes].sort((a, b) => b[1] - a[1])[0]?.[0] ?? null;
}
