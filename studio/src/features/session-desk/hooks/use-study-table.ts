import type { SessionStudyInput, StudyIssue } from '@voltiplano/engine';
import type { Grid } from '../../../components/fields/grid.ts';
import type { GridEdit } from '../../../components/fields/table-edits.ts';
import type { CellIssue } from '../../../components/fields/table-issues.tsx';
import type { TemperatureUnit } from '../../../lib/units.ts';
import { issuesOf } from '../model/derived.ts';
import { issueSentence } from '../../../lib/issue-text.ts';
import { isWithin, valueAt } from '../../../lib/study-path.ts';
import { cellMeasure, cellOfPath, tableAt, type TableSpec } from '../../../lib/table-specs.ts';
import { useDesk, useDispatch } from './use-desk.ts';

type Taper = SessionStudyInput['strategy']['taper'];

/** Everything the editor of one table shows; undefined where no such table is in the study. */
export function useStudyTable(path: string, temperature: TemperatureUnit) {
  const dispatch = useDispatch();
  const taper = useDesk(({ sheet }) => sheet.draft.study.strategy.taper);
  const value = useDesk(({ sheet }) => valueAt(sheet.draft.study, path));
  const waiting = useDesk(({ sheet }) => sheet.draft.pending[path]);
  const baseline = useDesk(({ sheet }) => sheet.baseline);
  const allIssues = useDesk(({ sheet }) => issuesOf(sheet.draft));
  const spec = tableAt(path, taper);
  if (!spec) return undefined;
  const grid = Array.isArray(waiting) ? waiting : spec.toGrid(value);
  const before = baseline && isSameKind(taper, baseline, path) ? spec.toGrid(valueAt(baseline, path)) : null;
  const found = allIssues.filter((issue) => isWithin(issue.path, path));
  const { issues, general } = placed(found, spec, grid, temperature);
  return {
    spec,
    grid,
    issues,
    general,
    meanwhile: waiting !== undefined ? 'The curves still use the last good table.' : undefined,
    isMoved: (row: number, column: number) => before !== null && grid[row]?.[column] !== before[row]?.[column],
    onEdit: ({ grid: next, label, typingAt }: GridEdit) =>
      dispatch({ type: 'entry', path, entry: next, label, ...(typingAt ? { typingAt: `${path} ${typingAt}` } : {}) }),
    onLeave: () => dispatch({ type: 'leave-field' }),
  };
}

/** A table is compared with the baseline's only where both hold the same kind of numbers. */
function isSameKind(taper: Taper, baseline: SessionStudyInput, path: string): boolean {
  if (!path.startsWith('strategy.taper')) return true;
  const kind = (one: Taper) => (one.shape === 'none' ? one.shape : `${one.shape} ${one.unit}`);
  return kind(taper) === kind(baseline.strategy.taper);
}

/** Sorts issues into those of a cell and those of the table as a whole. */
function placed(found: StudyIssue[], spec: TableSpec, grid: Grid, temperature: TemperatureUnit) {
  const issues: CellIssue[] = [];
  const general: string[] = [];
  for (const issue of found) {
    const cell = cellOfPath(spec, grid, issue.path);
    const measure = cell && cellMeasure(spec, cell.row, cell.column);
    const sentence = issueSentence(issue, measure, temperature);
    if (cell) issues.push({ ...cell, sentence });
    else general.push(sentence);
  }
  return { issues, general };
}
