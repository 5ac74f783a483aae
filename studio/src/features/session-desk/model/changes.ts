import type { SessionStudyInput } from '@voltiplano/engine';
import { valueAt } from '../../../lib/study-path.ts';

/**
 * Paths of every field in which two studies differ; a table, a part or a name counts once.
 * What a person typed and what stands in the file are compared, not filled-in defaults.
 */
export function changedPaths(study: SessionStudyInput, baseline: SessionStudyInput): string[] {
  return differing(study, baseline, '').filter((path) => path !== 'title');
}

function differing(a: unknown, b: unknown, path: string): string[] {
  if (Object.is(a, b) || JSON.stringify(a) === JSON.stringify(b)) return [];
  if (!isPlainObject(a) || !isPlainObject(b)) return [path];
  const names = new Set([...Object.keys(a), ...Object.keys(b)]);
  return [...names].flatMap((name) => differing(a[name], b[name], path ? `${path}.${name}` : name));
}

function isPlainObject(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

/** Whether one value differs from the baseline's; false without a baseline. */
export function isMoved(value: unknown, baseline: SessionStudyInput | null, path: string): boolean {
  return baseline !== null && JSON.stringify(value ?? null) !== JSON.stringify(valueAt(baseline, path) ?? null);
}
