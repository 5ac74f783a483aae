import type { SessionStudy } from '../study/schema.ts';
import { show, type StudyIssue } from '../study/study-error.ts';
import { pathText } from '../study/study-issues.ts';
import { inputAt, isFactor, keysOf, quantityPathOf, type StudyInput } from './input-path.ts';

/** Gathers what is wrong with a sweep; each issue has the path of the field within the sweep file. */
export class SweepIssues {
  readonly list: StudyIssue[] = [];

  add(path: string, rule: string, text: string, value?: unknown): void {
    this.list.push({ path, rule, message: `${path} ${text}`, ...(value === undefined ? {} : { value: show(value) }) });
  }
}

/** The input that a path names in the base study; null, with an issue, where there is none. */
export function requireInput(issues: SweepIssues, at: string, study: SessionStudy, path: string): StudyInput | null {
  const input = inputAt(study, path);
  if (input !== null) return input;
  if (quantityPathOf(path) === null && !isFactor(path)) {
    issues.add(at, 'unknown-input', `must name a numeric input of a study, but is ${show(path)}`, path);
    return null;
  }
  issues.add(at, 'absent', `names ${path}, which the base study does not have${missingPart(study, path)}`, path);
  return null;
}

function missingPart(study: SessionStudy, path: string): string {
  if (path === 'strategy.taper.factor') return ': its taper has no values (shape "none")';
  const keys = keysOf(path);
  let value: unknown = study;
  for (let i = 0; i + 1 < keys.length; i++) {
    value = (value as Record<string | number, unknown>)[keys[i]];
    if (value === undefined) return `: it has no ${pathText(keys.slice(0, i + 1))}`;
  }
  return '';
}

/** Adds an issue, naming input, value and rule, unless an input may take a value. */
export function checkValue(
  issues: SweepIssues,
  at: string,
  { label, unit, quantity }: StudyInput,
  value: number,
): void {
  const { min, max, above, integer } = quantity;
  const withUnit = (bound: number) => (unit ? `${bound} ${unit}` : String(bound));
  const say = (rule: string, text: string) =>
    issues.add(at, rule, `(${label}) must be ${text}, but is ${value}`, value);
  if (above ? !(value > min) : !(value >= min)) say('range', `${above ? 'above' : 'at least'} ${withUnit(min)}`);
  else if (value > max) say('range', `at most ${withUnit(max)}`);
  else if (integer && !Number.isInteger(value)) say('whole-number', 'a whole number');
}

/** Adds an issue where two entries vary the same input. */
export function checkDistinct(issues: SweepIssues, entries: { at: string; path: string }[]): void {
  entries.forEach(({ at, path }, i) => {
    const first = entries.findIndex((other) => other.path === path);
    if (first < i) issues.add(at, 'repeated', `varies ${path}, as does ${entries[first].at}`, path);
  });
}
