import type { z } from 'zod';
import { StudyError, show, studyError, type StudyIssue } from './study-error.ts';
import { sessionStudySchema, studySchema, tripStudySchema, type SessionStudy, type Study } from './schema.ts';

const KINDS = { session: sessionStudySchema, trip: tripStudySchema } as const;

/**
 * Reads a study from the text of a study file.
 *
 * @throws {StudyError} `NOT_JSON` with the place, else as `parseStudy`
 */
export function parseStudyText(text: string): Study {
  let json: unknown;
  try {
    json = JSON.parse(text);
  } catch (error) {
    throw studyError('NOT_JSON', '', 'json', `Cannot read this file as JSON: ${(error as Error).message}`);
  }
  return parseStudy(json);
}

/**
 * Checks a study against the schema and fills defaults in.
 *
 * @param json  a value as parsed from a study file; not changed
 * @throws {StudyError} `NOT_A_STUDY` or `INVALID_STUDY`, one issue per field at fault
 */
export function parseStudy(json: unknown): Study {
  const head = json as { format?: unknown; kind?: unknown } | null;
  if (typeof json !== 'object' || json === null || Array.isArray(json) || head?.format !== 'voltiplano/study') {
    const message = `Not a study: format must be "voltiplano/study", but is ${show(head?.format)}`;
    throw studyError('NOT_A_STUDY', 'format', 'format', message, head?.format);
  }
  const kind = head.kind;
  const schema = kind === 'session' || kind === 'trip' ? KINDS[kind] : studySchema;
  const result = schema.safeParse(json);
  if (result.success) return result.data;
  throw new StudyError(
    'INVALID_STUDY',
    result.error.issues.flatMap((issue) => toIssues(issue, json)),
  );
}

/** As `parseStudy`, for a caller that needs a session. */
export function parseSessionStudy(json: unknown): SessionStudy {
  const study = parseStudy(json);
  if (study.kind === 'session') return study;
  throw studyError('UNSUPPORTED', 'kind', 'kind', `Expected a session study, but kind is "${study.kind}"`, study.kind);
}

type Issue = z.core.$ZodIssue;

function toIssues(issue: Issue, json: unknown): StudyIssue[] {
  if (issue.code === 'unrecognized_keys')
    return issue.keys.map((key) => ({
      path: pathText([...issue.path, key]),
      rule: 'unknown-key',
      message: `${pathText([...issue.path, key])} is not a field of a study`,
    }));
  if (issue.code === 'invalid_union' && issue.errors.length > 0) return unionIssues(issue, json);
  const path = pathText(issue.path);
  const found = valueAt(json, issue.path);
  const { rule, text } = ruleOf(issue, found);
  const value = typeof found === 'object' || found === undefined ? {} : { value: show(found) };
  return [{ path, rule, ...value, message: `${path || 'study'} ${text}` }];
}

/** Of a union's branches, the complaints of the one that came closest. */
function unionIssues(issue: Issue & { code: 'invalid_union' }, json: unknown): StudyIssue[] {
  const depth = (errors: Issue[]) =>
    Math.max(...errors.map((one) => one.path.length * 2 - (one.code === 'unrecognized_keys' ? 1 : 0)));
  const best = [...issue.errors].sort((a, b) => depth(b) - depth(a) || a.length - b.length)[0];
  return best.flatMap((one) => toIssues({ ...one, path: [...issue.path, ...one.path] }, json));
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
            text: `must be ${issue.expected === 'int' ? 'a whole number' : `${/^[aeiou]/.test(issue.expected) ? 'an' : 'a'} ${issue.expected}`}${but}`,
          };
    case 'invalid_union':
      return { rule: 'choice', text: oneOf((issue as { options?: unknown[] }).options ?? [], but) };
    case 'invalid_value':
      return { rule: 'choice', text: oneOf(issue.values, but) };
    default:
      return { rule: issue.code, text: `${issue.message}${but}` };
  }
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
