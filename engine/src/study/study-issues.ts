import type { z } from 'zod';
import { show, type StudyIssue } from './study-error.ts';

type Issue = z.core.$ZodIssue;

/**
 * What the schema says against a value, as a person reads it; one issue per field at fault.
 *
 * @param json  the value that was judged
 * @param whole what the value is, for what is wrong with it as a whole
 */
export function toIssues(issue: Issue, json: unknown, whole: string): StudyIssue[] {
  if (issue.code === 'unrecognized_keys')
    return issue.keys.map((key) => ({
      path: pathText([...issue.path, key]),
      rule: 'unknown-key',
      message: `${pathText([...issue.path, key])} is not a field of ${withArticle(whole)}`,
    }));
  if (issue.code === 'invalid_union' && issue.errors.length > 0) return unionIssues(issue, json, whole);
  const path = pathText(issue.path);
  const found = valueAt(json, issue.path);
  const { rule, text } = ruleOf(issue, found);
  const value = typeof found === 'object' || found === undefined ? {} : { value: show(found) };
  return [{ path, rule, ...value, message: `${path || whole} ${text}` }];
}

/** Of a union's branches, the complaints of the one that came closest. */
function unionIssues(issue: Issue & { code: 'invalid_union' }, json: unknown, whole: string): StudyIssue[] {
  const depth = (errors: Issue[]) =>
    Math.max(...errors.map((one) => one.path.length * 2 - (one.code === 'unrecognized_keys' ? 1 : 0)));
  const best = [...issue.errors].sort((a, b) => depth(b) - depth(a) || a.length - b.length)[0];
  return best.flatMap((one) => toIssues({ ...one, path: [...issue.path, ...one.path] }, json, whole));
}

function ruleOf(issue: Issue, found: unknown): { rule: string; text: string } {
  const but = found === undefined ? '' : `, but is ${show(found)}`;
  switch (issue.code) {
    case 'custom':
      return { rule: String((issue.params as { rule?: string } | undefined)?.rule ?? 'custom'), text: issue.message };
    case 'too_small':
      return { rule: 'range', text: tooSmall(issue, found, but) };
    case 'too_big':
      return {
        rule: 'range',
        text:
          issue.origin === 'number' || issue.origin === 'int'
            ? `must be at most ${issue.maximum}${but}`
            : `must have at most ${issue.maximum} entries`,
      };
    case 'invalid_type':
      return found === undefined
        ? { rule: 'missing', text: 'is missing' }
        : {
            rule: 'type',
            text: `must be ${issue.expected === 'int' ? 'a whole number' : withArticle(issue.expected)}${but}`,
          };
    case 'invalid_union':
      return { rule: 'choice', text: oneOf((issue as { options?: unknown[] }).options ?? [], but) };
    case 'invalid_value':
      return { rule: 'choice', text: oneOf(issue.values, but) };
    default:
      return { rule: issue.code, text: `${issue.message}${but}` };
  }
}

function withArticle(noun: string): string {
  return `${/^[aeiou]/.test(noun) ? 'an' : 'a'} ${noun}`;
}

function oneOf(options: readonly unknown[], but: string): string {
  const choice = options.map(show).join(' or ');
  return but === '' ? `is missing: give ${choice}` : `must be ${choice}${but}`;
}

function tooSmall(issue: Issue & { code: 'too_small' }, found: unknown, but: string): string {
  if (Array.isArray(found)) return `must have at least ${issue.minimum} rows, but has ${found.length}`;
  return issue.inclusive ? `must be at least ${issue.minimum}${but}` : `must be above ${issue.minimum}${but}`;
}

function valueAt(json: unknown, path: PropertyKey[]): unknown {
  return path.reduce<unknown>((value, key) => (value as Record<PropertyKey, unknown> | undefined)?.[key], json);
}

/** A path as a person writes it: `strategy.taper.points[3].soc`. */
export function pathText(path: PropertyKey[]): string {
  return path.reduce<string>(
    (text, key) => (typeof key === 'number' ? `${text}[${key}]` : text ? `${text}.${String(key)}` : String(key)),
    '',
  );
}
