// Mean advance per character as a share of the type size, measured on the fonts shipped with the application.
const TEXT_ADVANCE = 0.53;
const MONO_ADVANCE = 0.57;

/** About how wide a label is [px]; enough to keep labels apart. */
export const textWidth = (text: string, size = 12): number => text.length * size * TEXT_ADVANCE;

/** As `textWidth`, in the mono of figures with its tight setting. */
export const figureWidth = (text: string, size = 12): number => text.length * size * MONO_ADVANCE;

/** A bed on which a label is wanted [px]. */
export type Bed = { from: number; to: number; label: string; short: string };

/** Where a bed's label stands: inside it, or under the band on one of two rows, or nowhere. */
export type BedLabel =
  { place: 'inside'; text: string; x: number } | { place: 'below'; text: string; x: number; row: 0 | 1 } | null;

/**
 * Chooses a label per bed: the full name inside, else the short one, else the short one below the band on whichever of
 * two rows is free, else none.
 *
 * @param left   left end of the band [px]; labels below never pass it
 * @param right  right end
 */
export function bedLabels(beds: readonly Bed[], left: number, right: number): BedLabel[] {
  const ends: [number, number] = [Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY];
  return beds.map(({ from, to, label, short }) => {
    const room = to - from - 14;
    const inside = [label, short].find((text) => textWidth(text) <= room);
    if (inside) return { place: 'inside', text: inside, x: from + 9 };
    const half = textWidth(short) / 2;
    const x = Math.min(Math.max((from + to) / 2, left + half), right - half);
    const row = ends.findIndex((end) => x - half > end + 6);
    if (row < 0) return null;
    ends[row as 0 | 1] = x + half;
    return { place: 'below', text: short, x, row: row as 0 | 1 };
  });
}
