import type { Data, Layout } from 'plotly.js-dist-min';
import { formatNumber } from '../lib/format.ts';
import type { PlotlyFigure } from './plotly.ts';
import { axisColumn, type StripAxis } from './strip-axis.ts';
import type { StripColumns } from './strip-columns.ts';
import type { PlacedStrip, StripLayout } from './strip-layout.ts';
import type { LineSpec } from './strip-specs.ts';
import { tickDigits } from './ticks.ts';

export type FigureInput = {
  live: StripColumns;
  baseline: StripColumns | null;
  axis: StripAxis;
  /** Visible part of the axis. */
  range: readonly [number, number];
  layout: StripLayout;
  /** Resolves a colour token; Plotly knows no CSS variables. */
  color: (token: string) => string;
  /** True where a drag zooms; on touch it scrolls the page instead. */
  zooms: boolean;
};

/** One line of the figure: its data and the strip it lies in. */
export type StripTrace = {
  /** The same for the same line of every run, so that Plotly keeps its element. */
  uid: string;
  strip: PlacedStrip;
  x: readonly number[];
  y: readonly (number | null)[];
  ink: string;
  widthPx: number;
  dash: readonly number[];
};

/** One figure with all strips over one axis: Plotly's part is scales, lines and zoom. */
export function stripsFigure(input: FigureInput): PlotlyFigure {
  const { strips } = input.layout;
  return {
    data: stripTraces(input).map((trace) => traceData(trace, strips.indexOf(trace.strip), input.color)),
    layout: figureLayout(input),
    config: { displayModeBar: false, doubleClick: false, responsive: false, showTips: false, scrollZoom: false },
  };
}

/** The lines of the figure, the baseline's behind. */
export function stripTraces({ live, baseline, axis, layout }: FigureInput): StripTrace[] {
  const phone = layout.size === 'phone';
  const traces = (columns: StripColumns, run: string, keep: (line: LineSpec) => boolean) =>
    layout.strips.flatMap((strip) =>
      strip.spec.lines.filter(keep).map((line): StripTrace => {
        const { ink, widthPx, dash } = run === 'live' ? line : BASELINE_STYLE;
        const uid = `${run}-${line.column}`;
        return { uid, strip, x: axisColumn(columns, axis), y: columns[line.column], ink, widthPx, dash };
      }),
    );
  return [
    ...(baseline ? traces(baseline, 'baseline', (line) => line.onBaseline === true) : []),
    ...traces(live, 'live', (line) => !(line.wideOnly && phone)),
  ];
}

const BASELINE_STYLE = { ink: '--base', widthPx: 1.6, dash: [] };

const yName = (index: number) => (index === 0 ? 'y' : `y${index + 1}`);

function traceData({ uid, x, y, ink, widthPx, dash }: StripTrace, index: number, color: FigureInput['color']): Data {
  return {
    type: 'scatter',
    mode: 'lines',
    uid,
    x,
    y,
    yaxis: yName(index),
    // Every row is drawn: a line moved in place (strips-drawing.ts) is then the line Plotly itself would draw.
    line: {
      color: color(ink),
      width: widthPx,
      simplify: false,
      ...(dash.length > 0 && { dash: dash.map((px) => `${px}px`).join(',') }),
    },
  } as Data;
}

function figureLayout({ layout, range, color, zooms }: FigureInput): Partial<Layout> {
  const { width, height, left, right, plotTop, plotBottom, strips } = layout;
  const last = Math.max(0, strips.length - 1);
  const yAxes = strips.map((strip, index) => [`yaxis${index === 0 ? '' : index + 1}`, yAxis(strip, layout, color)]);
  return {
    width,
    height,
    margin: { l: left, r: width - right, t: plotTop, b: height - plotBottom, pad: 0 },
    paper_bgcolor: 'rgba(0,0,0,0)',
    plot_bgcolor: 'rgba(0,0,0,0)',
    showlegend: false,
    hovermode: false,
    dragmode: zooms ? 'zoom' : false,
    font: { family: cssFont(color('--f-num')), size: 12, color: color('--ink2') },
    xaxis: {
      // Said outright, so that Plotly need not look through the data.
      type: 'linear',
      autorange: false,
      anchor: yName(last),
      range: [...range],
      showgrid: false,
      showticklabels: false,
      showline: false,
      zeroline: false,
      ticks: '',
    },
    ...(Object.fromEntries(yAxes) as Partial<Layout>),
  } as Partial<Layout>;
}

function yAxis(strip: PlacedStrip, { plotTop, plotBottom }: StripLayout, color: (token: string) => string) {
  const whole = plotBottom - plotTop;
  const from = 1 - (strip.top + strip.height - plotTop) / whole;
  const { tickValues } = strip;
  const digits = tickDigits((tickValues[1] ?? 0) - (tickValues[0] ?? 0));
  return {
    domain: [Math.max(0, from), Math.min(1, from + strip.height / whole)],
    anchor: 'x',
    type: 'linear',
    autorange: false,
    range: strip.range,
    fixedrange: true,
    showgrid: false,
    zeroline: false,
    showline: true,
    linecolor: color('--ink2'),
    linewidth: 0.8,
    tickmode: 'array',
    tickvals: tickValues,
    ticktext: tickValues.map((value) => formatNumber(value, digits)),
    ticks: 'outside',
    ticklen: 4,
    tickwidth: 0.8,
    tickcolor: color('--ink2'),
    automargin: false,
  };
}

/** Plotly reads a font list without quotes. */
const cssFont = (family: string) => family.replaceAll("'", '').replaceAll('"', '');
