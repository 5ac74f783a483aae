import type { LimitCode } from '@voltiplano/engine';
import { fringeOf } from './fringe.ts';
import { linePath, type Point } from './svg-path.ts';

/** Power of a session over time, thinned to be drawn small, and what held it. */
export type PowerSection = {
  endMin: number;
  /** Minute and station power [kW], in order of time. */
  points: readonly (readonly [min: number, kw: number])[];
  limits: readonly { limit: LimitCode; fromMin: number; toMin: number }[];
};

export type SectionFrame = {
  /** Minutes that the width stands for. */
  untilMin: number;
  /** Width and height of the ground [px]. */
  width: number;
  height: number;
  /** Depth of the beds under the curve [px]. */
  depth: number;
};

export type SectionShape = {
  /** Power at the upper edge [kW]. */
  scaleKw: number;
  line: string;
  /** What lies under the curve. */
  ground: string;
  beds: { limit: LimitCode; fromMin: number; path: string }[];
  /** Whether the session goes on past the right edge. */
  isCut: boolean;
  /** Whether the curve still stands high at the right edge, where the scale is written otherwise. */
  isHighAtEnd: boolean;
};

/** Narrower beds show no hatch [px]: they pass into the one before. */
const LEAST_BED = 2;
/** Power at the upper edge: the first of these, or of their doubles, that the curve stays under [kW]. */
const LEAST_SCALE_KW = 25;
/** Room of the words at the right edge, as a share of the width and of the scale. */
const WORDS_FROM = 0.75;
const WORDS_ABOVE = 0.5;

/** The paths of a section. Curves share a few scales, so that most can be compared by eye. */
export function sectionShape(section: PowerSection, frame: SectionFrame): SectionShape {
  const { untilMin, width, height, depth } = frame;
  const scaleKw = scaleOf(section.points);
  const lastMin = Math.min(untilMin, section.endMin);
  const x = (min: number) => (width * min) / untilMin;
  const y = (kw: number) => height * (1 - Math.max(0, kw) / scaleKw);
  const placed = (fromMin: number, toMin: number) =>
    cutOut(section.points, fromMin, toMin).map(([min, kw]): Point => [x(min), y(kw)]);
  const curve = placed(0, lastMin);
  const feet: Point[] =
    curve.length === 0
      ? []
      : [
          [curve.at(-1)![0], height],
          [curve[0]![0], height],
        ];
  const least = (LEAST_BED * untilMin) / width;
  const beds = tidied(section.limits, lastMin, least).map(({ limit, fromMin, toMin }) => {
    const top = placed(fromMin, toMin);
    const span = { code: limit, fromRow: 0, toRow: top.length - 1 };
    const { upper, lower } = fringeOf(span, top.map(first), top.map(second), depth, height);
    return { limit, fromMin, path: closed([...upper, ...lower.reverse()]) };
  });
  return {
    scaleKw,
    line: linePath(curve),
    ground: closed([...curve, ...feet]),
    beds,
    isCut: section.endMin > untilMin,
    isHighAtEnd: placed(untilMin * WORDS_FROM, lastMin).some(([, top]) => top < height * (1 - WORDS_ABOVE)),
  };
}

const first = ([x]: Point) => x;
const second = ([, y]: Point) => y;
const closed = (points: readonly Point[]) => (points.length === 0 ? '' : `${linePath(points)}Z`);

function scaleOf(points: PowerSection['points']): number {
  const most = points.reduce((peak, [, kw]) => Math.max(peak, kw), 0);
  let scale = LEAST_SCALE_KW;
  while (scale < most) scale *= 2;
  return scale;
}

/** Points of the curve between two minutes, with its height at both of them; the inner side of a jump at an end. */
function cutOut(points: PowerSection['points'], fromMin: number, toMin: number): (readonly [number, number])[] {
  if (toMin < fromMin) return [];
  const inner = points.filter(([min]) => min > fromMin && min < toMin);
  const start = kwAt(points, fromMin, 'after');
  const end = kwAt(points, toMin, 'before');
  if (start === null || end === null) return inner;
  return [[fromMin, start], ...inner, [toMin, end]];
}

/** @param side  which of the two heights counts where the curve jumps */
function kwAt(points: PowerSection['points'], min: number, side: 'before' | 'after'): number | null {
  if (points.length === 0) return null;
  const after = points.findIndex((point) => (side === 'after' ? point[0] > min : point[0] >= min));
  if (after < 0) return points.at(-1)![1];
  if (after === 0) return points[0]![1];
  const [left, right] = [points[after - 1]!, points[after]!];
  return left[1] + ((right[1] - left[1]) * (min - left[0])) / (right[0] - left[0] || 1);
}

/** Spans inside the frame; one too narrow to be seen passes into the one before it. */
function tidied(limits: PowerSection['limits'], lastMin: number, leastMin: number) {
  const spans: { limit: LimitCode; fromMin: number; toMin: number }[] = [];
  for (const { limit, fromMin, toMin: whole } of limits) {
    const toMin = Math.min(whole, lastMin);
    const last = spans.at(-1);
    if (toMin <= fromMin) continue;
    if (last && (last.limit === limit || toMin - fromMin < leastMin)) last.toMin = toMin;
    else spans.push({ limit, fromMin, toMin });
  }
  return spans;
}
