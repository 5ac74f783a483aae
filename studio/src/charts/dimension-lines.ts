import type { SessionMetrics } from '@voltiplano/engine';
import { formatQuantity } from '../lib/format.ts';
import { figureWidth } from './label-fit.ts';

/** A duration to be drawn as an engineer dimensions a part. */
export type Dimension = { label: string; fromMin: number; toMin: number };

/** The spans 0–50 and 10–80 %, each only where the session covers it. */
export function dimensionsOf({ minutesToSoc, minutes0To50, minutes10To80 }: SessionMetrics): Dimension[] {
  const spans = [
    { name: '0–50 %', minutes: minutes0To50, toMin: minutesToSoc['50'] },
    { name: '10–80 %', minutes: minutes10To80, toMin: minutesToSoc['80'] },
  ];
  return spans.flatMap(({ name, minutes, toMin }) =>
    minutes === null || toMin === null
      ? []
      : [{ label: `${name}  ${formatQuantity('min', minutes)} min`, fromMin: toMin - minutes, toMin }],
  );
}

/** A dimension line on the sheet [px]: its visible part, the ends in sight, and the middle of its label. */
export type DimensionLine = { from: number; to: number; ends: number[]; labelX: number; labelWidth: number };

/**
 * Fits a dimension between the ends of the plot; null when it lies outside.
 *
 * @param from   start [px], may lie outside
 * @param to     end [px]
 * @param left   left end of the plot
 * @param right  right end
 */
export function dimensionLine(
  label: string,
  from: number,
  to: number,
  left: number,
  right: number,
): DimensionLine | null {
  const start = Math.max(from, left);
  const stop = Math.min(to, right);
  if (stop <= start) return null;
  const labelWidth = figureWidth(label) + 8;
  const beside = stop + 9 + labelWidth / 2;
  const inside = labelWidth < stop - start - 22;
  const fitsBeside = beside + labelWidth / 2 <= right;
  const labelX = inside ? (start + stop) / 2 : fitsBeside ? beside : start - 9 - labelWidth / 2;
  const ends = [from, to].filter((x) => x >= left - 0.5 && x <= right + 0.5);
  return { from: start, to: stop, ends, labelX, labelWidth };
}
