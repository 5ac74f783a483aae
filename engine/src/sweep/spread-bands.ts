import { curveColumns, curveSocPercent } from './sweep-metrics.ts';
import type { SweepResult } from './sweep-result.ts';

/** The percentiles that a spread is shown by. */
export const spreadPercentiles = [5, 25, 50, 75, 95] as const;

/** How one number of a spread is distributed. */
export type Band = {
  /** Values at `spreadPercentiles`; null where no run has one. */
  percentiles: (number | null)[];
  /** Runs that have the number. */
  count: number;
};

/** A metric's distribution over the runs finished so far; runs that failed or do not cover it are left out of it. */
export function metricBand(result: SweepResult, metric: string): Band {
  const sorted = result
    .column(metric)
    .filter((value) => !Number.isNaN(value))
    .sort();
  return {
    percentiles: spreadPercentiles.map((percent) => (sorted.length === 0 ? null : percentile(sorted, percent / 100))),
    count: sorted.length,
  };
}

/** Bands of station power [kW] around the curve, one per soc of `curveSocPercent`. */
export function curveBands(result: SweepResult): (Band & { socPercent: number })[] {
  return curveColumns.map((column, i) => ({ socPercent: curveSocPercent[i], ...metricBand(result, column) }));
}

/**
 * Sample quantile, linear between order statistics (type 7 of Hyndman & Fan 1996).
 *
 * @param sorted  rising, at least one value
 * @param p       0 to 1
 */
export function percentile(sorted: ArrayLike<number>, p: number): number {
  const at = (sorted.length - 1) * p;
  const low = Math.floor(at);
  const high = Math.min(sorted.length - 1, low + 1);
  return sorted[low] + (at - low) * (sorted[high] - sorted[low]);
}
