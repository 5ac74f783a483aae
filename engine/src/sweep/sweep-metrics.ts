import { limitCodes, type LimitCode } from '../session/limits.ts';
import type { EndReason, SessionResult } from '../session/result.ts';

export const endReasons = ['target', 'cutoff', 'maxMin'] as const satisfies readonly EndReason[];

/** One number of every cell. */
export type SweepMetric = {
  id: string;
  label: string;
  unit: string;
  /** What the number is: a value, or an index into `limitCodes` or `endReasons`. */
  kind: 'value' | 'limit' | 'endReason';
};

type Read = (result: SessionResult) => number | null;
type Row = SweepMetric & { read: Read };

const value = (id: string, label: string, unit: string, read: Read): Row => ({ id, label, unit, kind: 'value', read });

const rows: Row[] = [
  value('minutes0To50', '0–50 %', 'min', ({ metrics }) => metrics.minutes0To50),
  value('minutes10To80', '10–80 %', 'min', ({ metrics }) => metrics.minutes10To80),
  value('minutes0To100', '0–100 %', 'min', ({ metrics }) => metrics.minutes0To100),
  value('endMin', 'Session', 'min', ({ metrics }) => metrics.endMin),
  value('endSoc', 'End soc', '', ({ metrics }) => metrics.endSoc),
  value('peakStationPowerKw', 'Peak at station', 'kW', ({ metrics }) => metrics.peakStationPowerKw),
  value('peakBatteryPowerKw', 'Peak at pack', 'kW', ({ metrics }) => metrics.peakBatteryPowerKw),
  value('meanStationPower10To80Kw', 'Mean 10–80 %, station', 'kW', ({ metrics }) => metrics.meanStationPower10To80Kw),
  value('meanBatteryPower10To80Kw', 'Mean 10–80 %, pack', 'kW', ({ metrics }) => metrics.meanBatteryPower10To80Kw),
  value('kmAfter10Min', 'In 10 min', 'km', ({ metrics }) => metrics.kmAfterMin['10']),
  value('kmAfter20Min', 'In 20 min', 'km', ({ metrics }) => metrics.kmAfterMin['20']),
  value('kmAfter30Min', 'In 30 min', 'km', ({ metrics }) => metrics.kmAfterMin['30']),
  value('hottestCoreC', 'Hottest core', '°C', ({ metrics }) => metrics.hottestCoreC),
  value('lowestAnodeMv', 'Lowest anode', 'mV', ({ metrics }) => metrics.lowestAnodeMv),
  value('gridKwh', 'From the grid', 'kWh', ({ energyLedger }) => energyLedger.gridKwh),
  value('stationKwh', 'From the station', 'kWh', ({ energyLedger }) => energyLedger.stationKwh),
  value('storedKwh', 'Stored', 'kWh', ({ energyLedger }) => energyLedger.storedKwh),
  { ...value('endReason', 'Ended by', '', ({ metrics }) => endReasons.indexOf(metrics.endReason)), kind: 'endReason' },
  { ...value('dominantLimit', 'Held back most by', '', dominantLimit), kind: 'limit' },
  ...limitCodes.map((code) =>
    value(`limitMinutes.${code}`, `Held by ${code}`, 'min', ({ metrics }) => metrics.limitMinutes[code]),
  ),
];

/** What every cell of a sweep is asked for (engine/MODEL.md, section 16), in the order of the columns. */
export const sweepMetrics: readonly SweepMetric[] = rows.map(({ read: _, ...metric }) => metric);
export const metricColumns: string[] = rows.map(({ id }) => id);

/**
 * The limit that held longest between 10 and 80 % (index in `limitCodes`): from plug-in where the session starts above 10 %,
 * to its end where it does not reach 80 %, and over all of it where it starts at 80 % or above. Of equal times the one
 * listed first.
 */
function dominantLimit({ metrics, events, series }: SessionResult): number {
  const endS = metrics.endMin * 60;
  const startsLate = series.soc[0] >= 0.8;
  const fromS = startsLate ? 0 : (metrics.minutesToSoc['10'] ?? 0) * 60;
  const toS = startsLate ? endS : (metrics.minutesToSoc['80'] ?? endS / 60) * 60;
  const heldS = new Float64Array(limitCodes.length);
  let code = -1;
  let sinceS = 0;
  const close = (tS: number) => {
    if (code >= 0) heldS[code] += Math.max(0, Math.min(tS, toS) - Math.max(sinceS, fromS));
  };
  for (const { tS, event } of events) {
    if (!event.startsWith('limit:')) continue;
    close(tS);
    code = limitCodes.indexOf(event.slice('limit:'.length) as LimitCode);
    sinceS = tS;
  }
  close(endS);
  const most = Math.max(...heldS);
  // A session that is over at once held under its only limit for no time at all.
  return most > 0 ? heldS.indexOf(most) : code;
}

/** Soc at which a spread reads station power, in percent. */
export const curveSocPercent: readonly number[] = Array.from({ length: 41 }, (_, i) => i * 2.5);
export const curveColumns: string[] = curveSocPercent.map((percent) => `stationPowerKw@${percent}`);

const ROUNDING = 1e-9;

/** Station power over `curveSocPercent` [kW], linear between rows of the series; NaN where the session was not. */
function curveOf({ series: { soc, stationPowerKw } }: SessionResult): number[] {
  const last = soc.length - 1;
  let row = 0;
  return curveSocPercent.map((percent) => {
    const at = percent / 100;
    // Past the dip at plug-in, in which the pack gives a little away before the station's current has risen.
    while (row < last && soc[row + 1] < at - ROUNDING) row++;
    if (row === last || soc[0] > at + ROUNDING) return NaN;
    const span = soc[row + 1] - soc[row];
    const share = span > 0 ? Math.min(1, (at - soc[row]) / span) : 1;
    return stationPowerKw[row] + share * (stationPowerKw[row + 1] - stationPowerKw[row]);
  });
}

/** Writes a run's numbers for the columns of a plan into one row per column; NaN where the session does not cover it. */
export function writeColumns(
  result: SessionResult,
  columns: readonly string[],
  values: Float64Array,
  cells: number,
  at: number,
): void {
  rows.forEach(({ read }, column) => (values[column * cells + at] = read(result) ?? NaN));
  if (columns.length === rows.length) return;
  curveOf(result).forEach((power, i) => (values[(rows.length + i) * cells + at] = power));
}
