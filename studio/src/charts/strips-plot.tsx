import { useEffect, useLayoutEffect, useRef } from 'react';
import { useIsNight } from '../lib/daylight.ts';
import { loadPlotly, type Plotly, type PlotlyElement } from './plotly.ts';
import type { StripAxis } from './strip-axis.ts';
import type { StripColumns } from './strip-columns.ts';
import type { StripLayout } from './strip-layout.ts';
import { stripsFigure } from './strips-figure.ts';
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
  const plotly = useRef<Plotly | null>(null);
  const color = useRef(tokenReader());
  const isPanning = useRef(false);
  const isNight = useIsNight();

  // Reads the page's tokens anew when day turns to night; the drawing below follows in the same turn.
  useLayoutEffect(() => {
    color.current = tokenReader();
  }, [isNight]);

  // Speaks to Plotly, before the browser paints, so that its lines and the drawing over them change in one frame.
  useLayoutEffect(() => {
    const element = ref.current as PlotlyElement | null;
    if (!element) return;
    let stopped = false;
    const draw = (loaded: Plotly) => {
      plotly.current = loaded;
      // Plotly holds the pointer: it has drawn this range itself, and tells when it lets go.
      if (stopped || isPanning.current) return;
      const zooms = window.matchMedia('(pointer: fine)').matches;
      const figure = stripsFigure({ live, baseline, axis, range, layout, color: color.current, zooms });
      loaded.react(element, figure.data, figure.layout, figure.config).catch(onFailed);
      listen(element, onRange, isPanning);
    };
    if (plotly.current) draw(plotly.current);
    else loadPlotly().then(draw).catch(onFailed);
    return () => {
      stopped = true;
    };
  }, [live, baseline, axis, range, layout, isNight, onRange, onFailed]);

  // Speaks to Plotly: gives back what it holds when the strips leave the page.
  useEffect(() => {
    const element = ref.current;
    return () => {
      if (element) plotly.current?.purge(element);
    };
  }, []);

  return <div ref={ref} className="strips-plot absolute inset-0" />;
}

function listen(element: PlotlyElement, onRange: Props['onRange'], isPanning: { current: boolean }): void {
  for (const event of ['plotly_relayout', 'plotly_relayouting', 'plotly_doubleclick'])
    element.removeAllListeners?.(event);
  element.on?.('plotly_relayouting', (change) => {
    const range = rangeIn(change);
    // A box drawn for a zoom announces its range too, but the axis stands still until it is let go.
    if (!range || element._fullLayout?.xaxis?.range?.[0] !== range[0]) return;
    isPanning.current = true;
    onRange(range);
  });
  element.on?.('plotly_relayout', (change) => {
    const range = rangeIn(change);
    isPanning.current = false;
    if (range) onRange(range);
  });
  element.on?.('plotly_doubleclick', () => onRange(null));
}

function rangeIn(change: Record<string, unknown>): [number, number] | null {
  const from = change['xaxis.range[0]'];
  const to = change['xaxis.range[1]'];
  return typeof from === 'number' && typeof to === 'number' ? [from, to] : null;
}
