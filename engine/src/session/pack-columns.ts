import type { PackSystem } from '../pack/pack-system.ts';
import type { SessionSeries } from './result.ts';

/** The columns that pack, heat and coolant fill, plugged in or not. */
export type PackColumns = Omit<SessionSeries, 'stationVoltageV' | 'stationCurrentA' | 'stationPowerKw' | 'limit'>;

/** Adds to the pack's columns a row for the state last observed, at a current into the pack [A]. */
export function pushPackRow(
  columns: PackColumns,
  pack: PackSystem,
  y: ArrayLike<number>,
  t: number,
  current: number,
): void {
  const { coolant, layout } = pack;
  const V = pack.restV + pack.ohm * current;
  const anode = pack.lowestAnodeV(current);
  columns.tS.push(t);
  columns.soc.push(pack.soc);
  columns.packCurrentA.push(current);
  columns.packVoltageV.push(V);
  columns.batteryPowerKw.push((V * current) / 1000);
  columns.highestCellV.push(pack.highestCellV(current));
  columns.lowestAnodeV.push(Number.isNaN(anode) ? null : anode);
  columns.hottestCoreC.push(pack.hottestCore(y));
  columns.hottestSurfaceC.push(pack.hottestSurface);
  columns.coldestSurfaceC.push(pack.coldestSurface);
  columns.coolantInC.push(coolant.inC);
  columns.coolantOutC.push(pack.coolantOut(y));
  columns.loopC.push(y[layout.loop]);
  columns.inletC.push(y[layout.inlet]);
  columns.chillerW.push(coolant.chillerW);
  columns.radiatorW.push(coolant.radiatorW);
  columns.heaterW.push(coolant.heaterW);
  columns.auxiliaryW.push(pack.auxiliaryW);
}
