import { linearRows, toCurve, toPoint, valuesIn } from './taper-space.ts';
import { tryCurve, type Effort, type Problem, type Tick, type Trial } from './trial.ts';

/** A trial with its slopes: cost and every excess per step of each free variable. */
export type LocalModel = {
  trial: Trial;
  x: Float64Array;
  /** Slope of the cost by variable; slopes of the excesses, `excess.length` per variable. Those of variables not free are 0. */
  cost: Float64Array;
  excess: Float64Array[];
  /** Values that hold nothing back: raising them changes nothing. */
  idle: boolean[];
};

/** Steps of the difference quotients: in the logarithm of a value, and in units of soc. Both are far above a run's rounding. */
const VALUE_STEP = -2e-3;
const PLACE_STEP = 4e-3;

/** Whether a value holds the current back anywhere; of a slope it stands between two pieces. */
function idleValues(problem: Problem, { held }: Trial, values: number): boolean[] {
  const between = problem.space.kind === 'slope';
  return Array.from({ length: values }, (_, i) => !held[i] && !(between && held[i + 1]));
}

/** Runs the taper with each free variable moved a little. */
export function* modelAt(
  problem: Problem,
  trial: Trial,
  free: readonly boolean[],
  effort: Effort,
): Generator<Tick, LocalModel> {
  const { space } = problem;
  const x = toPoint(space, trial.curve);
  const values = valuesIn(space, x);
  const rows = linearRows(space, x);
  const cost = new Float64Array(x.length);
  const slopes: Float64Array[] = [];
  for (let i = 0; i < x.length; i++) {
    const slope = new Float64Array(trial.excess.length);
    slopes.push(slope);
    if (!free[i]) continue;
    const usual = i < values ? VALUE_STEP : PLACE_STEP;
    const h = allows(rows, i, usual) ? usual : -usual;
    const moved = Float64Array.from(x);
    moved[i] += h;
    const near = yield* tryCurve(problem, toCurve(space, moved), effort);
    if (!Number.isFinite(near.cost)) continue;
    cost[i] = (near.cost - trial.cost) / h;
    for (let k = 0; k < slope.length; k++) {
      const change = (near.excess[k] - trial.excess[k]) / h;
      slope[k] = Number.isFinite(change) ? change : 0;
    }
  }
  return { trial, x, cost, excess: slopes, idle: idleValues(problem, trial, values) };
}

/** Whether a step of one variable alone keeps order, widths and range; monotone values may pass each other by this little. */
function allows({ a, b }: ReturnType<typeof linearRows>, i: number, h: number): boolean {
  return a.every((row, k) => row[i] * h <= b[k] + 1e-12);
}
