import type { SessionResult } from '@voltiplano/engine';
import { Fragment, useId } from 'react';
import { formatQuantity } from '../lib/format.ts';
import { bedLabels, textWidth } from './label-fit.ts';
import { Label } from './label.tsx';
import { LimitPatterns, limitFill } from './limit-marks.tsx';
import { limitSpans, placedSpans, type PlacedSpan } from './limit-spans.ts';
import { limitBedEdge, limitDepth, limitLabel, limitShort, limitSides, limitTint } from './limits.ts';
import { ticks } from './ticks.ts';

type BedsProps = {
  /** Where the drawing's LimitPatterns stand. */
  prefix: string;
  spans: readonly PlacedSpan[];
  x: (axisValue: number) => number;
  left: number;
  right: number;
  top: number;
  height: number;
  labels?: boolean;
};

/** The beds of a limit band inside a larger drawing: a third deep for the station, two for the vehicle, all for the cell. */
export function LimitBeds({ prefix, spans, x, left, right, top, height, labels }: BedsProps) {
  const third = height / 3;
  const beds = spans
    .map((span) => ({ code: span.code, from: Math.max(left, x(span.from)), to: Math.min(right, x(span.to)) }))
    .filter((bed) => bed.to > bed.from);
  const named = beds.map((bed) => ({ ...bed, label: limitLabel(bed.code), short: limitShort(bed.code) }));
  const places = labels ? bedLabels(named, left, right) : [];
  return (
    <g>
      {beds.map((bed) => (
        <rect
          key={bed.from}
          x={bed.from}
          y={top}
          width={Math.max(0.8, bed.to - bed.from)}
          height={third * limitDepth(bed.code)}
          fill={limitFill(prefix, bed.code)}
          stroke={limitBedEdge(bed.code)}
          strokeWidth={0.8}
        >
          <title>{limitLabel(bed.code)}</title>
        </rect>
      ))}
      {places.map((label, i) => {
        const bed = beds[i]!;
        const foot = top + third * limitDepth(bed.code);
        if (!label) return null;
        if (label.place === 'inside') {
          const baseline = foot - 4.5;
          return (
            <Fragment key={bed.from}>
              <rect
                x={label.x - 4}
                y={baseline - 10.5}
                width={textWidth(label.text) + 8}
                height={13.5}
                fill={limitTint(bed.code)}
              />
              <Label x={label.x} y={baseline} ink="var(--on-tint)" weight={500}>
                {label.text}
              </Label>
            </Fragment>
          );
        }
        const middle = (bed.from + bed.to) / 2;
        const baseline = top + height + 13 + label.row * 13;
        return (
          <Fragment key={bed.from}>
            <line x1={middle} x2={middle} y1={foot} y2={baseline - 10} stroke="var(--edge)" strokeWidth={0.8} />
            <Label x={label.x} y={baseline} anchor="middle">
              {label.text}
            </Label>
          </Fragment>
        );
      })}
    </g>
  );
}

type BandProps = { result: SessionResult; width: number; height?: number };

/** A limit band of its own, over time, with the three sides named: for lists and for the landing page. */
export function LimitBand({ result, width, height = 96 }: BandProps) {
  const prefix = `${useId()}-`;
  const left = 58;
  const min = result.series.tS.map((t) => t / 60);
  const end = min[min.length - 1] ?? 1;
  const x = (minute: number) => left + ((width - left - 1) * minute) / end;
  const spans = placedSpans(limitSpans(result.series.limit), min, end / (width - left));
  return (
    <svg className="block w-full" width={width} height={height + 30} role="group" aria-label={bandInWords(result)}>
      <LimitPatterns prefix={prefix} />
      {limitSides.map((side, i) => (
        <Fragment key={side}>
          <line
            x1={0}
            x2={width}
            y1={((i + 1) * height) / 3}
            y2={((i + 1) * height) / 3}
            stroke="var(--rule)"
            strokeWidth={0.8}
          />
          <Label x={0} y={((i + 1) * height) / 3 - 10}>
            {side}
          </Label>
        </Fragment>
      ))}
      <line x1={0} x2={width} y1={0.6} y2={0.6} stroke="var(--ink)" strokeWidth={1.2} />
      <LimitBeds prefix={prefix} spans={spans} x={x} left={left} right={width - 1} top={0.5} height={height} />
      {ticks(0, end, 4).map((minute) => (
        <Fragment key={minute}>
          <line x1={x(minute)} x2={x(minute)} y1={height} y2={height + 5} stroke="var(--ink)" />
          <Label
            x={x(minute)}
            y={height + 20}
            anchor={minute === 0 ? 'start' : x(minute) > width - 12 ? 'end' : 'middle'}
            figure
          >
            {minute === 0 ? '0 min' : minute}
          </Label>
        </Fragment>
      ))}
    </svg>
  );
}

/** A limit band for a row of a list: beds alone, its words for those who cannot see it. */
export function LimitBandThumbnail({ result, width, height = 24 }: BandProps) {
  const prefix = `${useId()}-`;
  const min = result.series.tS.map((t) => t / 60);
  const end = min[min.length - 1] ?? 1;
  const x = (minute: number) => 0.5 + ((width - 1) * minute) / end;
  const spans = placedSpans(limitSpans(result.series.limit), min, end / width);
  return (
    <svg className="block" width={width} height={height} role="img" aria-label={bandInWords(result)}>
      <LimitPatterns prefix={prefix} />
      <LimitBeds prefix={prefix} spans={spans} x={x} left={0.5} right={width - 0.5} top={0.5} height={height - 1} />
    </svg>
  );
}

/** "Limits: taper 42.8 min, hot limit 28.2 min, …", longest first. */
export function bandInWords({ metrics }: SessionResult): string {
  const held = Object.entries(metrics.limitMinutes).filter(([, minutes]) => minutes > 0);
  held.sort(([, a], [, b]) => b - a);
  const parts = held.map(
    ([code, minutes]) =>
      `${limitLabel(code as keyof typeof metrics.limitMinutes)} ${formatQuantity('min', minutes)} min`,
  );
  return `Limits: ${parts.join(', ')}`;
}
