import type { PackSystem } from '../pack/pack-system.ts';
import type { ChargeCurrent } from './charge-current.ts';
import { limitCodes } from './limits.ts';
import { pushPackRow } from './pack-columns.ts';
import type { SessionSeries } from './result.ts';

/** Writes rows of the series from what the system shows at a moment. */
export class SeriesRecorder {
  readonly series: SessionSeries = {
    tS: [],
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

  constructor(
    private readonly system: PackSystem,
    private readonly charge: ChargeCurrent,
  ) {}

  /** Takes the last row back. */
  drop(): void {
    for (const column of Object.values(this.series)) column.pop();
  }

  /** Adds a row for the state last observed and decided, under a limit's name. */
  row(t: number, y: ArrayLike<number>, code: number): void {
    const { system, charge, series } = this;
    pushPackRow(series, system, y, t, charge.current);
    series.stationVoltageV.push(charge.stationVoltage);
    series.stationCurrentA.push(charge.stationCurrent);
    series.stationPowerKw.push((charge.stationVoltage * charge.stationCurrent) / 1000);
    series.limit.push(limitCodes[code]);
  }
}
