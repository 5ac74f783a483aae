import type { SessionResult } from '@voltiplano/engine';
import { useCallback, useId, useMemo, useState, type ReactNode, type Ref } from 'react';
import { useUnits, type Units } from '../lib/units.ts';
import { limitLabel } from './limits.ts';
import { placedSpans } from './limit-spans.ts';
import { LevelRows } from './level-rows.tsx';
import { CursorSlider } from './cursor-slider.tsx';
import { sessionNotes, type StripNote } from './notes.ts';
import { placeOn } from './rows.ts';
import { StripAnnotations } from './strip-annotations.tsx';
import {
  axisColumn,
  axisValueAtMinute,
  baselinePlace,
  fullRange,
  minuteAtAxisValue,
  type StripAxis,
} from './strip-axis.ts';
import { stripColumns } from './strip-columns.ts';
import { StripCursor } from './strip-cursor.tsx';
import { StripGrounds } from './strip-grounds.tsx';
import { stripLayout } from './strip-layout.ts';
import { StripReadings } from './strip-readings.tsx';
import { stripSpecs, type ShownBounds, type StripKey } from './strip-specs.ts';
import { StripsPlot } from './strips-plot.tsx';
import { taperLine, type TaperTable } from './taper-line.ts';
import { usePointerCursor } from './use-pointer-cursor.ts';
import { shiftedRange, useVisibleRange } from './use-visible-range.ts';
import { useSteady } from './use-steady.ts';
import { useWidth } from './use-width.ts';
import { ZoomWords } from './zoom-words.tsx';

/** Bounds of the strategy, in the engine's units; those left out are not drawn. */
export type StrategyBounds = { ceilingV?: number; marginMv?: number; hotFromC?: number; hotToC?: number };

type Props = {
  result: SessionResult;
  /** A run kept in grey behind the live one. */
  baseline?: SessionResult | null;
  axis: StripAxis;
  hidden?: ReadonlySet<StripKey>;
  /** Minutes since plug-in, whichever the axis; null where nobody has placed it yet. */
  cursor: number | null;
  onCursor: (minute: number) => void;
  /** The curves are those of an older study: drawn faint. */
  stale?: boolean;
  /** A newer run is under way; stale curves without one wait for an input to be mended. */
  working?: boolean;
  taper?: TaperTable | null;
  bounds?: StrategyBounds;
  notes?: readonly StripNote[];
  /** Stands in the plot instead of curves that cannot be trusted: what failed, and one action. */
  failed?: ReactNode;
  /** The whole drawing, for export. */
  ref?: Ref<HTMLDivElement>;
};

const NO_KEYS: ReadonlySet<StripKey> = new Set();
const NO_BOUNDS: StrategyBounds = {};
const NO_NOTES: readonly StripNote[] = [];

/** Power, current, voltage, temperatures and anode potential over one shared axis, with everything that is ours on top. */
export function SessionStrips(props: Props) {
  const { ref, failed } = props;
  const [frame, width] = useWidth<HTMLDivElement>();
  return (
    <div ref={frame}>
      <div ref={ref} className="strips" role="group" aria-label={`Strips over ${props.axis}`}>
        {width > 0 && <StripsSheet {...props} width={width} />}
        {failed && <div className="strips-message">{failed}</div>}
      </div>
    </div>
  );
}

function StripsSheet(props: Props & { width: number }) {
  const { result, baseline = null, axis, hidden = NO_KEYS, cursor, onCursor, stale = false, width, failed } = props;
  const { bounds = NO_BOUNDS, notes = NO_NOTES, taper = null } = props;
  const prefix = `${useId()}-`;
  const units = useUnits();
  const [plotError, setPlotError] = useState<unknown>(null);

  const live = useMemo(() => stripColumns(result, units), [result, units]);
  const grey = useMemo(() => (baseline ? stripColumns(baseline, units) : null), [baseline, units]);
  const shownBounds = useMemo(() => boundsInUnits(bounds, units), [bounds, units]);
  const hasAnode = live.anodeMv.some((value) => value !== null);
  const specs = useMemo(
    () => stripSpecs(units).filter(({ key }) => !hidden.has(key) && (key !== 'anode' || hasAnode)),
    [units, hidden, hasAnode],
  );
  const ranges = useSteady(
    useMemo(() => {
      const runs = grey ? [live, grey] : [live];
      return specs.map((spec) => spec.range(runs, shownBounds));
    }, [specs, live, grey, shownBounds]),
  );
  const layout = useMemo(
    () =>
      stripLayout(
        width,
        specs.map((spec, i) => ({ spec, range: ranges[i]! })),
      ),
    [width, specs, ranges],
  );

  const whole = useSteady(useMemo(() => fullRange(grey ? [live, grey] : [live], axis), [live, grey, axis]));
  const { range, zoomed, setRange, zoomAbout } = useVisibleRange(whole, axis);
  const { left, right } = layout;
  const x = useCallback(
    (value: number) => left + ((value - range[0]) / (range[1] - range[0])) * (right - left),
    [left, right, range],
  );
  const xOfMinute = useCallback((minute: number) => x(axisValueAtMinute(live, axis, minute)), [x, live, axis]);
  const xs = axisColumn(live, axis);
  const spans = useMemo(
    () => placedSpans(live.spans, axisColumn(live, axis), (0.8 * (range[1] - range[0])) / (right - left)),
    [live, axis, range, left, right],
  );
  const drawnNotes = useMemo(() => [...sessionNotes(result, units), ...notes], [result, units, notes]);
  const drawnTaper = useMemo(() => taper && taperLine(taper, live, axis), [taper, live, axis]);

  // The cursor stays on the run and in the visible part.
  const end = live.min[live.min.length - 1] ?? 0;
  const wanted = axisValueAtMinute(live, axis, Math.min(cursor ?? end * 0.37, end));
  const at = Math.min(Math.max(wanted, range[0]), Math.min(range[1], xs[xs.length - 1] ?? 0));
  const place = placeOn(xs, at);
  const moveTo = useCallback(
    (value: number) =>
      onCursor(Math.max(0, Math.min(minuteAtAxisValue(live, axis, value), live.min[live.min.length - 1] ?? 0))),
    [onCursor, live, axis],
  );
  const pointer = usePointerCursor(layout, range, moveTo);
  const moveByShare = (share: number) => {
    const next = Number.isFinite(share) ? at + share * (range[1] - range[0]) : share > 0 ? range[1] : range[0];
    moveTo(Math.min(Math.max(next, range[0]), range[1]));
  };

  return (
    <>
      <div
        className={`strips-sheet${stale ? ' stale' : ''}${failed ? ' failed' : ''}`}
        style={{ height: layout.height }}
        {...pointer}
      >
        <StripGrounds prefix={`${prefix}g`} layout={layout} columns={live} xs={xs} spans={spans} x={x} />
        <StripsPlot
          live={live}
          baseline={grey}
          axis={axis}
          range={range}
          layout={layout}
          onRange={setRange}
          onFailed={setPlotError}
        />
        <svg className="absolute inset-0 pointer-events-none" width={layout.width} height={layout.height}>
          <StripAnnotations
            prefix={`${prefix}g`}
            layout={layout}
            result={result}
            spans={spans}
            bounds={shownBounds}
            notes={drawnNotes}
            taper={drawnTaper}
            x={x}
            xOfMinute={xOfMinute}
          />
          <StripReadings
            layout={layout}
            live={live}
            place={place}
            baseline={grey}
            baselinePlace={grey && baselinePlace(grey, axis, at)}
          />
          <LevelRows
            layout={layout}
            live={live}
            axis={axis}
            range={range}
            x={x}
            cursor={at}
            place={place}
            distanceUnit={units.distanceUnit}
          />
          <StripCursor layout={layout} live={live} place={place} x={x(at)} working={props.working ?? stale} />
        </svg>
        <CursorSlider
          layout={layout}
          live={live}
          place={place}
          heldBy={limitLabel(result.series.limit[place.index]!)}
          temperatureUnit={units.temperatureUnit}
          onMove={moveByShare}
          onZoom={(factor) => zoomAbout(at, factor)}
        />
      </div>
      <p className="strips-words">
        <ZoomWords
          zoomed={zoomed}
          onZoom={(factor) => zoomAbout(at, factor)}
          onShift={(share) => setRange(shiftedRange(range, whole, share))}
          onWhole={() => setRange(null)}
        />
        {!hasAnode && !hidden.has('anode') && <span>Anode potential: this cell describes no anode.</span>}
        {plotError !== null && <span className="text-stop">The curves could not be loaded. Load the page again.</span>}
      </p>
    </>
  );
}

function boundsInUnits(bounds: StrategyBounds, units: Units): ShownBounds {
  const { ceilingV, marginMv, hotFromC, hotToC } = bounds;
  return {
    ceilingV,
    marginMv,
    hotFrom: hotFromC === undefined ? undefined : units.temperature(hotFromC),
    hotTo: hotToC === undefined ? undefined : units.temperature(hotToC),
  };
}
