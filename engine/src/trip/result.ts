import type { LimitCode } from '../session/limits.ts';
import type { EnergyLedger, RunEvent, SessionMetrics, SessionSeries, ThermalLedger } from '../session/result.ts';

/** Where a leg's or a rest's energy went [kWh]; `batteryKwh` is negative while the pack gives. */
export type DriveLedger = Pick<
  EnergyLedger,
  | 'auxiliariesKwh'
  | 'busbarKwh'
  | 'ohmicKwh'
  | 'polarisationKwh'
  | 'reversibleKwh'
  | 'storedKwh'
  | 'rcPairsKwh'
  | 'remainderKwh'
> & { batteryKwh: number; tractionKwh: number };

export type LegResult = {
  km: number;
  minutes: number;
  startSoc: number;
  endSoc: number;
  batteryKwh: number;
  hottestCoreC: number;
  energyLedger: DriveLedger;
  thermalLedger: ThermalLedger;
};

export type TripFailureReason = 'soc' | 'cell-voltage' | 'discharge-current' | 'power' | 'refused' | 'out-of-reach';
export type TripFailure = { km: number; reason: TripFailureReason; message: string };

export type StopResult = {
  atKm: number;
  overheadMin: number;
  arriveSoc: number;
  departSoc: number;
  rest: { batteryKwh: number; energyLedger: DriveLedger; thermalLedger: ThermalLedger };
  session: { metrics: SessionMetrics; energyLedger: EnergyLedger; thermalLedger: ThermalLedger };
};

type Nullable<T> = { [K in keyof T]: T[K] extends (infer V)[] ? (V | null)[] : T[K] };
type StationColumns = 'stationVoltageV' | 'stationCurrentA' | 'stationPowerKw';

/** Columns of a whole trip on its own clock; the station's are null while not plugged in, `limit` is what holds regeneration. */
export type TripSeries = Omit<SessionSeries, StationColumns | 'limit'> &
  Nullable<Pick<SessionSeries, StationColumns>> & {
    limit: (LimitCode | null)[];
    km: number[];
    phase: ('drive' | 'rest' | 'charge')[];
  };

/** What a trip run returns; exactly these keys are written to a result file. */
export type TripResult = {
  format: 'voltiplano/result';
  version: 1;
  kind: 'trip';
  title: string;
  totalMin: number;
  driveMin: number;
  overheadMin: number;
  chargeMin: number;
  completed: boolean;
  failure?: TripFailure;
  legs: LegResult[];
  stops: StopResult[];
  events: RunEvent[];
  series: TripSeries;
};
