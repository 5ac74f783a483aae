/** What a person needs to know to type one numeric input, and what the schema holds it to. */
export type Quantity = {
  /** Plain name on screen. */
  label: string;
  /** Unit as written in the study file; '' for a pure number or a fraction. */
  unit: string;
  /** Least and greatest value allowed. */
  min: number;
  max: number;
  /** True where the least value itself is refused (a quantity that must be above it). */
  above?: true;
  integer?: true;
  /** Usual range in practice, and where it comes from. */
  usual?: readonly [number, number];
  source?: string;
  /** What it is, in a sentence or two. */
  what: string;
};

export const PRACTICE = 'common practice, no published source';

/** One row of the table of quantities; the last word says that the least value is refused, or that only whole numbers are taken. */
export function quantity(
  label: string,
  unit: string,
  min: number,
  max: number,
  what: string,
  usual: readonly [number, number],
  source: string,
  rule?: 'above' | 'integer',
): Quantity {
  return { label, unit, min, max, what, usual, source, ...(rule ? { [rule]: true } : {}) };
}
