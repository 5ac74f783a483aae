export type Point = readonly [x: number, y: number];

/** An SVG path through points [px], to a tenth of a pixel. */
export function linePath(points: readonly Point[]): string {
  let path = '';
  for (const [x, y] of points) path += `${path === '' ? 'M' : 'L'}${tenths(x)} ${tenths(y)}`;
  return path;
}

// Half the time of toFixed, and these are drawn at every turn.
const tenths = (px: number) => Math.round(px * 10) / 10;
