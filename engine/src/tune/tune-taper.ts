import { StudyError } from '../study/study-error.ts';
import type { TuneRequest } from '../study/tune-request.ts';
import type { Pieces } from './bound-watch.ts';
import { envelopeOf } from './envelope.ts';
import { problemOf } from './problem-of.ts';
import { closestOf, passedOf, readingsOf, worstPassed, type Readings } from './readings.ts';
import { tuneInStages } from './stages.ts';
import { curveOf, taperOf, type Curve } from './taper-space.ts';
import { tradeOffOf } from './trade-off.ts';
import { piecesOf, tryCurve, type Effort, type Problem, type Tick, type Trial } from './trial.ts';
import type { BoundReading, GoalReading, TuneResult } from './tune-result.ts';
import { tunedParts } from './tuned-parts.ts';
import { verdictOf } from './verdict.ts';
import { WorkPlan, type TuneProgress } from './work-plan.ts';

/** A tuning that was called off between two runs. */
export class TuneCancelled extends Error {
  override readonly name = 'TuneCancelled';
  constructor() {
    super('The tuning was cancelled.');
  }
}

export type TuneOptions = {
  /** Called after every run of a session; shares never fall. */
  onProgress?: (progress: TuneProgress) => void;
  /** Asked after every run of a session. */
  isCancelled?: () => boolean;
};

/**
 * Finds the fastest taper of a shape that keeps every bound at every moment, in every condition (engine/MODEL.md, "Tuning a taper").
 * Deterministic: the same request gives the same bytes.
 *
 * @param request  a checked request
 * @throws {StudyError} `REFUSED` where a condition cannot start, its path below `tune`; `BUDGET` or `INCONSISTENT` as a run
 * @throws {TuneCancelled} where `isCancelled` said so
 */
export function tuneTaper(request: TuneRequest, { onProgress, isCancelled }: TuneOptions = {}): TuneResult {
  const steps = tuneSteps(request);
  for (;;) {
    const next = steps.next();
    if (next.done) return next.value;
    onProgress?.(next.value);
    if (isCancelled?.()) throw new TuneCancelled();
  }
}

/** As `tuneTaper`, one run of a session at a time: whoever drives it may pause or leave off between any two. */
export function* tuneSteps(request: TuneRequest): Generator<TuneProgress, TuneResult> {
  const problem = problemOf(request);
  const effort: Effort = { runs: 0, evaluations: 0 };
  const parts = request.shape.kind === 'ledges' ? request.shape.count : request.shape.points;
  const plan = new WorkPlan(problem, parts, request.tradeOff === false ? 0 : (request.tradeOff?.steps ?? 6), effort);
  const whole: Pieces = { kind: 'slope', soc: [problem.space.lo], hi: problem.space.hi };
  const present = yield* plan.during(named(request, readingsOf(problem, null, whole, effort)));
  const envelope = yield* plan.during(envelopeOf(problem, effort));
  const level = yield* plan.during(bestLevel(problem, effort));
  const known = [curveOf(problem.space, request.study.strategy.taper), level.keeping].filter((one) => one !== null);
  const staged = tuneInStages(problem, envelope, parts, known, effort, (stage) => plan.passStage(stage));
  const tuned = yield* plan.during(staged);
  if (tuned === null) return withoutTaper(request, problem, present, level.obstacle, effort);
  const taper = taperOf(problem.space, tuned.curve);
  const proof = yield* plan.during(readingsOf(problem, taper, piecesOf(problem.space, tuned.curve), effort));
  const heldParts = yield* plan.during(tunedParts(problem, tuned, effort));
  plan.passProof();
  const tradeOff = yield* plan.during(tradeOffOf(request, problem, tuned, heldParts, effort));
  const goal = goalReading(problem, proof.goal, present.goal);
  const presentPasses = passedOf(problem.bounds, present.watches);
  return {
    ...headOf(request),
    ...verdictOf({ problem, goal, presentPasses, proof, obstacle: null }),
    taper,
    goal: { ...goal, unit: unitOf(problem) },
    presentPasses,
    closest: closestOf(problem.bounds, proof.watches),
    obstacle: null,
    parts: heldParts,
    proofs: problem.circumstances.map(({ name, weight }, i) => ({
      name,
      weight,
      goal: goalReading(problem, proof.goals[i], present.goals[i]),
      closest: closestOf(problem.bounds, proof.watches, null, i),
      result: proof.results[i],
    })),
    tradeOff,
    effort,
  };
}

const headOf = ({ title, study }: TuneRequest) => ({
  format: 'voltiplano/tune-result' as const,
  version: 1 as const,
  title: title ?? study.title ?? '',
});

const unitOf = ({ goal }: Problem) => (goal.kind === 'least-minutes' ? 'min' : 'kWh');

/** A refusal of one of the conditions, under its own path. */
function* named(request: TuneRequest, readings: Generator<Tick, Readings>): Generator<Tick, Readings> {
  let condition = 0;
  try {
    for (;;) {
      const next = readings.next();
      if (next.done) return next.value;
      condition++;
      yield;
    }
  } catch (error) {
    if (!(error instanceof StudyError)) throw error;
    const own = request.conditions?.[condition];
    const issues = error.issues.map(({ path, message, ...issue }) => ({
      ...issue,
      path: own?.station && path.startsWith('station') ? `tune.conditions[${condition}].${path}` : `tune.study.${path}`,
      message: own ? `In ${own.name ?? `condition ${condition + 1}`}: ${message}` : message,
    }));
    throw new StudyError(error.code, issues);
  }
}

/** Levels, from a trickle to the most, that are tried as one value for all soc. */
const LEVELS = 8;

/**
 * The fastest constant taper that keeps the bounds, if one does; else the bound that stands in the way of all of them, as the
 * one that comes nearest meets it (null where some keep the bounds but do not reach the goal).
 */
function* bestLevel(
  problem: Problem,
  effort: Effort,
): Generator<Tick, { keeping: Curve | null; obstacle: BoundReading | null }> {
  const { kind, lo, hi, least, most } = problem.space;
  const soc = kind === 'ledges' ? [lo] : [lo, hi];
  let best: Trial | null = null;
  let nearest: Trial | null = null;
  for (let i = 0; i < LEVELS; i++) {
    const value = least * (most / least) ** (i / (LEVELS - 1));
    const trial = yield* tryCurve(problem, { soc, value: soc.map(() => value) }, effort);
    if (trial.worst <= 0 && Number.isFinite(trial.cost) && (best === null || trial.cost < best.cost)) best = trial;
    if (nearest === null || trial.worst < nearest.worst) nearest = trial;
  }
  return { keeping: best?.curve ?? null, obstacle: nearest === null ? null : worstPassed(problem.bounds, nearest) };
}

function goalReading(problem: Problem, tuned: number, present: number): GoalReading {
  const less = problem.goal.kind === 'least-minutes';
  const shown = (value: number) => (Number.isFinite(value) ? (less ? value : -value) : null);
  const gained = Number.isFinite(tuned) && Number.isFinite(present) ? present - tuned : null;
  return { tuned: shown(tuned), present: shown(present), gained };
}

function withoutTaper(
  request: TuneRequest,
  problem: Problem,
  present: Readings,
  obstacle: BoundReading | null,
  effort: Effort,
): TuneResult {
  const goal = goalReading(problem, Infinity, present.goal);
  const presentPasses = passedOf(problem.bounds, present.watches);
  return {
    ...headOf(request),
    ...verdictOf({ problem, goal, presentPasses, proof: null, obstacle }),
    taper: null,
    goal: { ...goal, unit: unitOf(problem) },
    presentPasses,
    closest: [],
    obstacle,
    parts: [],
    proofs: [],
    tradeOff: null,
    effort,
  };
}
