import { useEffect, useLayoutEffect, useRef } from 'react';
import { useIsNight } from '../lib/daylight.ts';
import { loadPlotly } from './plotly.ts';
import type { StripAxis } from './strip-axis.ts';
import type { StripColumns } from './strip-columns.ts';
import type { StripLayout } from './strip-layout.ts';
import { StripsDrawing } from './strips-drawing.ts';
import { tokenReader } from './tokens.ts';

type Props = {
  live: StripColumns;
  baseline: StripColumns | null;
  axis: StripAxis;
  range: readonly [number, number];
  layout: StripLayout;
  /** The part of the axis a drag has chosen; null for all of it. */
  onRange: (range: [number, number] | null) => void;
  onFailed: (error: unknown) => void;
};

/** Plotly's layer: scales, lines and zoom. */
export function StripsPlot({ live, baseline, axis, range, layout, onRange, onFailed }: Props) {
  const ref = useRef<HTMLDivElement>(null);
  const drawing = useRef<StripsDrawing | null>(null);
  const color = useRef(tokenReader());
  const isNight = useIsNight();

  // Reads the page's tokens anew when day turns to night; the drawing below follows in the same turn.
  useLayoutEffect(() => {
    color.current = tokenReader();
  }, [isNight]);

  // Speaks to Plotly, before the browser paints, so that its lines and the drawing over them change in one frame.
  useLayoutEffect(() => {
    const element = ref.current;
    if (!element) return;
    let stopped = false;
    const draw = (one: StripsDrawing) => {
      const zooms = window.matchMedia('(pointer: fine)').matches;
      one.draw({ live, baseline, axis, range, layout, color: color.current, zooms }, { onRange, onFailed });
    };
    if (drawing.current) draw(drawing.current);
    else
      loadPlotly()
        .then((plotly) => {
          if (stopped) return;
          drawing.current = new StripsDrawing(element, plotly, { onRange, onFailed });
          draw(drawing.current);
        })
        .catch(onFailed);
    return () => {
      stopped = true;
    };
  }, [live, baseline, axis, range, layout, isNight, onRange, onFailed]);

  // Speaks to Plotly: gives back what it holds when the strips leave the page.
  useEffect(
    () => () => {
      drawing.current?.purge();
      drawing.current = null;
    },
    [],
  );

  return (
    <div ref={ref} className="strips-plot absolute inset-0" onPointerDownCapture={() => drawing.current?.settle()} />
  );
}
