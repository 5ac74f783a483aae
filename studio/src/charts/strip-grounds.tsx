import { memo } from 'react';
import { fringeOf } from './fringe.ts';
import { limitFill, LimitPatterns } from './limit-marks.tsx';
import type { PlacedSpan } from './limit-spans.ts';
import { limitBedEdge } from './limits.ts';
import type { StripColumns } from './strip-columns.ts';
import type { PlacedStrip, StripLayout } from './strip-layout.ts';
import { linePath, type Point } from './svg-path.ts';

type Props = {
  prefix: string;
  layout: StripLayout;
  columns: StripColumns | null;
  xs: readonly number[];
  spans: readonly PlacedSpan[];
  x: (axisValue: number) => number;
};

/** What lies under Plotly's lines: hairlines, the body of the ground, and the fringe of limits under the power line. */
export const StripGrounds = memo(function StripGrounds({ prefix, layout, columns, xs, spans, x }: Props) {
  const power = layout.strips.find((strip) => strip.spec.key === 'power');
  const curve = power && columns && { strip: power, px: xs.map(x), py: columns.stationKw.map(power.y) };
  return (
    <svg className="absolute inset-0" width={layout.width} height={layout.height} aria-hidden="true">
      <LimitPatterns prefix={prefix} />
      <AllHairlines layout={layout} />
      {curve && (
        <>
          <clipPath id={`${prefix}clip-ground`}>
            <rect x={layout.left} y={power.top} width={layout.right - layout.left} height={power.height} />
          </clipPath>
          <g clipPath={`url(#${prefix}clip-ground)`}>
            <Ground {...curve} />
            {spans.map((span) => (
              <FringeBed
                key={span.fromRow}
                prefix={prefix}
                span={span}
                {...curve}
                depth={layout.size === 'phone' ? 9 : 12}
              />
            ))}
          </g>
        </>
      )}
      <Feet layout={layout} />
    </svg>
  );
});

const AllHairlines = memo(function AllHairlines({ layout }: { layout: StripLayout }) {
  return layout.strips.map((strip) => <Hairlines key={strip.spec.key} strip={strip} layout={layout} />);
});

const Feet = memo(function Feet({ layout }: { layout: StripLayout }) {
  return layout.strips.map((strip) => {
    const foot = strip.top + strip.height;
    return <line key={strip.spec.key} x1={layout.left} x2={layout.right} y1={foot} y2={foot} stroke="var(--ink)" />;
  });
});

function Hairlines({ strip, layout }: { strip: PlacedStrip; layout: StripLayout }) {
  return strip.tickValues
    .filter((value) => value > strip.range[0])
    .map((value) => (
      <line
        key={value}
        x1={layout.left}
        x2={layout.right}
        y1={strip.y(value)}
        y2={strip.y(value)}
        stroke="var(--rule)"
        strokeWidth={0.8}
      />
    ));
}

type CurveProps = {
  strip: PlacedStrip;
  /** Place of each row [px]. */
  px: readonly number[];
  py: readonly number[];
};

function Ground({ strip, px, py }: CurveProps) {
  const foot = strip.top + strip.height;
  const top = px.map((x, row): Point => [x, py[row]!]);
  const body: Point[] = [...top, [px[px.length - 1]!, foot], [px[0]!, foot]];
  return <path d={`${linePath(body)}Z`} fill="var(--sheet)" />;
}

type FringeProps = CurveProps & { prefix: string; span: PlacedSpan; depth: number };

/** The bed that hangs under the power line, in the colour and hatch of the limit that holds it. */
function FringeBed({ prefix, span, strip, px, py, depth }: FringeProps) {
  const { upper, lower } = fringeOf(span, px, py, depth, strip.top + strip.height);
  return (
    <>
      <path d={`${linePath([...upper, ...lower.toReversed()])}Z`} fill={limitFill(prefix, span.code)} />
      <path d={linePath(lower)} fill="none" stroke={limitBedEdge(span.code)} strokeWidth={0.8} />
    </>
  );
}
