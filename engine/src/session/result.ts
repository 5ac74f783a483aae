import type { LimitCode } from './limits.ts';

export type EndReason = 'target' | 'cutoff' | 'maxMin';

export type SocMark = '10' | '20' | '30' | '40' | '50' | '60' | '70' | '80' | '90' | '100';
export type MinuteMark = '10' | '15' | '20' | '30';

/** Headline numbers of a session; null where the session did not cover them. */
export type SessionMetrics = {
  endReason: EndReason;
  endMin: number;
  endSoc: number;
  minutesToSoc: Record<SocMark, number | null>;
  minutes0To50: number | null;
  minutes10To80: number | null;
  minutes0To100: number | null;
  peakStationPowerKw: number;
  peakStationPowerMin: number;
  peakStationPowerSoc: number;
  peakBatteryPowerKw: number;
  peakBatteryPowerMin: number;
  peakBatteryPowerSoc: number;
  meanStationPower10To80Kw: number | null;
  meanBatteryPower10To80Kw: number | null;
  batteryKwhAfterMin: Record<MinuteMark, number>;
  kmAfterMin: Record<MinuteMark, number>;
  hottestCoreC: number;
  hottestCoreMin: number;
  lowestAnodeMv: number | null;
  lowestAnodeMin: number | null;
  limitMinutes: Record<LimitCode, number>;
};

/** Where the energy went, grid to cells [kWh]; `remainderKwh` is what the integration left unexplained. */
export type EnergyLedger = {
  gridKwh: number;
  rectifierLossKwh: number;
  stationKwh: number;
  inletKwh: number;
  boostLossKwh: number;
  auxiliariesKwh: number;
  busbarKwh: number;
  ohmicKwh: number;
  polarisationKwh: number;
  reversibleKwh: number;
  storedKwh: number;
  rcPairsKwh: number;
  remainderKwh: number;
};

/** Where the heat went [kJ]: cells + busbar = stored in cores, surfaces, loop, moved out, less the heater's. */
export type ThermalLedger = {
  cellsKj: number;
  busbarKj: number;
  coresKj: number;
  surfacesKj: number;
  loopKj: number;
  chillerKj: number;
  radiatorKj: number;
  ambientKj: number;
  heaterKj: number;
  remainderKj: number;
};

/** Columns on the output grid, and on both sides of every jump and change of limit. */
export type SessionSeries = {
  tS: number[];
  soc: number[];
  packCurrentA: number[];
  packVoltageV: number[];
  stationVoltageV: number[];
  stationCurrentA: number[];
  stationPowerKw: number[];
  batteryPowerKw: number[];
  highestCellV: number[];
  lowestAnodeV: (number | null)[];
  hottestCoreC: number[];
  hottestSurfaceC: number[];
  coldestSurfaceC: number[];
  coolantInC: number[];
  coolantOutC: number[];
  loopC: number[];
  inletC: number[];
  chillerW: number[];
  radiatorW: number[];
  heaterW: number[];
  auxiliaryW: number[];
  limit: LimitCode[];
};

export type RunEvent = { tS: number; event: string };

/** What a session run returns; exactly these keys are written to a result file. */
export type SessionResult = {
  format: 'voltiplano/result';
  version: 1;
  kind: 'session';
  title: string;
  metrics: SessionMetrics;
  energyLedger: EnergyLedger;
  thermalLedger: ThermalLedger;
  events: RunEvent[];
  series: SessionSeries;
};
