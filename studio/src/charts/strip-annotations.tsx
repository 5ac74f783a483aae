import { limitSide, type SessionResult } from '@voltiplano/engine';
import { Fragment, memo } from 'react';
import { formatNumber, formatQuantity } from '../lib/format.ts';
import { dimensionLine, dimensionsOf } from './dimension-lines.ts';
import { textWidth } from './label-fit.ts';
import { Label } from './label.tsx';
import { LimitBeds } from './limit-band.tsx';
import { minutesPerSide, type PlacedSpan } from './limit-spans.ts';
import { limitSides } from './limits.ts';
import { placeNote, type Box, type StripNote } from './notes.ts';
import { StripNames } from './strip-names.tsx';
import type { ShownBounds } from './strip-specs.ts';
import type { PlacedStrip, StripLayout } from './strip-layout.ts';
import { linePath } from './svg-path.ts';
import type { TaperLine } from './taper-line.ts';

type Props = {
  prefix: string;
  layout: StripLayout;
  result: SessionResult;
  spans: readonly PlacedSpan[];
  bounds: ShownBounds;
  notes: readonly StripNote[];
  taper: TaperLine | null;
  /** Axis value to px. */
  x: (axisValue: number) => number;
  /** Minute to px. */
  xOfMinute: (minute: number) => number;
};

/** What lies over Plotly's lines and does not follow the cursor. */
export const StripAnnotations = memo(function StripAnnotations(props: Props) {
  const { prefix, layout, spans, x } = props;
  return (
    <>
      <StripNames layout={layout} />
      <Dimensions {...props} />
      <Bounds layout={layout} bounds={props.bounds} />
      <Contacts {...props} />
      <TaperLineMarks {...props} />
      <Notes {...props} />
      <BandRules layout={layout} />
      <LimitBeds
        prefix={prefix}
        spans={spans}
        x={x}
        left={layout.left}
        right={layout.right}
        top={layout.bandTop}
        height={layout.bandHeight}
        labels
      />
      <SideMinutes {...props} />
    </>
  );
});

function Dimensions({ layout, result, xOfMinute }: Props) {
  return dimensionsOf(result.metrics).map(({ label, fromMin, toMin }, i) => {
    const line = dimensionLine(label, xOfMinute(fromMin), xOfMinute(toMin), layout.left, layout.right);
    const y = 13 + i * 19;
    if (!line) return null;
    return (
      <g key={label}>
        <line x1={line.from} x2={line.to} y1={y} y2={y} stroke="var(--ink2)" strokeWidth={0.9} />
        {line.ends.map((end) => (
          <Fragment key={end}>
            <line x1={end - 3.5} x2={end + 3.5} y1={y + 3.5} y2={y - 3.5} stroke="var(--ink)" strokeWidth={1.4} />
            <line x1={end} x2={end} y1={y - 6} y2={44} stroke="var(--edge)" strokeWidth={0.7} />
          </Fragment>
        ))}
        <rect x={line.labelX - line.labelWidth / 2} y={y - 8} width={line.labelWidth} height={16} fill="var(--paper)" />
        <Label x={line.labelX} y={y + 4} anchor="middle" figure ink="var(--ink)">
          {label}
        </Label>
      </g>
    );
  });
}

const Bounds = memo(function Bounds({ layout, bounds }: { layout: StripLayout; bounds: ShownBounds }) {
  const rows = layout.strips.flatMap((strip) =>
    boundsOf(strip, bounds, layout.size === 'phone').map((bound) => ({ ...bound, strip })),
  );
  return rows
    .filter(({ strip, value }) => value > strip.range[0] && value < strip.range[1])
    .map(({ strip, value, text, below }) => {
      const y = strip.y(value);
      return (
        <g key={text}>
          <line x1={layout.left} x2={layout.right} y1={y} y2={y} stroke="var(--bed-edge-cell)" strokeDasharray="1 3" />
          <Label x={layout.right - 4} y={below ? y + 14 : y - 4} anchor="end" halo>
            {text}
          </Label>
        </g>
      );
    });
});

function boundsOf(
  { spec }: PlacedStrip,
  bounds: ShownBounds,
  phone: boolean,
): { value: number; text: string; below?: boolean }[] {
  const { ceilingV, marginMv, hotFrom, hotTo } = bounds;
  if (spec.key === 'voltage' && ceilingV !== undefined) {
    return [{ value: ceilingV, text: `ceiling ${formatQuantity('cellV', ceilingV)}`, below: phone }];
  }
  if (spec.key === 'anode' && marginMv !== undefined) {
    return [{ value: marginMv, text: `margin ${formatNumber(marginMv, 0)}` }];
  }
  if (spec.key !== 'temperatures') return [];
  return [
    ...(hotFrom === undefined ? [] : [{ value: hotFrom, text: `hot limit from ${formatShort(hotFrom)}`, below: true }]),
    ...(hotTo === undefined ? [] : [{ value: hotTo, text: `hot limit ends ${formatShort(hotTo)}` }]),
  ];
}

/** Where the words of a strip's bounds stand. */
function boundBoxes(strip: PlacedStrip, bounds: ShownBounds, layout: StripLayout): Box[] {
  const right = layout.right;
  return boundsOf(strip, bounds, layout.size === 'phone').map(({ value, text, below }) => {
    const y = strip.y(value) + (below ? 14 : -4);
    return { left: right - 8 - textWidth(text), right, top: y - 11, bottom: y + 3 };
  });
}

const formatShort = (value: number) => formatNumber(value, Number.isInteger(value) ? 0 : 1);

/** Dotted verticals where one limit hands over to the next. */
function Contacts({ layout, spans, x }: Props) {
  const { strips, left, right, plotTop, bandTop } = layout;
  const phone = layout.size === 'phone';
  const runs = phone
    ? strips.map((strip) => [strip.top, strip.top + strip.height] as const)
    : [[plotTop, bandTop] as const];
  return spans
    .slice(1)
    .map((span) => x(span.from))
    .filter((px) => px > left + 2 && px < right - 2)
    .map((px) => (
      <path
        key={px}
        d={runs.map(([from, to]) => `M${px} ${from}V${to}`).join('')}
        stroke="var(--edge)"
        strokeWidth={0.8}
        strokeDasharray="1 3"
      />
    ));
}

/** The taper's own table as a dashed line with its points, in sight where another limit overrides it. */
function TaperLineMarks({ layout, taper, x, prefix }: Props) {
  const strip = layout.strips.find(({ spec }) => spec.key === 'current');
  if (!strip || !taper) return null;
  return (
    <>
      <clipPath id={`${prefix}clip-taper`}>
        <rect x={layout.left} y={strip.top - 5} width={layout.right - layout.left + 5} height={strip.height + 10} />
      </clipPath>
      <g clipPath={`url(#${prefix}clip-taper)`}>
        <path
          d={linePath(taper.line.map(({ at, currentA }) => [x(at), strip.y(currentA)]))}
          fill="none"
          stroke="var(--clay)"
          strokeDasharray="3 2.5"
        />
        {taper.handles
          .map(({ at, currentA }) => [x(at), strip.y(currentA)] as const)
          .filter(([px]) => px >= layout.left && px <= layout.right)
          .map(([px, py]) => (
            <path
              key={`${px} ${py}`}
              d={`M${px} ${py - 6}L${px + 6} ${py}L${px} ${py + 6}L${px - 6} ${py}Z`}
              fill="var(--paper)"
              stroke="var(--clay)"
              strokeWidth={1.6}
            />
          ))}
      </g>
    </>
  );
}

function Notes({ layout, notes, bounds, xOfMinute }: Props) {
  return notes.map((note) => {
    const strip = layout.strips.find(({ spec }) => spec.key === note.strip);
    if (!strip || (note.wideOnly && layout.size !== 'wide')) return null;
    const x = xOfMinute(note.atMin);
    const y = strip.y(note.value);
    const area = { left: layout.left, right: layout.right, top: strip.top - 10, bottom: strip.top + strip.height };
    const placed = placeNote([x, y], note, area, boundBoxes(strip, bounds, layout));
    if (!placed) return null;
    const { elbowX, elbowY, toLeft } = placed;
    const way = toLeft ? -1 : 1;
    return (
      <g key={note.text}>
        <path d={`M${x} ${y}L${elbowX} ${elbowY}h${8 * way}`} fill="none" stroke="var(--ink2)" strokeWidth={0.8} />
        <circle cx={x} cy={y} r={2.2} fill="var(--ink)" />
        <Label x={elbowX + 12 * way} y={elbowY + 4} anchor={toLeft ? 'end' : 'start'} halo>
          {note.text}
        </Label>
      </g>
    );
  });
}

const BandRules = memo(function BandRules({ layout }: { layout: StripLayout }) {
  const { left, right, bandTop, bandHeight, size } = layout;
  return limitSides.map((side, i) => {
    const y = bandTop + (bandHeight / 3) * (i + 1);
    return (
      <g key={side}>
        <line
          x1={size === 'phone' ? left : left - 48}
          x2={right}
          y1={y}
          y2={y}
          stroke="var(--rule)"
          strokeWidth={0.8}
        />
        {size !== 'phone' && (
          <Label x={left - 8} y={y - 5} anchor="end">
            {side}
          </Label>
        )}
      </g>
    );
  });
});

/** Minutes per side, in line with the band. */
function SideMinutes({ layout, result }: Props) {
  if (layout.size === 'phone') return null;
  const minutes = minutesPerSide(result.metrics.limitMinutes, limitSide);
  const wide = layout.size === 'wide';
  return limitSides.map((side, i) => {
    const y = layout.bandTop + (layout.bandHeight / 3) * (i + 1) - 4.5;
    return (
      <g key={side}>
        <Label x={layout.right + (wide ? 36 : 28)} y={y}>{`${side}-side`}</Label>
        <Label x={layout.right + 144} y={y} anchor="end" figure ink="var(--ink)">
          {formatQuantity('min', minutes[side])}
        </Label>
        {wide && (
          <Label x={layout.width} y={y} anchor="end">
            min
          </Label>
        )}
      </g>
    );
  });
}
