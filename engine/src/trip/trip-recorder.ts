import type { PackSystem } from '../pack/pack-system.ts';
import { limitCodes } from '../session/limits.ts';
import { pushPackRow } from '../session/pack-columns.ts';
import type { TripSeries } from './result.ts';

/** Writes rows of a trip's series on its own clock. */
export class TripRecorder {
  readonly series: TripSeries = {
    tS: [],
    km: [],
    phase: [],
    soc: [],
    packCurrentA: [],
    packVoltageV: [],
    stationVoltageV: [],
    stationCurrentA: [],
    stationPowerKw: [],
    batteryPowerKw: [],
    highestCellV: [],
    lowestAnodeV: [],
    hottestCoreC: [],
    hottestSurfaceC: [],
    coldestSurfaceC: [],
    coolantInC: [],
    coolantOutC: [],
    loopC: [],
    inletC: [],
    chillerW: [],
    radiatorW: [],
    heaterW: [],
    auxiliaryW: [],
    limit: [],
  };

  constructor(private readonly pack: PackSystem) {}

  /** Adds a driving row for the state last observed; `code` is the limit that holds regeneration, or −1. */
  drive(t: number, km: number, y: ArrayLike<number>, current: number, code: number): void {
    const { series } = this;
    pushPackRow(series, this.pack, y, t, current);
    series.km.push(km);
    series.phase.push('drive');
    series.stationVoltageV.push(null);
    series.stationCurrentA.push(null);
    series.stationPowerKw.push(null);
    series.limit.push(code < 0 ? null : limitCodes[code]);
  }
}
