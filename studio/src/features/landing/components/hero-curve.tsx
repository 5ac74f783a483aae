import type { SessionResult } from '@voltiplano/engine';
import { Fragment, useId } from 'react';
import { dimensionLine, dimensionsOf } from '../../../charts/dimension-lines.ts';
import { fringeOf } from '../../../charts/fringe.ts';
import { textWidth } from '../../../charts/label-fit.ts';
import { Label } from '../../../charts/label.tsx';
import { limitFill, LimitPatterns } from '../../../charts/limit-marks.tsx';
import { limitSpans, placedSpans, type PlacedSpan } from '../../../charts/limit-spans.ts';
import { limitBedEdge, limitLabel } from '../../../charts/limits.ts';
import { numberAt, placeOn } from '../../../charts/rows.ts';
import { linePath, type Point } from '../../../charts/svg-path.ts';
import { ticks } from '../../../charts/ticks.ts';
import { useWidth } from '../../../charts/use-width.ts';
import { formatNumber, formatQuantity } from '../../../lib/format.ts';
import { heroLayout, type HeroLayout } from './hero-layout.ts';

export type Ghost = { result: SessionResult; name: string };

type Props = { result: SessionResult | null; ghosts: readonly Ghost[] };

/** The charge curve as ground: a drawn section across the whole page. */
export function HeroCurve({ result, ghosts }: Props) {
  const [ref, width] = useWidth<HTMLElement>();
  const prefix = `${useId()}-`;
  const layout = heroLayout(width, result?.metrics.endMin ?? 0);
  const words = result
    ? `Charge curve of an invented van: peak ${formatQuantity('kW', result.metrics.peakStationPowerKw)} kW, 10 to 80 % in ${formatQuantity('min', result.metrics.minutes10To80)} min`
    : 'Charge curve of an invented van, being computed';
  return (
    <figure ref={ref} className="hero" style={{ height: layout.height }} role="group" aria-label={words}>
      {width > 0 && (
        <svg className="block" width={width} height={layout.height} aria-hidden="true">
          <LimitPatterns prefix={prefix} />
          <PowerScale layout={layout} width={width} />
          {ghosts.map((ghost) => (
            <GhostLine key={ghost.name} {...ghost} layout={layout} />
          ))}
          {result && <Ground result={result} layout={layout} prefix={prefix} />}
          {ghosts.map((ghost, i) => (
            <GhostName key={ghost.name} {...ghost} layout={layout} early={i === 0} live={result} />
          ))}
          <TimeScale layout={layout} width={width} />
        </svg>
      )}
    </figure>
  );
}

function PowerScale({ layout, width }: { layout: HeroLayout; width: number }) {
  return [50, 100, 150, 200].map((kw) => (
    <Fragment key={kw}>
      <line x1={0} x2={width} y1={layout.y(kw)} y2={layout.y(kw)} stroke="var(--rule)" strokeWidth={0.8} />
      <Label x={width - layout.edge} y={layout.y(kw) - 5} anchor="end" figure>
        {kw === 200 ? '200 kW' : kw}
      </Label>
    </Fragment>
  ));
}

function TimeScale({ layout, width }: { layout: HeroLayout; width: number }) {
  const { foot, x, endMin, phone } = layout;
  return (
    <>
      <line x1={0} x2={width} y1={foot} y2={foot} stroke="var(--ink)" strokeWidth={1.2} />
      {ticks(0, endMin, phone ? 6 : 12).map((minute) => (
        <Fragment key={minute}>
          <line x1={x(minute)} x2={x(minute)} y1={foot} y2={foot + 6} stroke="var(--ink)" strokeWidth={1.2} />
          <Label x={x(minute)} y={foot + 21} anchor={minute === 0 ? 'start' : 'middle'} figure>
            {minute === 0 ? '0 min' : minute}
          </Label>
        </Fragment>
      ))}
    </>
  );
}

const minutesOf = (result: SessionResult) => result.series.tS.map((t) => t / 60);

/** A curve's points in sight [px]. */
function curve(result: SessionResult, { x, y, endMin }: HeroLayout): Point[] {
  const { tS, stationPowerKw } = result.series;
  return tS.flatMap((t, i): Point[] => (t / 60 > endMin ? [] : [[x(t / 60), y(stationPowerKw[i]!)]]));
}

function GhostLine({ result, layout }: Ghost & { layout: HeroLayout }) {
  return <path d={linePath(curve(result, layout))} fill="none" stroke="var(--base)" strokeWidth={1.3} />;
}

type GhostNameProps = Ghost & { layout: HeroLayout; early: boolean; live: SessionResult | null };

/** Named where it stands clear above the live curve: early for the warm one, late for the cold one. */
function GhostName({ result, name, layout, early, live }: GhostNameProps) {
  if (layout.phone) return null;
  const kwAt = (run: SessionResult, minute: number) =>
    minute > run.metrics.endMin ? 0 : numberAt(run.series.stationPowerKw, placeOn(minutesOf(run), minute));
  const shares = early ? [0.15, 0.3] : [0.9, 0.72, 0.6, 0.5, 0.42];
  const end = Math.min(result.metrics.endMin, layout.endMin);
  const minute = shares.map((share) => share * end).find((at) => !live || kwAt(result, at) > kwAt(live, at) + 8);
  if (minute === undefined) return null;
  return (
    <Label x={layout.x(minute) + (early ? 0 : 6)} y={layout.y(kwAt(result, minute)) - 9} ink="var(--ink3)" halo>
      {name}
    </Label>
  );
}

function Ground({ result, layout, prefix }: { result: SessionResult; layout: HeroLayout; prefix: string }) {
  const { x, y, foot, left, right, phone } = layout;
  const minutes = minutesOf(result);
  const top = curve(result, layout);
  const end = top[top.length - 1]![0];
  const spans = placedSpans(limitSpans(result.series.limit), minutes, 0.25);
  const xs = minutes.map(x);
  const ys = result.series.stationPowerKw.map(y);
  return (
    <>
      <path d={`${linePath(top)}L${end} ${foot}L${left} ${foot}Z`} fill="var(--sheet)" />
      {spans.slice(1).map((span) => (
        <line
          key={span.fromRow}
          x1={x(span.from)}
          x2={x(span.from)}
          y1={Math.min(foot, ys[span.fromRow]! + 10)}
          y2={foot}
          stroke="var(--edge)"
          strokeWidth={0.8}
          strokeDasharray="1 3"
        />
      ))}
      {spans.map((span) => {
        const { upper, lower } = fringeOf(span, xs, ys, phone ? 14 : 26, foot);
        return (
          <Fragment key={span.fromRow}>
            <path d={`${linePath([...upper, ...lower.toReversed()])}Z`} fill={limitFill(prefix, span.code)} />
            <path d={linePath(lower)} fill="none" stroke={limitBedEdge(span.code)} strokeWidth={0.8} />
          </Fragment>
        );
      })}
      <path d={linePath(top)} fill="none" stroke="var(--ink)" strokeWidth={phone ? 2.2 : 2.8} strokeLinejoin="round" />
      <SpanNames spans={spans} xs={xs} ys={ys} layout={layout} />
      <TenToEighty result={result} layout={layout} left={left} right={right} />
    </>
  );
}

type SpanNamesProps = {
  spans: readonly PlacedSpan[];
  xs: readonly number[];
  ys: readonly number[];
  layout: HeroLayout;
};

/**
 * Name and minutes of each limit on the ground. Where its bed comes down too far they stand behind the end of the
 * curve, still on the ground, or else over the curve.
 */
function SpanNames({ spans, xs, ys, layout }: SpanNamesProps) {
  const { x, foot, phone, right } = layout;
  return spans.map((span) => {
    const name = limitLabel(span.code);
    const width = textWidth(name, 13);
    const inside = x(span.from) + 8;
    if (x(span.to) - inside < width + 6) return null;
    const end = placeOn(xs, inside + width).index;
    const lowest = Math.max(...ys.slice(span.fromRow, end + 1)) + (phone ? 14 : 26);
    const highest = Math.min(...ys.slice(span.fromRow, end + 1));
    const hasRoom = lowest <= foot - 42;
    const behind = x(span.to) + 8;
    const isBehind = !hasRoom && span === spans[spans.length - 1] && behind + width < right;
    const left = isBehind ? behind : inside;
    const y = hasRoom || isBehind ? foot - 10 : highest - 12;
    return (
      <Fragment key={span.fromRow}>
        <Label x={left} y={y - 17} figure halo={!hasRoom}>
          {`${formatNumber(span.to - span.from, 1)} min`}
        </Label>
        <Label x={left} y={y} ink="var(--ink)" weight={500} size={13} halo={!hasRoom}>
          {name}
        </Label>
      </Fragment>
    );
  });
}

type DimensionProps = { result: SessionResult; layout: HeroLayout; left: number; right: number };

function TenToEighty({ result, layout, left, right }: DimensionProps) {
  const dimension = dimensionsOf(result.metrics).find(({ label }) => label.startsWith('10'));
  const line =
    dimension && dimensionLine(dimension.label, layout.x(dimension.fromMin), layout.x(dimension.toMin), left, right);
  if (!line) return null;
  const y = layout.phone ? 22 : 18;
  const minutes = minutesOf(result);
  const heightAt = (minute: number) => layout.y(numberAt(result.series.stationPowerKw, placeOn(minutes, minute)));
  const feet = [heightAt(dimension.fromMin), heightAt(dimension.toMin)];
  return (
    <>
      <line x1={line.from} x2={line.to} y1={y} y2={y} stroke="var(--ink2)" strokeWidth={0.9} />
      {line.ends.map((end, i) => (
        <Fragment key={end}>
          <line x1={end - 4} x2={end + 4} y1={y + 4} y2={y - 4} stroke="var(--ink)" strokeWidth={1.4} />
          <line x1={end} x2={end} y1={y - 7} y2={feet[i]! - 6} stroke="var(--edge)" strokeWidth={0.8} />
        </Fragment>
      ))}
      <rect x={line.labelX - line.labelWidth / 2} y={y - 9} width={line.labelWidth} height={18} fill="var(--paper)" />
      <Label x={line.labelX} y={y + 4.5} anchor="middle" figure ink="var(--ink)" size={13}>
        {dimension.label}
      </Label>
    </>
  );
}
