/** A point of a curve over time: minute, and value. */
export type CurvePoint = [number, number];

/** A share of the peak that no small drawing shows. */
const UNSEEN = 0.001;

/**
 * Thins a curve to be drawn small. Ends and peak stay, and both sides of a step, the highest steps first; then, again and
 * again, the point that lies farthest from the curve drawn so far is added, until none would be seen beside it.
 *
 * @param curve  in order of time; a step is two points of one moment
 * @param most   how many points may stay, 8 or more
 */
export function thinCurve(curve: readonly CurvePoint[], most: number): CurvePoint[] {
  if (curve.length <= most) return [...curve];
  const peak = peakOf(curve);
  const unseen = UNSEEN * Math.abs(pointAt(curve, peak)[1]);
  const kept = new Set([0, curve.length - 1, peak]);
  for (const i of stepsOf(curve)) {
    // Steps take half of the points at most: the rest is for the slopes between them.
    if (kept.size > most / 2 - 2) break;
    kept.add(i).add(i + 1);
  }
  const gaps = gapsBetween([...kept].sort((a, b) => a - b)).map((gap) => measure(curve, gap));
  while (kept.size < most) {
    const widest = gaps.reduce((one, other) => (other.off > one.off ? other : one));
    if (widest.off <= unseen) break;
    kept.add(widest.at);
    const halves: Gap[] = [
      [widest.gap[0], widest.at],
      [widest.at, widest.gap[1]],
    ];
    gaps.splice(gaps.indexOf(widest), 1, ...halves.map((half) => measure(curve, half)));
  }
  return [...kept].sort((a, b) => a - b).map((i) => pointAt(curve, i));
}

/** Two kept points, by index, with none kept between them. */
type Gap = [number, number];

function gapsBetween(kept: readonly number[]): Gap[] {
  return kept.slice(1).map((to, i) => [kept[i] ?? 0, to]);
}

/** The point of a gap that lies farthest from the straight line across it. */
function measure(curve: readonly CurvePoint[], gap: Gap): { gap: Gap; at: number; off: number } {
  const [from, to] = gap;
  const [t0, y0] = pointAt(curve, from);
  const [t1, y1] = pointAt(curve, to);
  const slope = t1 > t0 ? (y1 - y0) / (t1 - t0) : 0;
  let [at, off] = [from, 0];
  for (let i = from + 1; i < to; i += 1) {
    const [t, y] = pointAt(curve, i);
    const here = Math.abs(y - (y0 + slope * (t - t0)));
    if (here > off) [at, off] = [i, here];
  }
  return { gap, at, off };
}

function peakOf(curve: readonly CurvePoint[]): number {
  return curve.reduce((best, [, value], i) => (value > pointAt(curve, best)[1] ? i : best), 0);
}

/** First sides of the steps, the highest step first. */
function stepsOf(curve: readonly CurvePoint[]): number[] {
  const height = (i: number) => Math.abs(pointAt(curve, i + 1)[1] - pointAt(curve, i)[1]);
  return curve
    .flatMap(([t], i) => (curve[i + 1]?.[0] === t && height(i) > 0 ? [i] : []))
    .sort((a, b) => height(b) - height(a) || a - b);
}

function pointAt(curve: readonly CurvePoint[], i: number): CurvePoint {
  const point = curve[i];
  if (!point) throw new RangeError(`The curve has no point ${i}.`);
  return point;
}
