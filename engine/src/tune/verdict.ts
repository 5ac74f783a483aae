import type { Readings } from './readings.ts';
import { tuneBounds } from '../study/tune-bounds.ts';
import type { Problem } from './trial.ts';
import type { BoundReading, GoalReading, TuneResult, TuneVerdict } from './tune-result.ts';

/** A gain below this share of the goal is none. */
const NO_GAIN = 5e-4;

type Found = {
  problem: Problem;
  goal: GoalReading;
  presentPasses: BoundReading[];
  /** Runs of the tuned taper; null where there is none. */
  proof: Readings | null;
  obstacle: BoundReading | null;
};

/** The verdict on a tuning and the sentence that says it. */
export function verdictOf(found: Found): Pick<TuneResult, 'verdict' | 'message'> {
  const { problem, goal, presentPasses, proof, obstacle } = found;
  if (proof === null) return obstacle === null ? notReached(problem) : infeasible(problem, obstacle);
  const unit = problem.goal.kind === 'least-minutes' ? 'min' : 'kWh';
  const value = `${fixed(goal.tuned!, 2)} ${unit}`;
  if (presentPasses.length > 0) {
    const passes = presentPasses.map((one) => sentenceOf(problem, one)).join('; ');
    return says('tuned', `The tuned taper takes ${value} and keeps every bound. The present one does not: ${passes}.`);
  }
  if (goal.gained === null) return says('tuned', `The tuned taper takes ${value}. The present one does not get there.`);
  if (goal.gained > NO_GAIN * Math.abs(goal.tuned!))
    return says(
      'tuned',
      `The tuned taper takes ${value}: ${fixed(goal.gained, 2)} ${unit} better than the present one.`,
    );
  return says('nothing-to-gain', `No taper of this shape is faster than the present one. ${heldBy(proof)}`);
}

const says = (verdict: TuneVerdict, message: string) => ({ verdict, message });

/** Which limits hold the tuned runs, the longest first. */
function heldBy({ results }: Readings): string {
  const minutes = new Map<string, number>();
  for (const { metrics } of results)
    for (const [code, held] of Object.entries(metrics.limitMinutes)) minutes.set(code, (minutes.get(code) ?? 0) + held);
  const held = [...minutes].filter(([, min]) => min >= 0.05).sort((a, b) => b[1] - a[1]);
  return `It is held by ${held.map(([code, min]) => `${code} ${fixed(min, 1)} min`).join(', ')}.`;
}

function infeasible(problem: Problem, obstacle: BoundReading) {
  return says(
    'infeasible',
    `No taper keeps the bounds. The one that comes nearest passes one: ${sentenceOf(problem, obstacle)}.`,
  );
}

function notReached({ goal, circumstances }: Problem) {
  const aim = goal.kind === 'least-minutes' ? `soc ${goal.toSoc}` : `${goal.minutes} min`;
  const where = circumstances.length > 1 ? ' in every condition' : '';
  const message =
    `No taper that keeps the bounds reaches ${aim}${where}: the session’s end current or its longest time ends it before. ` +
    'Lower the goal’s soc or the strategy’s cutoffA, or lengthen session.maxMin.';
  return says('not-reached', message);
}

/** A bound that is passed: which, where, when and by how much. */
function sentenceOf({ circumstances }: Problem, one: BoundReading): string {
  const { label } = tuneBounds[one.bound];
  const where = circumstances.length > 1 ? `, in ${circumstances[one.condition].name}` : '';
  const value = `${fixed(one.value, one.digits)} ${one.unit}`;
  const by = `${fixed(-one.margin, Math.max(one.digits, 1))} ${one.unit}`;
  return (
    `${label.toLowerCase()} ${fixed(one.limit, one.digits)} ${one.unit}: ${value} at ${fixed(one.atMin, 1)} min ` +
    `and soc ${fixed(one.atSoc, 3)}${where}, ${by} past it`
  );
}

const fixed = (value: number, digits: number) => value.toFixed(digits).replace('-', '−');
