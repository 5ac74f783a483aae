import { formatNumber } from '../lib/format.ts';

/** The words for more and for less of each kind of number. */
export const differenceWords = {
  duration: ['slower', 'faster'],
  temperature: ['hotter', 'cooler'],
  amount: ['more', 'less'],
  margin: ['farther', 'closer'],
} as const;

export type DifferenceKind = keyof typeof differenceWords;

/**
 * A difference as amount and word: "1.6 slower". "same" where both read the same; null where either is not there.
 *
 * @param digits  decimals shown; the difference is that of the rounded values, so that it agrees with them
 */
export function differenceInWords(
  value: number | null,
  baseline: number | null,
  digits: number,
  kind: DifferenceKind,
): string | null {
  if (value === null || baseline === null) return null;
  const scale = 10 ** digits;
  const steps = Math.round(value * scale) - Math.round(baseline * scale);
  if (steps === 0) return 'same';
  const [more, less] = differenceWords[kind];
  return `${formatNumber(Math.abs(steps) / scale, digits)} ${steps > 0 ? more : less}`;
}
