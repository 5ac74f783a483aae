import { linePath } from './svg-path.ts';
import { rangeAround } from './ticks.ts';
import { formatNumber } from '../lib/format.ts';
import { Label } from './label.tsx';

type Props = {
  /** The curve as it is used: sampled finely enough for the width. */
  x: readonly number[];
  y: readonly number[];
  /** The table's own points, drawn as diamonds. */
  points?: readonly (readonly [x: number, y: number])[];
  width?: number;
  height?: number;
  /** Read aloud: "Open-circuit voltage over z". */
  label: string;
  /** Token of its ink. */
  ink?: string;
  digits?: number;
};

const GUTTER = 40;

/** A small line chart beside an editable table. */
export function MiniChart({
  x,
  y,
  points = [],
  width = 300,
  height = 96,
  label,
  ink = '--s-current',
  digits = 2,
}: Props) {
  const finite = y.filter(Number.isFinite);
  if (finite.length < 2) return null;
  const [low, high] = rangeAround(Math.min(...finite), Math.max(...finite), 3);
  const from = x[0]!;
  const to = x[x.length - 1]!;
  const foot = height - 18;
  const px = (value: number) => GUTTER + ((value - from) / (to - from || 1)) * (width - GUTTER - 6);
  const py = (value: number) => 6 + (foot - 6) * (1 - (value - low) / (high - low));
  return (
    <svg className="block max-w-full" viewBox={`0 0 ${width} ${height}`} width={width} role="img" aria-label={label}>
      {[low, high].map((value) => (
        <g key={value}>
          <line x1={GUTTER} x2={width - 6} y1={py(value)} y2={py(value)} stroke="var(--rule)" strokeWidth={0.8} />
          <Label x={GUTTER - 6} y={py(value) + 4} anchor="end" figure>
            {formatNumber(value, digits)}
          </Label>
        </g>
      ))}
      <line x1={GUTTER} x2={width - 6} y1={foot} y2={foot} stroke="var(--ink)" />
      <Label x={GUTTER} y={height - 4} figure>
        {String(from)}
      </Label>
      <Label x={width - 6} y={height - 4} anchor="end" figure>
        {String(to)}
      </Label>
      <path
        d={linePath(x.map((value, i) => [px(value), py(y[i]!)]))}
        fill="none"
        stroke={`var(${ink})`}
        strokeWidth={1.6}
      />
      {points.map(([vx, vy]) => (
        <path
          key={`${vx} ${vy}`}
          d={`M${px(vx)} ${py(vy) - 4}l4 4l-4 4l-4 -4Z`}
          fill="var(--paper)"
          stroke="var(--clay)"
          strokeWidth={1.4}
        />
      ))}
    </svg>
  );
}
