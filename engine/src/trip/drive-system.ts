import { INTEGRAL } from '../pack/layout.ts';
import { PackSystem } from '../pack/pack-system.ts';
import { inletOf } from '../session/plug-in.ts';
import { NotFinite } from '../session/session-system.ts';
import { PackLimits } from '../session/pack-limits.ts';
import type { Leg, TripStudy } from '../study/schema.ts';
import { cabinPower, tractionPower } from '../vehicle/road-load.ts';
import { DriveCurrent } from './drive-current.ts';

/** Pack, heat and load while driving one leg, ready to be integrated. */
export class DriveSystem {
  readonly pack: PackSystem;
  readonly drive: DriveCurrent;
  /** What the pack is held to while it gives: current [A], cell voltage [V]. */
  readonly dischargeMaxA: number;
  readonly vMinV: number;

  constructor(private readonly study: TripStudy) {
    this.pack = new PackSystem({ ...study, inlet: inletOf(study) });
    this.drive = new DriveCurrent(this.pack, new PackLimits(study, this.pack));
    this.dischargeMaxA = study.pack.dischargeCurrentMaxA ?? Infinity;
    this.vMinV = study.cell.vMinV;
  }

  /** Cells and coolant at the trip's start temperature, RC pairs at rest, inlet at the first ambient. */
  startState(): number[] {
    const { layout, zLow, zSpan } = this.pack;
    const { startSoc, startTempC, legs } = this.study.trip;
    const y = new Array<number>(layout.size).fill(0);
    y[0] = zLow + startSoc * zSpan;
    y.fill(startTempC, layout.core, layout.rc);
    y[layout.loop] = startTempC;
    y[layout.inlet] = this.ambientOf(legs[0]);
    return y;
  }

  /** Sets load and surroundings for a leg. */
  enter(leg: Leg): void {
    const { vehicle } = this.study;
    const ambientC = this.ambientOf(leg);
    const speedMps = leg.kmPerH / 3.6;
    this.pack.ambientC = ambientC;
    this.pack.speed = speedMps;
    this.pack.hotelW = vehicle.hotelW + cabinPower(vehicle, ambientC);
    const sinSlope = leg.climbM / (leg.km * 1000);
    this.drive.tractionW = tractionPower(vehicle, { speedMps, windMps: leg.windKmPerH / 3.6, sinSlope, ambientC });
  }

  at(_t: number, y: ArrayLike<number>): void {
    this.pack.observe(y);
    this.drive.decide();
  }

  /** dy/dt for the integrator; the inlet carries nothing. */
  readonly derivative = (_t: number, y: number[], dy: number[]): void => {
    const { pack, drive } = this;
    const { integrals, inlet } = pack.layout;
    pack.observe(y);
    drive.decide();
    pack.current = drive.current;
    pack.inletCurrent = 0;
    pack.rates(y, dy);
    dy[integrals + INTEGRAL.station] = 0;
    dy[integrals + INTEGRAL.boostLoss] = 0;
    const sum = dy[integrals + INTEGRAL.battery] + dy[integrals + INTEGRAL.ambient] + pack.coolant.outC + y[inlet];
    if (!(sum - sum === 0)) throw new NotFinite();
  };

  private ambientOf(leg: Leg): number {
    return leg.ambientC ?? this.study.trip.ambientC!;
  }
}
