import type { Config, Data, Layout } from 'plotly.js-dist-min';

/** What the charts use of Plotly; everything else stays behind this door. */
export type Plotly = {
  react: (element: HTMLElement, data: Data[], layout: Partial<Layout>, config: Partial<Config>) => Promise<unknown>;
  purge: (element: HTMLElement) => void;
  toImage: (element: HTMLElement, options: { format: 'svg'; width: number; height: number }) => Promise<string>;
};

export type PlotlyFigure = { data: Data[]; layout: Partial<Layout>; config: Partial<Config> };

/** An element Plotly has drawn in. */
export type PlotlyElement = HTMLElement & {
  on?: (event: string, listener: (change: Record<string, unknown>) => void) => void;
  removeAllListeners?: (event: string) => void;
  /** What is drawn now; while the axis is panned its range moves here first. */
  _fullLayout?: { xaxis?: { range?: readonly number[] } };
};

let loading: Promise<Plotly> | undefined;

/** Loads Plotly, once for the whole page and never before the first chart wants it. */
export function loadPlotly(): Promise<Plotly> {
  loading ??= import('plotly.js-dist-min').then(
    (module) => module.default as unknown as Plotly,
    (error: unknown) => {
      // The next chart may try again: the connection may be back.
      loading = undefined;
      throw error;
    },
  );
  return loading;
}
