import { limitCodes } from '../session/limits.ts';
import { modelAt, type LocalModel } from './local-model.ts';
import { solveQuadraticProgram } from './quadratic-program.ts';
import { linearRows, toCurve, toPoint, valuesIn } from './taper-space.ts';
import { tryCurve, type Effort, type Problem, type Tick, type Trial } from './trial.ts';

export type ImproveOptions = {
  /** Most rounds, each with one run per variable. */
  rounds: number;
  /** Longest first step: share of a value, or quarter of soc. */
  radius: number;
  /** Move the values alone and leave the places where they are. */
  valuesOnly?: boolean;
};

const LONGEST = 0.5;
const SHORTEST = 1e-3;
/** A predicted gain, or three gains in a row, below this share of the cost end the search. */
const ENOUGH = 1e-5;
/** Excesses lower than this, in scales, are out of reach of one step and left out. */
const OUT_OF_REACH = -10;
/** First price of a scale of excess, as a share of the cost; it rises with the multipliers. */
const FIRST_PRICE = 0.5;

/**
 * Sequential quadratic programming in a box-shaped trust region, with an exact penalty on the highest excess (Nocedal & Wright,
 * Numerical Optimization, 2nd ed. 2006, chapter 18): slopes by differences, the curvature of the Lagrangian by damped BFGS.
 *
 * @returns the best taper seen that keeps every bound, or null; and where the search ended, which may pass one by a little
 */
export function* improve(
  problem: Problem,
  start: Trial,
  effort: Effort,
  options: ImproveOptions,
): Generator<Tick, { best: Trial | null; last: Trial }> {
  const { space } = problem;
  const size = toPoint(space, start.curve).length;
  const values = valuesIn(space, toPoint(space, start.curve));
  const free = Array.from({ length: size }, (_, i) => i < values || options.valuesOnly !== true);
  let radius = options.radius;
  let price = FIRST_PRICE * Math.abs(start.cost);
  let best = keeps(start) ? start : null;
  let model = yield* modelAt(problem, start, free, effort);
  let B = firstCurvature(start, size, values, problem);
  let poor = 0;
  const merit = (trial: Trial) => trial.cost + price * over(trial.excess);
  for (let round = 0; round < options.rounds; round++) {
    const step = solveStep(problem, model, B, radius, price, free, null);
    price = Math.max(price, 2 * step.multiplierSum);
    const predicted = merit(model.trial) - step.cost - price * step.over;
    if (!(predicted > ENOUGH * Math.abs(model.trial.cost)) || radius < SHORTEST) break;
    let next = yield* tryCurve(problem, toCurve(space, step.x), effort);
    let gained = merit(model.trial) - merit(next);
    if (!(gained > 0.1 * predicted) && Number.isFinite(next.cost)) {
      const corrected = solveStep(problem, model, B, radius, price, free, { at: next, columns: step.columns });
      const second = yield* tryCurve(problem, toCurve(space, corrected.x), effort);
      if (merit(second) < merit(next)) next = second;
      gained = merit(model.trial) - merit(next);
    }
    if (keeps(next) && (best === null || next.cost < best.cost)) best = next;
    poor = gained > ENOUGH * Math.abs(model.trial.cost) ? 0 : poor + 1;
    if (poor > 2) break;
    const ratio = gained / predicted;
    const reach = step.reach;
    if (!(ratio > 0.25)) radius = 0.35 * Math.min(radius, reach);
    else if (ratio > 0.7 && reach > 0.9 * radius) radius = Math.min(LONGEST, 2 * radius);
    if (!(gained > 0)) continue;
    const before = model;
    model = yield* modelAt(problem, next, free, effort);
    B = updated(B, before, model, step.multipliers);
  }
  return { best, last: model.trial };
}

/** Whether a taper keeps every bound and reaches its goal. */
export const keeps = (trial: Trial): boolean => trial.worst <= 0 && Number.isFinite(trial.cost);

const over = (excess: Float64Array): number => excess.reduce((most, c) => Math.max(most, c), 0);

/** Of ∑ Δsoc/value: the time in each piece, by the logarithm of its value. Places start with half of the cost. */
function firstCurvature({ watches, cost }: Trial, size: number, values: number, { goal }: Problem): number[][] {
  const perMinute = goal.kind === 'least-minutes' ? 1 : Math.abs(cost) / goal.minutes;
  const codes = limitCodes.length;
  return Array.from({ length: size }, (_, i) => {
    const heldS = watches[0].heldS.subarray(i * codes, (i + 1) * codes).reduce((sum, s) => sum + s, 0);
    const time = Math.max(0.02 * Math.abs(cost), (perMinute * heldS) / 60);
    return unit(size, i, i < values ? time : 0.5 * Math.abs(cost));
  });
}

type Step = {
  x: Float64Array;
  /** Moves of the program's variables. */
  columns: number[];
  /** Largest move of any variable. */
  reach: number;
  /** What the model says of cost and highest excess after the step. */
  cost: number;
  over: number;
  multipliers: Map<number, number>;
  multiplierSum: number;
};

/** The best step inside the trust region as the model sees it; `again` corrects the excesses by what a trial of it found. */
function solveStep(
  { space }: Problem,
  model: LocalModel,
  B: number[][],
  radius: number,
  price: number,
  free: readonly boolean[],
  again: { at: Trial; columns: number[] } | null,
): Step {
  const { x, trial } = model;
  const at = where(free);
  // A value that holds nothing back may rise without a change; what the model knows is what lowering it does.
  const rising = at.filter((i) => model.idle[i]);
  const columns = [...at, ...rising];
  const n = columns.length;
  const ofColumns = (row: ArrayLike<number>, last: number) => [...columns.map((i) => row[i]), last];
  const slopesOf = (k: number) => columns.map((i, j) => (j < at.length ? model.excess[i][k] : 0));
  const rows: { a: number[]; b: number }[] = [];
  const linear = linearRows(space, x);
  linear.a.forEach((row, k) => rows.push({ a: ofColumns(row, 0), b: linear.b[k] }));
  columns.forEach((i, j) => {
    rows.push({ a: unit(n + 1, j, 1), b: j < at.length && model.idle[i] ? 0 : radius });
    rows.push({ a: unit(n + 1, j, -1), b: j < at.length ? radius : 0 });
  });
  rows.push({ a: unit(n + 1, n, -1), b: 0 });
  const near = where(trial.excess.map((c) => (c > OUT_OF_REACH ? 1 : 0)));
  for (const k of near) {
    const slopes = slopesOf(k);
    const found = again?.at.excess[k];
    const corrected = found !== undefined && Number.isFinite(found);
    rows.push({ a: [...slopes, -1], b: -(corrected ? found - dot(slopes, again!.columns) : trial.excess[k]) });
  }
  const kept = rows.filter(({ a }) => a.some((entry) => entry !== 0));
  const bend = (j: number) =>
    j < at.length ? [...at.map((i) => B[at[j]][i]), ...rising.map(() => 0), 0] : unit(n + 1, j, 1e-4 * price);
  const program = {
    B: [...columns.map((_, j) => bend(j)), unit(n + 1, n, 1e-6 * price)],
    g: [...columns.map((i, j) => (j < at.length ? model.cost[i] : 0)), price],
    G: kept.map(({ a }) => a),
    h: kept.map(({ b }) => b),
  };
  const { d, multipliers } = solveQuadraticProgram(program);
  const moves = columns.map((_, j) => Math.max(-radius, Math.min(radius, d[j])));
  const moved = Float64Array.from(x);
  columns.forEach((i, j) => (moved[i] += moves[j]));
  const lambda = new Map(near.map((k, r) => [k, multipliers[multipliers.length - near.length + r]]));
  const curvature = columns.reduce((sum, _, j) => sum + moves[j] * dot(program.B[j], moves), 0);
  return {
    x: moved,
    columns: moves,
    reach: moves.reduce((most, one) => Math.max(most, Math.abs(one)), 0),
    cost: trial.cost + dot(program.g, moves) + curvature / 2,
    over: near.reduce((most, k) => Math.max(most, trial.excess[k] + dot(slopesOf(k), moves)), 0),
    multipliers: lambda,
    multiplierSum: [...lambda.values()].reduce((sum, one) => sum + one, 0),
  };
}

/** Indices of the entries that are set. */
function where(list: ArrayLike<boolean | number>): number[] {
  return Array.from(list, (_, i) => i).filter((i) => Boolean(list[i]));
}

/** Scalar product over the entries of the shorter list. */
function dot(a: readonly number[], b: readonly number[]): number {
  let sum = 0;
  for (let i = 0; i < Math.min(a.length, b.length); i++) sum += a[i] * b[i];
  return sum;
}

function unit(size: number, at: number, value: number): number[] {
  const row = new Array<number>(size).fill(0);
  row[at] = value;
  return row;
}

/** Powell's damped BFGS update of the Lagrangian's curvature. */
function updated(B: number[][], before: LocalModel, after: LocalModel, multipliers: Map<number, number>): number[][] {
  const n = B.length;
  const s = Array.from({ length: n }, (_, i) => after.x[i] - before.x[i]);
  const slope = (model: LocalModel, i: number) => {
    let sum = model.cost[i];
    for (const [k, lambda] of multipliers) sum += lambda * model.excess[i][k];
    return sum;
  };
  const y = Array.from({ length: n }, (_, i) => slope(after, i) - slope(before, i));
  const Bs = B.map((row) => row.reduce((sum, b, j) => sum + b * s[j], 0));
  const sBs = s.reduce((sum, si, i) => sum + si * Bs[i], 0);
  const sy = s.reduce((sum, si, i) => sum + si * y[i], 0);
  if (!(sBs > 1e-14)) return B;
  const theta = sy >= 0.2 * sBs ? 1 : (0.8 * sBs) / (sBs - sy);
  const r = y.map((yi, i) => theta * yi + (1 - theta) * Bs[i]);
  const sr = s.reduce((sum, si, i) => sum + si * r[i], 0);
  return B.map((row, i) => row.map((b, j) => b - (Bs[i] * Bs[j]) / sBs + (r[i] * r[j]) / sr));
}
