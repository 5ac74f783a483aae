import type { SessionResult } from '@voltiplano/engine';
import type { Units } from '../lib/units.ts';
import { limitSpans, type LimitSpan } from './limit-spans.ts';
import { integralOverHours } from './rows.ts';

/** A session's series as the strips draw it: in shown units, one value per row of the result. */
export type StripColumns = {
  min: number[];
  socPercent: number[];
  stationKw: number[];
  batteryKw: number[];
  packA: number[];
  cellV: number[];
  packV: number[];
  core: number[];
  surface: number[];
  inlet: number[];
  coolantIn: number[];
  /** null on every row where the cell describes no anode. */
  anodeMv: (number | null)[];
  /** Energy into the pack so far. */
  kwhIn: number[];
  /** Distance that energy is worth, in the unit shown. */
  distance: number[];
  spans: LimitSpan[];
};

/** Names of the columns a line can be drawn from. */
export type LineColumn = Exclude<keyof StripColumns, 'min' | 'socPercent' | 'spans'>;

/** Turns a result into columns for drawing. */
export function stripColumns(result: SessionResult, units: Units): StripColumns {
  const { series } = result;
  const percent = (share: number) => share * 100;
  const kwhIn = integralOverHours(series.tS, series.batteryPowerKw);
  const kmPerKwh = kmPerKwhOf(result);
  return {
    min: series.tS.map((t) => t / 60),
    socPercent: series.soc.map(percent),
    stationKw: series.stationPowerKw,
    batteryKw: series.batteryPowerKw,
    packA: series.packCurrentA,
    cellV: series.highestCellV,
    packV: series.packVoltageV,
    core: series.hottestCoreC.map(units.temperature),
    surface: series.hottestSurfaceC.map(units.temperature),
    inlet: series.inletC.map(units.temperature),
    coolantIn: series.coolantInC.map(units.temperature),
    anodeMv: series.lowestAnodeV.map((v) => (v === null ? null : v * 1000)),
    kwhIn,
    distance: kwhIn.map((kwh) => units.distance(kwh * kmPerKwh)),
    spans: limitSpans(series.limit),
  };
}

/** What a kilowatt-hour is worth on the road, as the result itself counts it. */
function kmPerKwhOf({ metrics }: SessionResult): number {
  const kwh = metrics.batteryKwhAfterMin['30'];
  return kwh > 0 ? metrics.kmAfterMin['30'] / kwh : 0;
}
