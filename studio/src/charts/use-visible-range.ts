import { useCallback, useMemo, useState } from 'react';

type Range = readonly [number, number];

/** The visible part of an axis: all of it until somebody zooms, and again whenever the axis changes its meaning. */
export function useVisibleRange(whole: Range, axis: string) {
  const [chosen, setChosen] = useState<{ axis: string; range: Range } | null>(null);
  const zoomed = chosen !== null && chosen.axis === axis;
  const range = useMemo(() => (chosen?.axis === axis ? chosen.range : whole), [chosen, axis, whole]);
  const setRange = useCallback(
    (next: Range | null) => setChosen(next && next[1] > next[0] ? { axis, range: next } : null),
    [axis],
  );
  const zoomAbout = useCallback(
    (value: number, factor: number) => setRange(zoomedRange(range, whole, value, factor)),
    [setRange, range, whole],
  );
  return { range, zoomed, setRange, zoomAbout };
}

/** Scales a range about a value, inside the whole; null for the whole. */
export function zoomedRange(range: Range, whole: Range, value: number, factor: number): Range | null {
  const width = (range[1] - range[0]) * factor;
  if (width >= whole[1] - whole[0]) return null;
  const share = (value - range[0]) / (range[1] - range[0]);
  const from = Math.min(Math.max(value - share * width, whole[0]), whole[1] - width);
  return [from, from + width];
}

/** Moves a range by a share of its width, inside the whole. */
export function shiftedRange(range: Range, whole: Range, share: number): Range {
  const width = range[1] - range[0];
  const from = Math.min(Math.max(range[0] + share * width, whole[0]), whole[1] - width);
  return [from, from + width];
}
