import { linePath } from './svg-path.ts';
import { rangeAround } from './ticks.ts';
import { formatNumber } from '../lib/format.ts';
import { figureWidth } from './label-fit.ts';
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

/** Least room for the ticks at the left [px]; wider figures take more. */
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
  const least = Math.min(...finite);
  const greatest = Math.max(...finite);
  // A level table gets an axis about its value, with two ticks that read differently.
  const air = greatest - least < 10 ** -digits ? Math.max(10 ** -digits, Math.abs(greatest) * 0.1) : 0;
  const [low, high] = rangeAround(least - air, greatest + air, 3);
  const ticks = [low, high].map((value) => ({ value, text: formatNumber(value, digits) }));
  const gutter = Math.max(GUTTER, ...ticks.map(({ text }) => figureWidth(text) + 10));
  const from = x[0]!;
  const to = x[x.length - 1]!;
  const foot = height - 18;
  const px = (value: number) => gutter + ((value - from) / (to - from || 1)) * (width - gutter - 6);
  const py = (value: number) => 6 + (foot - 6) * (1 - (value - low) / (high - low));
  return (
    <svg className="block max-w-full" viewBox={`0 0 ${width} ${height}`} width={width} role="img" aria-label={label}>
      {ticks.map(({ value, text }) => (
        <g key={value}>
          <line x1={gutter} x2={width - 6} y1={py(value)} y2={py(value)} stroke="var(--rule)" strokeWidth={0.8} />
          <Label x={gutter - 6} y={value === low ? foot : py(value) + 4} anchor="end" figure>
            {text}
          </Label>
        </g>
      ))}
      <line x1={gutter} x2={width - 6} y1={foot} y2={foot} stroke="var(--ink)" />
      <Label x={gutter} y={height - 4} figure>
        {endText(from)}
      </Label>
      <Label x={width - 6} y={height - 4} anchor="end" figure>
        {endText(to)}
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

/** An end of the axis: as many decimals as it has, three at most. */
const endText = (value: number) => formatNumber(value, [0, 1, 2].find((n) => Number(value.toFixed(n)) === value) ?? 3);
