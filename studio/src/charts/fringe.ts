import type { LimitSpan } from './limit-spans.ts';
import type { Point } from './svg-path.ts';

/** The two edges of the bed that hangs under a curve while one limit holds it. */
export type Fringe = { upper: Point[]; lower: Point[] };

/**
 * Hangs a bed under a curve.
 *
 * @param xs     place of each row along the axis [px]
 * @param ys     height of the curve at each row [px, down]
 * @param depth  depth of the bed [px]
 * @param foot   the ground it never passes [px]
 */
export function fringeOf(
  span: LimitSpan,
  xs: readonly number[],
  ys: readonly number[],
  depth: number,
  foot: number,
): Fringe {
  const upper: Point[] = [];
  for (let row = span.fromRow; row <= span.toRow; row++) upper.push([xs[row]!, ys[row]!]);
  const lower = upper.map(([x, y]): Point => [x, Math.min(foot, y + depth)]);
  return { upper, lower };
}
