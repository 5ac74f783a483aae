import type { Plotly, PlotlyElement } from './plotly.ts';
import { stripsFigure, stripTraces, type FigureInput, type StripTrace } from './strips-figure.ts';
import { tracePath } from './trace-path.ts';

/** How long the curves stand still before Plotly itself draws what was moved in place. */
const REST_MS = 200;

type Callbacks = {
  /** The part of the axis a drag has chosen; null for all of it. */
  onRange: (range: [number, number] | null) => void;
  onFailed: (error: unknown) => void;
};

type Drawn = { input: FigureInput; traces: StripTrace[] };

/**
 * Plotly's drawing of the strips in one element.
 *
 * Plotly owns axes, zoom and what a line looks like. Its `react` takes some 40 ms, too long for curves that follow a
 * hand; so where nothing but the data and the visible part of the axis has changed, the lines are moved in place,
 * and Plotly follows once they rest, or before a pointer takes hold of the axis.
 */
export class StripsDrawing {
  private readonly element: PlotlyElement;
  private readonly plotly: Plotly;
  private callbacks: Callbacks;
  private drawn: Drawn | null = null;
  /** Plotly's own line elements by uid, as it left them. */
  private lines = new Map<string, Element>();
  private resting: ReturnType<typeof setTimeout> | undefined;
  private isPanning = false;
  private hears = false;

  constructor(element: PlotlyElement, plotly: Plotly, callbacks: Callbacks) {
    this.element = element;
    this.plotly = plotly;
    this.callbacks = callbacks;
  }

  draw(input: FigureInput, callbacks: Callbacks): void {
    this.callbacks = callbacks;
    // Plotly holds the pointer: it has drawn this range itself, and tells when it lets go.
    if (this.isPanning) return;
    const next = { input, traces: stripTraces(input) };
    if (this.drawn && isSameFrame(this.drawn, next) && this.moveLines(this.drawn, next)) {
      this.drawn = next;
      clearTimeout(this.resting);
      this.resting = setTimeout(() => this.settle(), REST_MS);
    } else {
      this.drawn = next;
      this.drawWhole();
    }
  }

  /** Lets Plotly draw what was moved in place, now. */
  settle(): void {
    if (this.resting !== undefined) this.drawWhole();
  }

  purge(): void {
    clearTimeout(this.resting);
    this.plotly.purge(this.element);
  }

  private drawWhole(): void {
    clearTimeout(this.resting);
    this.resting = undefined;
    if (!this.drawn) return;
    const { data, layout, config } = stripsFigure(this.drawn.input);
    this.lines.clear();
    this.plotly.react(this.element, data, layout, config).catch((error: unknown) => this.callbacks.onFailed(error));
    for (const { uid } of this.drawn.traces) {
      const parts = this.element.querySelectorAll(`.trace${uid} .js-line`);
      if (parts.length === 1) this.lines.set(uid, parts[0]!);
    }
    if (!this.hears) this.listen();
  }

  /** Gives every line that changed its new path; false, with nothing moved, where one of them is not that simple. */
  private moveLines(before: Drawn, { input: { range, layout }, traces }: Drawn): boolean {
    const sameRange = before.input.range[0] === range[0] && before.input.range[1] === range[1];
    const moved: [Element, string][] = [];
    for (const [i, { uid, strip, x, y }] of traces.entries()) {
      const last = before.traces[i]!;
      if (sameRange && last.x === x && last.y === y) continue;
      const line = this.lines.get(uid);
      const frame = { xRange: range, yRange: strip.range, width: layout.right - layout.left, height: strip.height };
      const path = tracePath(x, y, frame);
      if (!line?.isConnected || path === null) return false;
      moved.push([line, path]);
    }
    for (const [line, path] of moved) line.setAttribute('d', path);
    return true;
  }

  private listen(): void {
    this.hears = true;
    const { element } = this;
    element.on?.('plotly_relayouting', (change) => {
      const range = rangeIn(change);
      // A box drawn for a zoom announces its range too, but the axis stands still until it is let go.
      if (!range || element._fullLayout?.xaxis?.range?.[0] !== range[0]) return;
      this.isPanning = true;
      this.callbacks.onRange(range);
    });
    element.on?.('plotly_relayout', (change) => {
      const range = rangeIn(change);
      this.isPanning = false;
      if (range) this.callbacks.onRange(range);
    });
    element.on?.('plotly_doubleclick', () => this.callbacks.onRange(null));
  }
}

/** Whether two drawings differ in nothing but their data and the visible part of the axis. */
function isSameFrame(a: Drawn, b: Drawn): boolean {
  return (
    a.input.layout === b.input.layout &&
    a.input.axis === b.input.axis &&
    a.input.color === b.input.color &&
    a.input.zooms === b.input.zooms &&
    a.traces.length === b.traces.length &&
    a.traces.every((trace, i) => trace.uid === b.traces[i]!.uid)
  );
}

function rangeIn(change: Record<string, unknown>): [number, number] | null {
  const from = change['xaxis.range[0]'];
  const to = change['xaxis.range[1]'];
  return typeof from === 'number' && typeof to === 'number' ? [from, to] : null;
}
