import type { SessionStudy } from '../study/schema.ts';
import { parseJson } from '../study/parse-study.ts';
import { show, StudyError, studyError } from '../study/study-error.ts';
import { toIssues } from '../study/study-issues.ts';
import { sweepStudySchema, type SweepStudy } from '../study/sweep-schema.ts';
import { SweepIssues } from './check-input.ts';
import { gridAxes } from './grid-plan.ts';
import { hashText } from './hash-text.ts';
import { movedInputs } from './sensitivity.ts';
import { sampledInputs } from './spread.ts';
import { curveColumns, metricColumns } from './sweep-metrics.ts';
import { lengthOf, type SweepPlan } from './sweep-plan.ts';

/**
 * Reads a sweep from the text of a sweep file.
 *
 * @throws {StudyError} `NOT_JSON` with the place, else as `parseSweep`
 */
export function parseSweepText(text: string): SweepPlan {
  return parseSweep(parseJson(text));
}

/**
 * Checks a sweep file and works out every run it asks for.
 *
 * @param json  a value as parsed from a sweep file; not changed
 * @throws {StudyError} `NOT_A_STUDY` or `INVALID_STUDY`, one issue per field at fault: `sweep.axes[0].values[3]`
 */
export function parseSweep(json: unknown): SweepPlan {
  const head = json as { format?: unknown; kind?: unknown } | null;
  if (typeof json !== 'object' || json === null || head?.format !== 'voltiplano/study' || head.kind !== 'sweep') {
    const message = `Not a sweep: format must be "voltiplano/study" and kind "sweep", but are ${show(head?.format)} and ${show(head?.kind)}`;
    throw studyError('NOT_A_STUDY', 'kind', 'kind', message, head?.kind);
  }
  const read = sweepStudySchema.safeParse(json);
  if (!read.success)
    throw new StudyError(
      'INVALID_STUDY',
      read.error.issues.flatMap((issue) => toIssues(issue, json, 'sweep')),
    );
  const issues = new SweepIssues();
  const plan = planOf(read.data, issues);
  if (issues.list.length > 0) throw new StudyError('INVALID_STUDY', issues.list);
  return plan;
}

function planOf({ title = '', base, sweep }: SweepStudy, issues: SweepIssues): SweepPlan {
  if (sweep.axes) {
    const axes = gridAxes(base, sweep.axes, issues);
    const size = axes.reduce((product, axis) => product * lengthOf(axis), 1);
    return { kind: 'grid', title, base, size, axes, columns: metricColumns, hash: hashOf(base, 'grid', axes) };
  }
  if (sweep.sensitivity) {
    const inputs = movedInputs(base, sweep.sensitivity.inputs, issues);
    const hash = hashOf(base, 'sensitivity', inputs);
    return { kind: 'sensitivity', title, base, size: 1 + 2 * inputs.length, inputs, columns: metricColumns, hash };
  }
  const { inputs: requests, runs, seed } = sweep.spread!;
  const inputs = sampledInputs(base, sweep.spread!, issues);
  const columns = [...metricColumns, ...curveColumns];
  const hash = hashOf(base, 'spread', { requests, runs, seed });
  return { kind: 'spread', title, base, size: runs, inputs, seed, columns, hash };
}

/** A hash of all that decides a cell's numbers; the base's title does not. */
function hashOf(base: SessionStudy, kind: string, what: unknown): string {
  const { title: _, ...parts } = base;
  return hashText(JSON.stringify([kind, parts, what]));
}
