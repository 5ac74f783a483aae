import type { LimitCode } from '@voltiplano/engine';

/** A run of rows under one limit; rows inclusive. */
export type LimitSpan = { code: LimitCode; fromRow: number; toRow: number };

/** Spans of a series, in order. A hand-over stands on two rows of one moment, so spans meet without a gap. */
export function limitSpans(limit: readonly LimitCode[]): LimitSpan[] {
  const spans: LimitSpan[] = [];
  limit.forEach((code, row) => {
    const last = spans[spans.length - 1];
    if (last?.code === code) last.toRow = row;
    else spans.push({ code, fromRow: row, toRow: row });
  });
  return spans;
}

/** A span as it lies on an axis. */
export type PlacedSpan = LimitSpan & { from: number; to: number };

/**
 * Places spans on an axis and lets those narrower than `least` pass into the one before them, so that chatter of a
 * few seconds draws no splinters; zooming in brings them back.
 *
 * @param xs     axis value of each row
 * @param least  least width, in axis units
 */
export function placedSpans(spans: readonly LimitSpan[], xs: readonly number[], least: number): PlacedSpan[] {
  const placed: PlacedSpan[] = [];
  for (const span of spans) {
    const from = xs[span.fromRow]!;
    // Up to the next span's first row: some series hand over without doubling the row.
    const to = xs[Math.min(span.toRow + 1, xs.length - 1)]!;
    const last = placed[placed.length - 1];
    if (last && (to - from < least || last.code === span.code)) {
      last.to = to;
      last.toRow = span.toRow;
    } else placed.push({ ...span, from, to });
  }
  return placed;
}

/** Minutes held by each side of the chain. */
export function minutesPerSide(
  minutes: Record<LimitCode, number>,
  sideOf: Record<LimitCode, 'station' | 'vehicle' | 'cell'>,
): Record<'station' | 'vehicle' | 'cell', number> {
  const sums = { station: 0, vehicle: 0, cell: 0 };
  for (const code of Object.keys(minutes) as LimitCode[]) sums[sideOf[code]] += minutes[code];
  return sums;
}
