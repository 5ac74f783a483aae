import type { Taper } from '../study/schema.ts';
import { SOC_GRID, type TuneShape } from '../study/tune-request.ts';

/** A taper of a shape that is tuned: values, and where they stand. Of ledges the first edge is the range's start. */
export type Curve = { soc: number[]; value: number[] };

export type Unit = 'A' | 'C' | 'kW';

/** Where a tuned taper may lie: its shape, unit, range of soc, widths on the grid, and least and greatest value. */
export type TaperSpace = {
  kind: TuneShape['kind'];
  unit: Unit;
  monotone: boolean;
  /** Range of soc, and least distance between two edges or points. */
  lo: number;
  hi: number;
  width: number;
  least: number;
  most: number;
};

/** Rows of a linear condition a·d ≤ b. */
export type LinearRows = { a: number[][]; b: number[] };

/** Soc that counts as one unit of a step, beside values that are measured by their logarithm. */
const SOC_SCALE = 0.25;

export function taperOf({ kind, unit }: TaperSpace, { soc, value }: Curve): Taper {
  return kind === 'ledges'
    ? { shape: 'ledges', unit, steps: value.map((v, i) => ({ fromSoc: soc[i], value: v })) }
    : { shape: 'slope', unit, points: value.map((v, i) => ({ soc: soc[i], value: v })) };
}

/** The curve of a study's present taper where it lies in the space, else null. */
export function curveOf(space: TaperSpace, taper: Taper): Curve | null {
  if (taper.shape !== space.kind || taper.unit !== space.unit) return null;
  const curve =
    taper.shape === 'slope'
      ? { soc: taper.points.map((p) => p.soc), value: taper.points.map((p) => p.value) }
      : { soc: [space.lo, ...taper.steps.slice(1).map((s) => s.fromSoc)], value: taper.steps.map((s) => s.value) };
  return liesIn(space, curve) ? curve : null;
}

function liesIn({ kind, monotone, lo, hi, width, least, most }: TaperSpace, { soc, value }: Curve): boolean {
  const last = kind === 'ledges' ? hi - width : hi;
  const apart = soc.every((s, i) => i === 0 || s - soc[i - 1] >= width - 1e-9);
  const falls = !monotone || value.every((v, i) => i === 0 || v <= value[i - 1]);
  const within = value.every((v) => v >= least && v <= most);
  return soc[0] >= lo && soc[soc.length - 1] <= last + 1e-9 && apart && falls && within;
}

/** Soc of each free edge or point: of ledges all but the first, whose place is given. */
const freeFrom = (space: TaperSpace) => (space.kind === 'ledges' ? 1 : 0);

/** A curve as a point of the optimiser: logarithms of values, then places in units of `SOC_SCALE`. */
export function toPoint(space: TaperSpace, { soc, value }: Curve): Float64Array {
  return Float64Array.from([...value.map(Math.log), ...soc.slice(freeFrom(space)).map((s) => s / SOC_SCALE)]);
}

export function toCurve(space: TaperSpace, x: ArrayLike<number>): Curve {
  const parts = (x.length + freeFrom(space)) / 2;
  const at = Array.from(x);
  const value = at.slice(0, parts).map((u) => Math.min(space.most, Math.max(space.least, Math.exp(u))));
  const places = at.slice(parts).map((s) => s * SOC_SCALE);
  return { soc: space.kind === 'ledges' ? [space.lo, ...places] : places, value };
}

/** What a step d from x must keep: order, widths, range, least and greatest value. */
export function linearRows(space: TaperSpace, x: Float64Array): LinearRows {
  const { kind, monotone, lo, hi, width, least, most } = space;
  const n = x.length;
  const parts = (n + freeFrom(space)) / 2;
  const rows: LinearRows = { a: [], b: [] };
  const add = (entries: [number, number][], b: number) => {
    const row = new Array<number>(n).fill(0);
    for (const [i, a] of entries) row[i] = a;
    rows.a.push(row);
    rows.b.push(Math.max(0, b));
  };
  for (let i = 0; i < parts; i++) {
    add([[i, 1]], Math.log(most) - x[i]);
    add([[i, -1]], x[i] - Math.log(least));
    if (monotone && i > 0) add([[i, 1], [i - 1, -1]], x[i - 1] - x[i]); // prettier-ignore
  }
  const low = (kind === 'ledges' ? lo + width : lo) / SOC_SCALE;
  const high = (kind === 'ledges' ? hi - width : hi) / SOC_SCALE;
  for (let i = parts; i < n; i++) {
    if (i === parts) add([[i, -1]], x[i] - low);
    else add([[i, -1], [i - 1, 1]], x[i] - x[i - 1] - width / SOC_SCALE); // prettier-ignore
    if (i === n - 1) add([[i, 1]], high - x[i]);
  }
  return rows;
}

/** Number of values of a point. */
export const valuesIn = (space: TaperSpace, x: Float64Array): number => (x.length + freeFrom(space)) / 2;

/** The same curve with its places on the grid of soc; order, widths and range are kept. */
export function onGrid(space: TaperSpace, { soc, value }: Curve): Curve {
  const first = freeFrom(space);
  const width = Math.ceil(space.width / SOC_GRID - 1e-6);
  const low = Math.ceil(space.lo / SOC_GRID - 1e-6);
  const high = Math.floor(space.hi / SOC_GRID + 1e-6);
  const cells = soc.map((s) => Math.round(s / SOC_GRID));
  const from = first === 1 ? Math.ceil((space.lo + space.width) / SOC_GRID - 1e-6) : low;
  const last = first === 1 ? Math.floor((space.hi - space.width) / SOC_GRID + 1e-6) : high;
  for (let i = first; i < cells.length; i++) cells[i] = Math.max(cells[i], i === first ? from : cells[i - 1] + width);
  for (let i = cells.length - 1; i >= first; i--)
    cells[i] = Math.min(cells[i], i === cells.length - 1 ? last : cells[i + 1] - width);
  return { soc: cells.map((c, i) => (i < first ? soc[i] : round(c * SOC_GRID))), value };
}

const round = (soc: number) => Number(soc.toFixed(3));

/** Values cut to five digits, downwards, and kept above the least. */
export function cutValues(space: TaperSpace, { soc, value }: Curve): Curve {
  return { soc, value: value.map((v) => Math.max(cut(v), space.least)) };
}

/** The nearest number of five digits that is not above `v`. */
function cut(v: number): number {
  const unit = 10 ** (Math.floor(Math.log10(v)) - 4);
  const cells = Math.floor(v / unit + 1e-7);
  return Number((cells * unit).toPrecision(5));
}
