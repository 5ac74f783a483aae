import {
  CELL,
  changesOf,
  curveBands,
  endReasons,
  engineVersion,
  limitCodes,
  metricBand,
  sensitivityRows,
  spreadPercentiles,
  sweepMetrics,
  type SweepMetric,
  type SweepPlan,
  type SweepResult,
} from '../src/index.ts';

const STATUS: Record<number, string> = {
  [CELL.pending]: 'pending',
  [CELL.done]: 'done',
  [CELL.failed]: 'failed',
};

/**
 * Every cell as a row of CSV: its number, its place on each axis (or the values of its inputs), its status, its metrics,
 * and why it failed. Numbers read back to the same double; what a session does not cover is an empty cell.
 */
export function sweepCsv(result: SweepResult): string {
  const { plan } = result;
  const varied = variedNames(plan);
  const ids = plan.columns;
  const header = ['cell', ...varied, 'status', ...ids, 'failure'];
  const columns = ids.map((id) => readable(result, id));
  const rows = Array.from(result.status, (status, index) => [
    index,
    ...variedValues(plan, index, varied),
    STATUS[status],
    ...columns.map((column) => column[index] ?? ''),
    result.failures.get(index)?.message ?? '',
  ]);
  return `${[header, ...rows].map((row) => row.map(csvCell).join(',')).join('\n')}\n`;
}

/** Names of what varies: paths, whose last word ends in the unit, and parts. */
function variedNames(plan: SweepPlan): string[] {
  if (plan.kind === 'grid') return plan.axes.map((axis) => (axis.kind === 'number' ? axis.path : axis.part));
  return plan.inputs.map(({ path }) => path);
}

/** What a cell has at each name; empty where it has the base's. */
function variedValues(plan: SweepPlan, index: number, names: string[]): (string | number)[] {
  const changes = changesOf(plan, index);
  return names.map((name) => {
    const change = changes.find((one) => (one.kind === 'value' ? one.path : one.part) === name);
    if (change === undefined) return '';
    return change.kind === 'value' ? change.value : change.name;
  });
}

/** A column as a person reads it: names in place of codes, null where there is no number. */
function readable(result: SweepResult, id: string): (number | string | null)[] {
  const kind: SweepMetric['kind'] = sweepMetrics.find((metric) => metric.id === id)?.kind ?? 'value';
  return Array.from(result.column(id), (value) => {
    if (Number.isNaN(value)) return null;
    return kind === 'limit' ? limitCodes[value] : kind === 'endReason' ? endReasons[value] : value;
  });
}

/** Quoted where CSV needs it (RFC 4180). */
function csvCell(value: string | number): string {
  const text = String(value);
  return /[",\n\r]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** All of a sweep's results as JSON; a sensitivity adds its rows for each metric, a spread its bands. */
export function sweepJson(result: SweepResult): string {
  const { plan, status, failures, done, failed } = result;
  const columns = Object.fromEntries(plan.columns.map((id) => [id, readable(result, id)]));
  const head = {
    format: 'voltiplano/result',
    version: 1,
    kind: 'sweep',
    engine: engineVersion,
    title: plan.title,
    cells: plan.size,
    done,
    failed,
  };
  const reasons = [...failures].sort(([a], [b]) => a - b).map(([cell, failure]) => ({ cell, ...failure }));
  const states = Array.from(status, (one) => STATUS[one]);
  return `${JSON.stringify({ ...head, ...variedPart(result), metrics: sweepMetrics, status: states, columns, failures: reasons })}\n`;
}

function variedPart(result: SweepResult): object {
  const { plan } = result;
  const ids = sweepMetrics.filter(({ kind }) => kind === 'value').map(({ id }) => id);
  switch (plan.kind) {
    case 'grid':
      return {
        axes: plan.axes.map((axis) =>
          axis.kind === 'number' ? axis : { ...axis, items: axis.items.map(({ name }) => name) },
        ),
      };
    case 'sensitivity':
      return { sensitivity: Object.fromEntries(ids.map((id) => [id, sensitivityRows(plan, result, id)])) };
    case 'spread': {
      const inputs = plan.inputs.map((input) => ({ ...input, samples: Array.from(input.samples) }));
      const metrics = Object.fromEntries(ids.map((id) => [id, metricBand(result, id)]));
      return {
        spread: { seed: plan.seed, inputs, percentiles: spreadPercentiles, metrics, curve: curveBands(result) },
      };
    }
  }
}
