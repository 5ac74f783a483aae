export type Point = readonly [x: number, y: number];

/** An SVG path through points [px], to a tenth of a pixel. */
export function linePath(points: readonly Point[]): string {
  return points.map(([x, y], i) => `${i === 0 ? 'M' : 'L'}${x.toFixed(1)} ${y.toFixed(1)}`).join('');
}
