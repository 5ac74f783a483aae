import type { Taper } from '@voltiplano/engine';
import { numberAt, placeOn } from './rows.ts';
import { axisColumn, type StripAxis } from './strip-axis.ts';
import type { StripColumns } from './strip-columns.ts';

/** The strategy's table and what is needed to read it in amperes of the pack. */
export type TaperTable = {
  taper: Taper;
  /** Capacity of one cell times the cells in parallel. */
  packAh: number;
};

export type TaperPoint = { at: number; currentA: number };

/** The table drawn over a run: its line on the axis, and the points a hand would take hold of. */
export type TaperLine = { line: TaperPoint[]; handles: TaperPoint[] };

/**
 * Lays a taper over soc onto a run's axis. Voltage-ledges and maps have no line of their own over soc: null.
 *
 * A table in kW is read at the pack voltage of the run.
 */
export function taperLine({ taper, packAh }: TaperTable, columns: StripColumns, axis: StripAxis): TaperLine | null {
  if (taper.shape !== 'ledges' && taper.shape !== 'slope') return null;
  const xs = axisColumn(columns, axis);
  const last = xs.length - 1;
  const toA = (value: number, row: number, share = 0) => {
    if (taper.unit === 'A') return value;
    if (taper.unit === 'C') return value * packAh;
    return (value * 1000) / numberAt(columns.packV, { index: row, share });
  };
  const at = (percent: number) => placeOn(columns.socPercent, percent);
  const covered = (percent: number) => percent > columns.socPercent[0]! && percent < columns.socPercent[last]!;
  const rows =
    taper.shape === 'ledges'
      ? taper.steps.map((s) => ({ percent: s.fromSoc * 100, value: s.value }))
      : taper.points.map((p) => ({ percent: p.soc * 100, value: p.value }));

  const pointAt = (percent: number, value: number): TaperPoint => {
    const place = at(percent);
    return { at: numberAt(xs, place), currentA: toA(value, place.index, place.share) };
  };
  const handles = rows.filter((row) => covered(row.percent)).map((row) => pointAt(row.percent, row.value));
  const valueAt = (percent: number) =>
    taper.shape === 'ledges' ? ledgeValue(rows, percent) : slopeValue(rows, percent);

  // Corners of the table, and every row of the run where the pack's voltage bends a table in kW.
  const corners = rows.filter((row) => covered(row.percent)).map((row) => row.percent);
  const percents = taper.unit === 'kW' ? columns.socPercent : [columns.socPercent[0]!, columns.socPercent[last]!];
  const stops = [...new Set([...percents, ...corners])].sort((a, b) => a - b);
  const line = stops.flatMap((percent) => {
    const before =
      taper.shape === 'ledges' && corners.includes(percent) ? [pointAt(percent, valueAt(percent - 1e-9))] : [];
    return [...before, pointAt(percent, valueAt(percent))];
  });
  return { line, handles };
}

type TableRow = { percent: number; value: number };

/** Below the first ledge, the first ledge's value. */
function ledgeValue(rows: readonly TableRow[], percent: number): number {
  return (rows.findLast((row) => row.percent <= percent) ?? rows[0]!).value;
}

function slopeValue(rows: readonly TableRow[], percent: number): number {
  return numberAt(
    rows.map((row) => row.value),
    placeOn(
      rows.map((row) => row.percent),
      percent,
    ),
  );
}
