import type { StripSpec } from './strip-specs.ts';
import { ticks } from './ticks.ts';

/** Room of the sheet: `phone` below 560 px, `middle` below 860 px, else `wide`. */
export type SheetSize = 'phone' | 'middle' | 'wide';

export type PlacedStrip = {
  spec: StripSpec;
  range: [number, number];
  tickValues: number[];
  /** Plot area of the strip [px from the top of the sheet]. */
  top: number;
  height: number;
  /** Height of a value [px]. */
  y: (value: number) => number;
};

export type StripLayout = {
  size: SheetSize;
  width: number;
  height: number;
  /** Left and right end of every plot area [px]. */
  left: number;
  right: number;
  strips: PlacedStrip[];
  plotTop: number;
  plotBottom: number;
  bandTop: number;
  bandHeight: number;
  rowsTop: number;
  rowHeight: number;
};

/** Height of the dimension lines above the first strip. */
export const DIMENSIONS_HEIGHT = 48;

const LEVEL_ROWS = { phone: 3, middle: 4, wide: 4 } as const;
const GUTTERS = { phone: [40, 8], middle: [112, 148], wide: [112, 192] } as const;

/** Places strips, limit band and level rows on a sheet of a given width [px]. */
export function stripLayout(
  width: number,
  strips: readonly { spec: StripSpec; range: [number, number] }[],
): StripLayout {
  const size: SheetSize = width < 560 ? 'phone' : width < 860 ? 'middle' : 'wide';
  const phone = size === 'phone';
  const [gutterLeft, gutterRight] = GUTTERS[size];
  let y = DIMENSIONS_HEIGHT;
  const placed = strips.map(({ spec, range }) => {
    const top = y + (phone ? titleHeight(spec) : 0);
    const strip = placeStrip(spec, range, top, spec.heights[phone ? 1 : 0]);
    y = top + strip.height + (phone ? 6 : 12);
    return strip;
  });
  const bandTop = y + (phone ? 4 : 2);
  const bandHeight = phone ? 45 : 60;
  const rowsTop = bandTop + bandHeight + 30;
  const rowHeight = 19;
  return {
    size,
    width,
    height: rowsTop + LEVEL_ROWS[size] * rowHeight + 12,
    left: gutterLeft,
    right: Math.max(gutterLeft + 40, width - gutterRight),
    strips: placed,
    plotTop: placed[0]?.top ?? DIMENSIONS_HEIGHT,
    plotBottom: y - (phone ? 6 : 12),
    bandTop,
    bandHeight,
    rowsTop,
    rowHeight,
  };
}

/** On a phone the name and the readings stand above each strip; four readings take a line of their own. */
function titleHeight(spec: StripSpec): number {
  return spec.lines.length > 2 ? 40 : 18;
}

function placeStrip(spec: StripSpec, range: [number, number], top: number, height: number): PlacedStrip {
  const [from, to] = range;
  return {
    spec,
    range,
    tickValues: ticks(from, to, spec.tickCount),
    top,
    height,
    y: (value) => top + height * (1 - (value - from) / (to - from)),
  };
}
