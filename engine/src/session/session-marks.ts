import { findRoot } from '../integrate/find-root.ts';
import type { Step } from '../integrate/stepper.ts';
import { INTEGRAL } from '../pack/layout.ts';
import type { Session } from '../study/schema.ts';
import { Extreme } from './extreme.ts';
import { J_PER_KWH } from './ledgers.ts';
import { limitCodes, type LimitCode } from './limits.ts';
import type { EndReason, MinuteMark, SessionMetrics, SocMark } from './result.ts';
import type { SessionSolution } from './happenings.ts';

const SOC_MARKS = ['10', '20', '30', '40', '50', '60', '70', '80', '90', '100'] as const;
const MINUTE_MARKS = ['10', '15', '20', '30'] as const;

type SocReading = { tS: number; stationJ: number; batteryJ: number };
/** One quantity whose highest value is wanted, and how to read it after a look. */
type Tracked = { extreme: Extreme; read: () => number };

/** Collects, while a session runs, what its metrics need. */
export class SessionMarks {
  private readonly atSoc = new Map<SocMark, SocReading>();
  private readonly batteryJAt = new Map<MinuteMark, number>();
  private readonly heldS = new Float64Array(limitCodes.length);
  private readonly tracked: Tracked[];
  private socWaiting: SocMark[];
  private minuteWaiting: MinuteMark[] = [...MINUTE_MARKS];

  constructor(
    private readonly startSoc: number,
    private readonly solution: SessionSolution,
  ) {
    const { seen, system } = solution;
    const { pack, charge } = system;
    for (const mark of SOC_MARKS)
      if (Number(mark) / 100 === startSoc) this.atSoc.set(mark, { tS: 0, stationJ: 0, batteryJ: 0 });
    this.socWaiting = SOC_MARKS.filter((mark) => Number(mark) / 100 > startSoc);
    this.tracked = [
      () => (charge.stationVoltage * charge.stationCurrent) / 1000,
      () => ((pack.restV + pack.ohm * charge.current) * charge.current) / 1000,
      () => pack.hottestCore(seen),
      ...(pack.curves.anode === null ? [] : [() => -1000 * pack.lowestAnodeV(charge.current)]),
    ].map((read) => ({
      extreme: new Extreme(
        this.lookingAt(read),
        this.lookingAt(() => pack.soc),
      ),
      read,
    }));
  }

  /** Takes the moment just looked at into the extremes; leaves the system showing it. */
  sample(t: number): void {
    const { tracked, solution } = this;
    for (let i = 0; i < tracked.length; i++) {
      solution.look(t);
      tracked[i].extreme.sample(t, tracked[i].read());
    }
    solution.look(t);
  }

  /** A jump or the end comes next: what lies before it says nothing about peaks after it. */
  close(): void {
    for (const { extreme } of this.tracked) extreme.close();
  }

  private lookingAt(read: () => number): (t: number) => number {
    return (t) => {
      this.solution.look(t);
      return read();
    };
  }

  /** Adds to the time that a limit held [s]. */
  hold(code: number, seconds: number): void {
    this.heldS[code] += seconds;
  }

  /** Notes soc and minute marks passed between two moments of a step. */
  pass(step: Step, from: number, to: number): void {
    const { layout } = this.solution.system.pack;
    while (this.socWaiting.length > 0 && step.dense(0, to) >= this.zAt(this.socWaiting[0])) {
      const mark = this.socWaiting[0];
      const z = this.zAt(mark);
      const off = (t: number) => step.dense(0, t) - z;
      const start = off(from);
      const tS = start < 0 ? findRoot(off, from, start, to, off(to), 1e-7) : from;
      this.atSoc.set(mark, {
        tS,
        stationJ: step.dense(layout.integrals + INTEGRAL.station, tS),
        batteryJ: step.dense(layout.integrals + INTEGRAL.battery, tS),
      });
      this.socWaiting = this.socWaiting.slice(1);
    }
    while (this.minuteWaiting.length > 0 && Number(this.minuteWaiting[0]) * 60 <= to) {
      const mark = this.minuteWaiting[0];
      this.batteryJAt.set(mark, step.dense(layout.integrals + INTEGRAL.battery, Number(mark) * 60));
      this.minuteWaiting = this.minuteWaiting.slice(1);
    }
  }

  private zAt(mark: SocMark): number {
    return this.solution.system.pack.zAt(Number(mark) / 100);
  }

  /** The session's headline numbers, from its end at `endS` with the whole state `y`. */
  metrics(endReason: EndReason, endS: number, y: readonly number[], session: Session): SessionMetrics {
    const { zLow, zSpan, layout } = this.solution.system.pack;
    const stationJ = y[layout.integrals + INTEGRAL.station];
    const batteryJ = y[layout.integrals + INTEGRAL.battery];
    const target = String(Math.round(session.targetSoc * 100)) as SocMark;
    if (endReason === 'target' && this.socWaiting[0] === target && Number(target) / 100 === session.targetSoc)
      this.atSoc.set(target, { tS: endS, stationJ, batteryJ });
    const endSoc = endReason === 'target' && endS > 0 ? session.targetSoc : (y[0] - zLow) / zSpan;
    const after = (mark: MinuteMark) => (this.batteryJAt.get(mark) ?? batteryJ) / J_PER_KWH;
    const km = (mark: MinuteMark) => (after(mark) * 1000) / session.whPerKm;
    return {
      endReason,
      endMin: endS / 60,
      endSoc,
      minutesToSoc: record(SOC_MARKS, (mark) => this.minutesAt(mark)),
      minutes0To50: this.startSoc === 0 ? this.minutesAt('50') : null,
      minutes10To80: this.between10And80((a, b) => (b.tS - a.tS) / 60),
      minutes0To100: this.startSoc === 0 ? this.minutesAt('100') : null,
      ...this.peaks(),
      meanStationPower10To80Kw: this.between10And80((a, b) => (b.stationJ - a.stationJ) / (b.tS - a.tS) / 1000),
      meanBatteryPower10To80Kw: this.between10And80((a, b) => (b.batteryJ - a.batteryJ) / (b.tS - a.tS) / 1000),
      batteryKwhAfterMin: record(MINUTE_MARKS, after),
      kmAfterMin: record(MINUTE_MARKS, km),
      ...this.temperatures(),
      limitMinutes: record(limitCodes, (code: LimitCode) => this.heldS[limitCodes.indexOf(code)] / 60),
    };
  }

  private minutesAt(mark: SocMark): number | null {
    const reading = this.atSoc.get(mark);
    return reading ? reading.tS / 60 : null;
  }

  private between10And80(value: (at10: SocReading, at80: SocReading) => number): number | null {
    const at10 = this.atSoc.get('10');
    const at80 = this.atSoc.get('80');
    return at10 && at80 ? value(at10, at80) : null;
  }

  private peaks() {
    const [station, battery] = this.tracked.map(({ extreme }) => extreme);
    return {
      peakStationPowerKw: station.value,
      peakStationPowerMin: station.tS / 60,
      peakStationPowerSoc: station.soc,
      peakBatteryPowerKw: battery.value,
      peakBatteryPowerMin: battery.tS / 60,
      peakBatteryPowerSoc: battery.soc,
    };
  }

  private temperatures() {
    const [, , core, anode] = this.tracked.map(({ extreme }) => extreme);
    return {
      hottestCoreC: core.value,
      hottestCoreMin: core.tS / 60,
      lowestAnodeMv: anode ? -anode.value : null,
      lowestAnodeMin: anode ? anode.tS / 60 : null,
    };
  }
}

function record<K extends string, V>(keys: readonly K[], value: (key: K) => V): Record<K, V> {
  return Object.fromEntries(keys.map((key) => [key, value(key)])) as Record<K, V>;
}
