import {
  lengthOf,
  metricBand,
  sensitivityRows,
  sweepMetrics,
  type SensitivityPlan,
  type SweepAxis,
  type SweepResult,
} from '../src/index.ts';
import { CAUTION } from './summary.ts';

const HEADLINES = [
  'minutes10To80',
  'endMin',
  'peakStationPowerKw',
  'meanStationPower10To80Kw',
  'kmAfter20Min',
  'hottestCoreC',
  'lowestAnodeMv',
  'storedKwh',
];
const MOST_REASONS = 5;

/** A sweep on one screen: what was varied, the range of each headline number, what failed, the caution. */
export function sweepSummary(result: SweepResult): string {
  const { plan } = result;
  const lines = [plan.title || 'Untitled sweep', ...body(result), ...failureLines(result), '', CAUTION];
  return `${lines.join('\n')}\n`;
}

function body(result: SweepResult): string[] {
  const { plan } = result;
  switch (plan.kind) {
    case 'grid':
      return [...plan.axes.map(axisLine), '', ...ranges(result)];
    case 'sensitivity':
      return ['', ...tornado(plan, result)];
    case 'spread':
      return [
        `  ${plan.size} runs, seed ${plan.seed}`,
        ...plan.inputs.map(({ label }) => `  ${label}`),
        '',
        ...ranges(result),
      ];
  }
}

function axisLine(axis: SweepAxis): string {
  const ends = axis.kind === 'number' ? [axis.values[0], axis.values.at(-1)!].map(fixed) : [];
  const what =
    axis.kind === 'number' ? `${ends.join(' to ')} ${axis.unit}` : axis.items.map(({ name }) => name).join(', ');
  return `  ${axis.label.padEnd(24)}${lengthOf(axis)}: ${what.trimEnd()}`;
}

function ranges(result: SweepResult): string[] {
  const head = `  ${''.padEnd(24)}${['least', '5 %', 'median', '95 %', 'most'].map((word) => word.padStart(9)).join('')}`;
  const rows = HEADLINES.flatMap((id) => {
    const { label, unit } = sweepMetrics.find((metric) => metric.id === id)!;
    const { percentiles } = metricBand(result, id);
    if (percentiles[0] === null) return [];
    const numbers = result.column(id).filter((value) => !Number.isNaN(value));
    const shown = [least(numbers), percentiles[0], percentiles[2]!, percentiles[4]!, most(numbers)];
    return [`  ${label.padEnd(24)}${shown.map((value) => fixed(value).padStart(9)).join('')} ${unit}`];
  });
  return [head, ...rows];
}

const least = (values: Float64Array): number => values.reduce((a, b) => Math.min(a, b));
const most = (values: Float64Array): number => values.reduce((a, b) => Math.max(a, b));

function tornado(plan: SensitivityPlan, result: SweepResult): string[] {
  const id = Number.isNaN(result.column('minutes10To80')[0]) ? 'endMin' : 'minutes10To80';
  const { label, unit } = sweepMetrics.find((metric) => metric.id === id)!;
  const change = (to: number | null, base: number | null) => (to === null || base === null ? '–' : signed(to - base));
  return [
    `  ${label} [${unit}], against ${fixed(result.column(id)[0])} in the base`,
    ...sensitivityRows(plan, result, id).map(
      (row) =>
        `  ${row.label.padEnd(34)}${`${fixed(row.minusValue)}: ${change(row.minus, row.base)}`.padEnd(22)}${fixed(row.plusValue)}: ${change(row.plus, row.base)}`,
    ),
  ];
}

function failureLines({ failures, failed }: SweepResult): string[] {
  if (failed === 0) return [];
  const counts = new Map<string, number>();
  for (const { message } of failures.values()) counts.set(message, (counts.get(message) ?? 0) + 1);
  const reasons = [...counts].sort(([, a], [, b]) => b - a);
  const shown = reasons.slice(0, MOST_REASONS).map(([message, count]) => `  ${count} × ${message}`);
  const more = reasons.length > MOST_REASONS ? [`  and ${reasons.length - MOST_REASONS} more reasons`] : [];
  return ['', `${failed} cells failed`, ...shown, ...more];
}

const fixed = (value: number): string => String(Number(value.toPrecision(4))).replace('-', '−');
const signed = (value: number): string => `${value > 0 ? '+' : ''}${fixed(value)}`;
