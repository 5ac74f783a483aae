import { formatNumber, formatQuantity } from '../lib/format.ts';
import { Label } from './label.tsx';
import { numberAt, placeOn, type RowPlace } from './rows.ts';
import { axisColumn, type StripAxis } from './strip-axis.ts';
import type { StripColumns } from './strip-columns.ts';
import type { StripLayout } from './strip-layout.ts';
import { tickDigits, ticks } from './ticks.ts';

type Props = {
  layout: StripLayout;
  live: StripColumns;
  axis: StripAxis;
  range: readonly [number, number];
  x: (axisValue: number) => number;
  /** Axis value at the cursor. */
  cursor: number;
  place: RowPlace;
  distanceUnit: string;
};

type LevelRow = {
  name: string;
  column: number[];
  atTick: (value: number) => string;
  atCursor: (value: number) => string;
};

/** Rows under the drawing, as under a long section: where the run stands at each tick, and at the cursor. */
export function LevelRows({ layout, live, axis, range, x, cursor, place, distanceUnit }: Props) {
  const { size, left, right, rowsTop, rowHeight } = layout;
  const phone = size === 'phone';
  const xs = axisColumn(live, axis);
  const end = xs[xs.length - 1] ?? 0;
  const stops = ticks(range[0], range[1], phone ? 4 : 10).filter((value) => value <= end + 1e-6);
  const digits = tickDigits((stops[1] ?? 0) - (stops[0] ?? 0));
  const rows = levelRows(live, axis, digits, distanceUnit).filter((row) => !(phone && row.name === 'kWh in'));
  const cursorX = x(cursor);
  // At either end the value turns inwards, clear of the rows' names and of the margin.
  const value: { x: number; anchor: 'start' | 'middle' | 'end' } =
    cursorX < left + 18
      ? { x: left + 2, anchor: 'start' }
      : cursorX > right - 18
        ? { x: right, anchor: 'end' }
        : { x: cursorX, anchor: 'middle' };
  const from = phone ? 0 : left - 48;
  const foot = rowsTop + rows.length * rowHeight;
  const free = stops.filter((stop) => Math.abs(x(stop) - cursorX) > 40);
  return (
    <>
      {rows.map((row, i) => {
        const y = rowsTop + i * rowHeight;
        return (
          <g key={row.name}>
            <line
              x1={from}
              x2={right}
              y1={y}
              y2={y}
              stroke={i === 0 ? 'var(--ink)' : 'var(--rule)'}
              strokeWidth={i === 0 ? 1 : 0.8}
            />
            <Label x={left - 8} y={y + 14} anchor="end">
              {row.name}
            </Label>
            {free.map((stop) => {
              const px = x(stop);
              const atLeft = px < left + 2;
              return (
                <Label
                  key={stop}
                  x={px + (atLeft ? 2 : 0)}
                  y={y + 14}
                  anchor={atLeft ? 'start' : px > right - 12 ? 'end' : 'middle'}
                  figure
                  ink={i === 0 ? 'var(--ink)' : undefined}
                >
                  {row.atTick(numberAt(row.column, placeOn(xs, stop)))}
                </Label>
              );
            })}
            <Label x={value.x} y={y + 14} anchor={value.anchor} figure ink="var(--clay)" weight={600}>
              {row.atCursor(numberAt(row.column, place))}
            </Label>
          </g>
        );
      })}
      {stops.map((value) => (
        <line key={value} x1={x(value)} x2={x(value)} y1={rowsTop} y2={rowsTop - 5} stroke="var(--ink)" />
      ))}
      <line x1={from} x2={right} y1={foot} y2={foot} stroke="var(--ink)" />
      <path
        d={`M${cursorX - 5} ${foot + 7.5}L${cursorX} ${foot + 0.5}L${cursorX + 5} ${foot + 7.5}Z`}
        fill="var(--clay)"
      />
    </>
  );
}

/** The row of the axis itself comes first. */
function levelRows(live: StripColumns, axis: StripAxis, digits: number, distanceUnit: string): LevelRow[] {
  const fixed = (kind: 'soc' | 'kWh' | 'distance' | 'min') => (value: number) => formatQuantity(kind, value);
  const onTicks = (value: number) => formatNumber(value, digits);
  const time = {
    name: 'min',
    column: live.min,
    atTick: axis === 'time' ? onTicks : fixed('min'),
    atCursor: fixed('min'),
  };
  const soc = {
    name: 'soc %',
    column: live.socPercent,
    atTick: axis === 'soc' ? onTicks : fixed('soc'),
    atCursor: axis === 'soc' ? (value: number) => formatNumber(value, 1) : fixed('soc'),
  };
  const rest = [
    { name: 'kWh in', column: live.kwhIn, atTick: fixed('kWh'), atCursor: fixed('kWh') },
    { name: distanceUnit, column: live.distance, atTick: fixed('distance'), atCursor: fixed('distance') },
  ];
  return axis === 'time' ? [time, soc, ...rest] : [soc, time, ...rest];
}
