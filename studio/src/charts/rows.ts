/** Where a value stands between two rows of a series: row `index` and the share of the way to the next. */
export type RowPlace = { index: number; share: number };

/**
 * Finds a place on a column that never falls. At a doubled row (a jump) the later row counts.
 *
 * @param column  at least one value
 * @param at      clamped to the column's ends
 */
export function placeOn(column: readonly number[], at: number): RowPlace {
  const last = column.length - 1;
  if (at >= column[last]!) return { index: last, share: 0 };
  let low = 0;
  let high = last;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (column[middle]! <= at) low = middle;
    else high = middle;
  }
  const from = column[low]!;
  const width = column[Math.min(low + 1, last)]! - from;
  return { index: low, share: width > 0 ? Math.min(1, Math.max(0, (at - from) / width)) : 0 };
}

/** A column's value at a place, linear between its rows; null where either side is null. */
export function valueAt(column: readonly (number | null)[], { index, share }: RowPlace): number | null {
  const from = column[index] ?? null;
  if (from === null || share === 0) return from;
  const to = column[index + 1] ?? null;
  return to === null ? null : from + (to - from) * share;
}

/** As `valueAt`, for columns without gaps. */
export function numberAt(column: readonly number[], place: RowPlace): number {
  return valueAt(column, place) ?? Number.NaN;
}

/** Running integral of a column over hours, by trapezoids; jumps stand on doubled rows, so none is smeared. */
export function integralOverHours(tS: readonly number[], column: readonly number[]): number[] {
  let sum = 0;
  return column.map((value, i) => {
    if (i > 0) sum += ((value + column[i - 1]!) / 2) * ((tS[i]! - tS[i - 1]!) / 3600);
    return sum;
  });
}
