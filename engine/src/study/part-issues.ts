import { partSchemas } from './schema.ts';
import type { StudyIssue } from './study-error.ts';
import { toIssues } from './study-issues.ts';

export type PartName = keyof typeof partSchemas;

/**
 * Checks one part of a study by itself, without the rules that hold between parts.
 *
 * @param json  a value as parsed from JSON; not changed
 * @returns     one issue per field at fault, its path within the part; none where the part can be used
 */
export function partIssues(part: PartName, json: unknown): StudyIssue[] {
  const result = partSchemas[part].safeParse(json);
  const whole = part === 'thermal' ? 'thermal system' : part;
  return result.success ? [] : result.error.issues.flatMap((issue) => toIssues(issue, json, whole));
}
