import { Solution } from '../integrate/solution.ts';
import type { Stepper } from '../integrate/stepper.ts';
import { crossing } from '../session/happenings.ts';
import { limitCodes } from '../session/limits.ts';
import { thermalLedger } from '../session/ledgers.ts';
import { makeStepper, type Accuracy } from '../session/make-stepper.ts';
import type { RunEvent } from '../session/result.ts';
import { inconsistent, NotFinite } from '../session/session-system.ts';
import type { Leg } from '../study/schema.ts';
import type { DriveSystem } from './drive-system.ts';
import { legLedger } from './leg-ledgers.ts';
import type { LegResult, TripFailure, TripFailureReason } from './result.ts';
import type { TripRecorder } from './trip-recorder.ts';

/** Longest gap between two looks at the solution [s], whatever the output grid. */
const LONGEST_LOOK_S = 15;

export type DrivenLeg = { leg: LegResult; y: number[]; endS: number; failure?: TripFailure };

type Course = { leg: Leg; startS: number; startKm: number; y: number[]; everyS: number };
type Record = { recorder: TripRecorder; events: RunEvent[] };

/**
 * Drives one leg at constant speed from a state, to its end or to where the pack cannot go on.
 *
 * @param course  the leg, the trip's clock [s] and kilometre at its start, the whole state there, the output grid [s]
 * @param record  rows and events are added to it
 * @see engine/MODEL.md, section 7
 */
export function driveLeg(system: DriveSystem, course: Course, record: Record, accuracy: Accuracy): DrivenLeg {
  return new LegDrive(system, course, record, accuracy).run();
}

class LegDrive {
  private readonly solution: Solution<DriveSystem>;
  private readonly endS: number;
  private t: number;
  private y: number[];
  private settledS: number;
  private nextRowS: number;
  private code = -1;
  private hottestCoreC = -Infinity;

  constructor(
    private readonly system: DriveSystem,
    private readonly course: Course,
    private readonly record: Record,
    private readonly accuracy: Accuracy,
  ) {
    system.enter(course.leg);
    this.solution = new Solution(system, course.y, system.pack.layout.integrals);
    this.t = this.settledS = course.startS;
    this.y = course.y;
    this.endS = course.startS + (course.leg.km / course.leg.kmPerH) * 3600;
    this.nextRowS = this.rowAfter(this.t);
  }

  run(): DrivenLeg {
    const { solution, system } = this;
    solution.decide(this.t);
    this.record.events.push({ tS: this.t, event: 'drive' });
    this.code = system.drive.code;
    this.limitEvent(this.t);
    this.row();
    const atStart = this.failing();
    if (atStart !== null) return this.finish(atStart);
    const failure = this.drive(makeStepper(system.derivative, system.pack, this.accuracy));
    if (failure !== null) return this.finish(failure);
    solution.look(this.endS);
    this.row();
    return this.finish(null);
  }

  private drive(stepper: Stepper): TripFailureReason | null {
    try {
      for (const step of stepper.from(this.t, this.y, this.endS)) {
        this.solution.advance(step);
        const failure = this.walk(step.t1);
        if (failure !== null) return failure;
        this.t = step.t1;
        this.y = step.y;
      }
      return null;
    } catch (error) {
      if (!(error instanceof NotFinite)) throw error;
      if (stepper.shorten()) return this.drive(stepper);
      throw inconsistent(this.t);
    }
  }

  /** Looks along a step; the reason where the pack cannot go on. */
  private walk(end: number): TripFailureReason | null {
    while (this.settledS < end) {
      const from = this.settledS;
      const to = Math.min(this.nextRowS, from + LONGEST_LOOK_S, end);
      this.solution.look(to);
      const reason = this.failing();
      const t = reason === null ? to : crossing(this.solution, () => this.excess(reason), from, to);
      this.passHandOver(from, t);
      this.solution.look(t);
      this.settledS = t;
      this.hottestCoreC = Math.max(this.hottestCoreC, this.system.pack.hottestCore(this.solution.seen));
      if (reason !== null) {
        this.t = t;
        this.y = this.solution.stateAt(t);
        this.row();
        return reason;
      }
      if (to >= this.nextRowS && to < this.endS) {
        this.row();
        this.nextRowS = this.rowAfter(to);
      }
    }
    return null;
  }

  /** Records both sides where the limit that holds regeneration changes between two looks. */
  private passHandOver(from: number, to: number): void {
    this.solution.look(to);
    const { drive } = this.system;
    if (drive.code === this.code) return;
    const held = this.code;
    const t = crossing(this.solution, () => (drive.code === held ? -1 : 1), from, to);
    this.solution.look(t);
    this.row();
    this.code = drive.code;
    this.row();
    this.limitEvent(t);
  }

  private limitEvent(t: number): void {
    if (this.code >= 0) this.record.events.push({ tS: t, event: `limit:${limitCodes[this.code]}` });
  }

  /** Why the pack cannot go on at the moment last looked at, or null. */
  private failing(): TripFailureReason | null {
    const reasons: TripFailureReason[] = ['power', 'discharge-current', 'cell-voltage', 'soc'];
    return reasons.find((reason) => this.excess(reason) > 0) ?? null;
  }

  /** How far a bound of the giving pack is passed, in its own unit: above 0 the leg fails. */
  private excess(reason: TripFailureReason): number {
    const { pack, drive, dischargeMaxA, vMinV } = this.system;
    if (reason === 'power') return -drive.powerRoom;
    if (drive.current >= 0) return -1;
    if (reason === 'discharge-current') return -drive.current - dischargeMaxA;
    if (reason === 'cell-voltage') return vMinV - pack.lowestCellV(drive.current);
    return -pack.soc;
  }

  private kmAt(t: number): number {
    const { leg, startS, startKm } = this.course;
    return startKm + ((t - startS) / 3600) * leg.kmPerH;
  }

  private rowAfter(t: number): number {
    const { everyS } = this.course;
    return (Math.floor(t / everyS + 1e-9) + 1) * everyS;
  }

  private row(): void {
    const { at, seen } = this.solution;
    this.record.recorder.drive(at, this.kmAt(at), seen, this.system.drive.current, this.code);
  }

  private finish(reason: TripFailureReason | null): DrivenLeg {
    const { pack } = this.system;
    const { startS, startKm, y: start } = this.course;
    const km = this.kmAt(this.t) - startKm;
    const ledger = legLedger(pack, start, this.y);
    const leg: LegResult = {
      km,
      minutes: (this.t - startS) / 60,
      startSoc: (start[0] - pack.zLow) / pack.zSpan,
      endSoc: (this.y[0] - pack.zLow) / pack.zSpan,
      batteryKwh: ledger.batteryKwh,
      hottestCoreC: Math.max(this.hottestCoreC, pack.hottestCore(start), pack.hottestCore(this.y)),
      energyLedger: ledger,
      thermalLedger: thermalLedger(pack, start, this.y),
    };
    const driven = { leg, y: this.y, endS: this.t };
    if (reason === null) return driven;
    return { ...driven, failure: { km: startKm + km, reason, message: this.message(reason, startKm + km) } };
  }

  private message(reason: TripFailureReason, km: number): string {
    const { pack, drive, dischargeMaxA, vMinV } = this.system;
    const load = ((drive.tractionW + pack.auxiliaryW) / 1000).toFixed(1);
    const where = `At ${km.toFixed(1)} km`;
    if (reason === 'soc')
      return `${where} the pack is empty: soc has reached 0 with ${(this.course.startKm + this.course.leg.km - km).toFixed(1)} km of the leg to go.`;
    if (reason === 'cell-voltage') return `${where} the lowest cell falls below ${vMinV} V while giving ${load} kW.`;
    if (reason === 'discharge-current')
      return `${where} the load of ${load} kW takes more than the pack’s ${dischargeMaxA} A.`;
    return `${where} no current gives the ${load} kW asked for.`;
  }
}
