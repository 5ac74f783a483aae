import type { StudyResult } from '../src/index.ts';

/**
 * The series of a result as CSV: one header row whose names end in their units, one row per moment.
 * Numbers are written so that reading them gives the same double; null is an empty cell.
 */
export function seriesCsv({ series }: StudyResult): string {
  const names = Object.keys(series);
  const columns = Object.values(series) as (number | string | null)[][];
  const rows = Array.from(series.tS, (_, row) => columns.map((column) => column[row] ?? '').join(','));
  return `${[names.join(','), ...rows].join('\n')}\n`;
}
