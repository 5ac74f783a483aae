import { useEffect, useMemo, useRef, type PointerEvent } from 'react';
import type { StripLayout } from './strip-layout.ts';

/**
 * Lets the cursor follow the pointer over the plot areas, at most once per frame.
 *
 * @param onValue  the axis value under the pointer
 * @returns        handlers for the sheet
 */
export function usePointerCursor(
  layout: StripLayout,
  range: readonly [number, number],
  onValue: (axisValue: number) => void,
) {
  const frame = useRef(0);
  // Speaks to the browser: a frame asked for is not drawn once the strips have left.
  useEffect(() => () => cancelAnimationFrame(frame.current), []);
  return useMemo(() => {
    const follow = (event: PointerEvent<HTMLElement>) => {
      const box = event.currentTarget.getBoundingClientRect();
      const px = event.clientX - box.left;
      if (px < layout.left - 4 || px > layout.right + 4) return;
      const share = Math.min(1, Math.max(0, (px - layout.left) / (layout.right - layout.left)));
      cancelAnimationFrame(frame.current);
      frame.current = requestAnimationFrame(() => onValue(range[0] + share * (range[1] - range[0])));
    };
    return { onPointerMove: follow, onPointerDown: follow };
  }, [layout, range, onValue]);
}
