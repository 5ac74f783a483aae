import type { SessionStudy } from '../study/schema.ts';
import type { DistributedInput } from '../study/sweep-schema.ts';
import { checkDistinct, checkValue, requireInput, type SweepIssues } from './check-input.ts';
import { hashText } from './hash-text.ts';
import type { StudyInput } from './input-path.ts';
import { quantileOf } from './quantiles.ts';
import { seededRandom, shuffled } from './random.ts';
import type { SampledInput } from './sweep-plan.ts';

/**
 * Samples of a spread's inputs by Latin hypercube (McKay, Beckman & Conover 1979): each input has one value in each of
 * `runs` slices of equal probability, in an order of its own. Each input draws from its own source, seeded by seed and
 * path, so that one more input leaves the samples of the others as they are.
 */
export function sampledInputs(
  base: SessionStudy,
  { inputs, runs, seed }: { inputs: DistributedInput[]; runs: number; seed: number },
  issues: SweepIssues,
): SampledInput[] {
  const at = (i: number) => `sweep.spread.inputs[${i}]`;
  checkDistinct(
    issues,
    inputs.map(({ path }, i) => ({ at: `${at(i)}.path`, path })),
  );
  return inputs.flatMap((request, i) => {
    const input = checkedInput(issues, at(i), base, request);
    if (input === null || issues.list.length > 0) return [];
    const { path, label, unit, value, quantity } = input;
    const quantile = quantileOf(request, value ?? NaN, quantity.min, quantity.max);
    return [{ path, label, unit, samples: latinHypercube(quantile, runs, seedOf(seed, path)) }];
  });
}

const seedOf = (seed: number, path: string): number => (seed ^ Number.parseInt(hashText(path).slice(0, 8), 16)) >>> 0;

function latinHypercube(quantile: (p: number) => number, runs: number, seed: number): Float64Array {
  const random = seededRandom(seed);
  const slices = shuffled(runs, random);
  // Half a rounding away from 0, where some quantities are not allowed and a normal quantile is infinite.
  return Float64Array.from(slices, (slice) => quantile((slice + Math.max(random(), 1e-9)) / runs));
}

function checkedInput(
  issues: SweepIssues,
  at: string,
  base: SessionStudy,
  request: DistributedInput,
): StudyInput | null {
  const input = requireInput(issues, `${at}.path`, base, request.path);
  if (input === null) return null;
  if (input.quantity.integer)
    issues.add(
      `${at}.path`,
      'whole-number',
      `must name an input that takes any number, but ${input.label} takes whole ones`,
    );
  const middle = request.distribution === 'normal' ? 'mean' : 'mode';
  if (request.distribution !== 'uniform') {
    const value = (request.distribution === 'normal' ? request.mean : request.mode) ?? input.value;
    if (value === null)
      issues.add(`${at}.${middle}`, 'missing', `is missing: the base study leaves ${input.label} out`);
    else checkValue(issues, `${at}.${middle}`, input, value);
  }
  if (request.distribution !== 'normal') checkEnds(issues, at, input, request);
  return input;
}

function checkEnds(
  issues: SweepIssues,
  at: string,
  input: StudyInput,
  request: Exclude<DistributedInput, { distribution: 'normal' }>,
): void {
  const { from, to } = request;
  checkValue(issues, `${at}.from`, input, from);
  checkValue(issues, `${at}.to`, input, to);
  if (!(to > from)) issues.add(`${at}.to`, 'must-lie-above', `must lie above from (${from}), but is ${to}`, to);
  if (request.distribution !== 'triangular') return;
  const mode = request.mode ?? input.value;
  if (mode === null || (mode >= from && mode <= to)) return;
  issues.add(`${at}.mode`, 'range', `must lie between from (${from}) and to (${to}), but is ${mode}`, mode);
}
