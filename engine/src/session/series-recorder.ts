import type { PackSystem } from '../pack/pack-system.ts';
import type { ChargeCurrent } from './charge-current.ts';
import { limitCodes } from './limits.ts';
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
    const { coolant, layout } = system;
    const I = charge.current;
    const V = system.restV + system.ohm * I;
    const anode = system.lowestAnodeV(I);
    series.tS.push(t);
    series.soc.push(system.soc);
    series.packCurrentA.push(I);
    series.packVoltageV.push(V);
    series.stationVoltageV.push(charge.stationVoltage);
    series.stationCurrentA.push(charge.stationCurrent);
    series.stationPowerKw.push((charge.stationVoltage * charge.stationCurrent) / 1000);
    series.batteryPowerKw.push((V * I) / 1000);
    series.highestCellV.push(system.highestCellV(I));
    series.lowestAnodeV.push(Number.isNaN(anode) ? null : anode);
    series.hottestCoreC.push(system.hottestCore(y));
    series.hottestSurfaceC.push(system.hottestSurface);
    series.coldestSurfaceC.push(system.coldestSurface);
    series.coolantInC.push(coolant.inC);
    series.coolantOutC.push(system.coolantOut(y));
    series.loopC.push(y[layout.loop]);
    series.inletC.push(y[layout.inlet]);
    series.chillerW.push(coolant.chillerW);
    series.radiatorW.push(coolant.radiatorW);
    series.heaterW.push(coolant.heaterW);
    series.auxiliaryW.push(system.auxiliaryW);
    series.limit.push(limitCodes[code]);
  }
}
