/** Plotly cuts a line off this many screens away; a line that reaches farther is left to it. */
const SCREENS_AWAY = 20;

/** Where a line lies inside its strip: ranges of both axes, and the size of the plot area [px]. */
export type TraceFrame = {
  xRange: readonly [number, number];
  yRange: readonly [number, number];
  width: number;
  height: number;
};

/**
 * The path Plotly draws for a line through every row, in its own numbers: pixels from the top left of the strip, to a
 * hundredth.
 *
 * @returns null for a line that Plotly would break or cut off: one with gaps, or one that leaves the strip too far
 */
export function tracePath(
  xs: readonly number[],
  ys: readonly (number | null)[],
  { xRange, yRange, width, height }: TraceFrame,
): string | null {
  const xScale = width / (xRange[1] - xRange[0]);
  const yScale = height / (yRange[0] - yRange[1]);
  let path = '';
  for (let row = 0; row < xs.length; row++) {
    const value = ys[row];
    if (value === null || value === undefined) return null;
    const x = hundredths(xScale * (xs[row]! - xRange[0]));
    const y = hundredths(yScale * (value - yRange[1]));
    if (isFarOff(x, width) || isFarOff(y, height)) return null;
    path += `${row === 0 ? 'M' : 'L'}${x},${y}`;
  }
  return path === '' ? null : path;
}

const hundredths = (px: number) => Math.round(px * 100) / 100;

const isFarOff = (px: number, length: number) => px < -SCREENS_AWAY * length || px > (1 + SCREENS_AWAY) * length;
