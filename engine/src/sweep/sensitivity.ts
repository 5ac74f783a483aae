import type { SessionStudy } from '../study/schema.ts';
import type { SensitivityInput } from '../study/sweep-schema.ts';
import { checkDistinct, checkValue, requireInput, type SweepIssues } from './check-input.ts';
import type { MovedInput, SensitivityPlan } from './sweep-plan.ts';
import type { SweepResult } from './sweep-result.ts';

/** The inputs of a sensitivity with the values they are moved to; what is wrong goes to `issues`. */
export function movedInputs(base: SessionStudy, requests: SensitivityInput[], issues: SweepIssues): MovedInput[] {
  const at = (i: number) => `sweep.sensitivity.inputs[${i}]`;
  checkDistinct(
    issues,
    requests.map(({ path }, i) => ({ at: `${at(i)}.path`, path })),
  );
  return requests.flatMap((request, i) => movedInput(issues, at(i), base, request));
}

function movedInput(issues: SweepIssues, at: string, base: SessionStudy, request: SensitivityInput): MovedInput[] {
  const { path, minus, plus, as } = request;
  const input = requireInput(issues, `${at}.path`, base, path);
  if (input === null) return [];
  const { label, unit, value } = input;
  if (value === null) {
    issues.add(
      `${at}.path`,
      'absent',
      `names ${path}, which the base study leaves out: there is nothing to move`,
      path,
    );
    return [];
  }
  if (minus === 0 && plus === 0) issues.add(`${at}.plus`, 'no-change', 'must be above 0 where minus is 0, but is 0', 0);
  if (as === 'share' && value === 0)
    issues.add(
      `${at}.as`,
      'share-of-nothing',
      `must be "absolute": ${label} is 0 in the base study, and a share of it is 0`,
    );
  const unitOf = as === 'share' ? Math.abs(value) : 1;
  const moved = (by: number) => Number((value + by * unitOf).toPrecision(12));
  const [minusValue, plusValue] = [moved(-minus), moved(plus)];
  checkValue(issues, `${at}.minus`, input, minusValue);
  checkValue(issues, `${at}.plus`, input, plusValue);
  return [{ path, label, unit, baseValue: value, minusValue, plusValue }];
}

/** One bar of a tornado chart. */
export type SensitivityRow = MovedInput & {
  /** The metric in the base, and with the input moved down and up; null where a run failed or does not cover it. */
  base: number | null;
  minus: number | null;
  plus: number | null;
  /** Largest change against the base, without sign; null where neither run has the metric. */
  effect: number | null;
};

/**
 * What each input does to a metric, greatest effect first; inputs without an effect to show come last. Of equal effects
 * the one asked for first stands first.
 */
export function sensitivityRows(plan: SensitivityPlan, result: SweepResult, metric: string): SensitivityRow[] {
  const column = result.column(metric);
  const at = (index: number) => (Number.isNaN(column[index]) ? null : column[index]);
  const base = at(0);
  const rows = plan.inputs.map((input, i) => {
    const minus = at(1 + 2 * i);
    const plus = at(2 + 2 * i);
    const changes = [minus, plus].flatMap((value) => (value === null || base === null ? [] : [Math.abs(value - base)]));
    return { ...input, base, minus, plus, effect: changes.length === 0 ? null : Math.max(...changes) };
  });
  return rows.sort((a, b) => (b.effect ?? -1) - (a.effect ?? -1));
}
