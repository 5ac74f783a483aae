import { PiecewiseCubic } from '@voltiplano/engine';
import type { Grid } from '../../../components/fields/grid.ts';

/** How a table is read between its rows: monotone cubic, straight, held from a row on, or held until a row. */
export type Reading = 'cubic' | 'line' | 'from' | 'until';

export type Curve = { x: number[]; y: number[]; points: [number, number][] };

const SAMPLES = 80;
/** How far beyond the outermost voltages a drawing of voltage ledges goes, as a share of their span. */
const BEYOND = 0.3;

/**
 * The curve of a table's first two columns as the engine reads it, from the rows that are numbers and rise.
 *
 * @param end  where the last value stops, on the first column, for a reading `from`
 */
export function tableCurve(grid: Grid, reading: Reading, end: number): Curve {
  if (reading === 'until') return untilCurve(grid);
  const points = grid.flatMap((row): [number, number][] =>
    typeof row[0] === 'number' && typeof row[1] === 'number' ? [[row[0], row[1]]] : [],
  );
  const rising = points.filter(([x], i) => i === 0 || x > points[i - 1]![0]);
  if (reading === 'cubic' && rising.length > 1) return { ...sampled(rising), points };
  if (reading === 'from') return { ...held(rising, end), points };
  return { ...columns(rising), points };
}

function columns(points: [number, number][]) {
  return { x: points.map(([x]) => x), y: points.map(([, y]) => y) };
}

function sampled(points: [number, number][]) {
  const table = columns(points);
  const curve = PiecewiseCubic.pchip(table);
  const from = table.x[0]!;
  const width = table.x[table.x.length - 1]! - from;
  const x = Array.from({ length: SAMPLES + 1 }, (_, i) => from + (width * i) / SAMPLES);
  return { x, y: x.map((at) => curve.value(at)) };
}

function held(points: [number, number][], end: number) {
  return columns(
    points.flatMap(([x, y], i): [number, number][] => [
      [x, y],
      [points[i + 1]?.[0] ?? Math.max(end, x), y],
    ]),
  );
}

/** Voltage ledges: each value holds until its voltage, the last to the end. */
function untilCurve(grid: Grid): Curve {
  const volts = grid.flatMap((row) => (typeof row[0] === 'number' ? [row[0]] : []));
  if (volts.length === 0) return { x: [], y: [], points: [] };
  const margin = BEYOND * (volts[volts.length - 1]! - volts[0]! || 0.1);
  const edges = [volts[0]! - margin, ...volts, volts[volts.length - 1]! + margin];
  const steps = grid.flatMap((row, i): [number, number][] =>
    typeof row[1] === 'number' && edges[i + 1] !== undefined
      ? [
          [edges[i]!, row[1]],
          [edges[i + 1]!, row[1]],
        ]
      : [],
  );
  return { ...columns(steps), points: steps.filter((_, i) => i % 2 === 1 && i < steps.length - 1) };
}
