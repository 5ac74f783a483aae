import { findRoot } from '../integrate/find-root.ts';
import { Solution } from '../integrate/solution.ts';
import type { Stepper } from '../integrate/stepper.ts';
import { type Step } from '../integrate/stepper.ts';
import type { SessionStudy } from '../study/schema.ts';
import {
  allowedBy,
  endsAtCutoff,
  firstHappening,
  MOMENT_S,
  REACHED_V,
  type Happening,
  type SessionSolution,
} from './happenings.ts';
import { energyLedger, thermalLedger } from './ledgers.ts';
import { limitCodes } from './limits.ts';
import { SessionMarks } from './session-marks.ts';
import type { EndReason, RunEvent, SessionResult } from './result.ts';
import { SeriesRecorder } from './series-recorder.ts';
import type { SessionObserver } from './session-observer.ts';
import { inconsistent, NotFinite, SessionSystem } from './session-system.ts';
import { makeStepper, type Accuracy } from './make-stepper.ts';

export type SessionOptions = Accuracy & {
  /** Output grid [s]. */
  everyS?: number;
  /** Called now and then with the share done, 0 to 1. */
  onProgress?: (share: number) => void;
  /** Stop the integration where one limit hands over to another (default), or let steps run across. */
  stopAtSwitchOvers?: boolean;
  /** Shown every moment the run looks at. */
  observer?: SessionObserver;
};

export type RunStatistics = { evaluations: number; looks: number; steps: number; starts: number; rows: number };

export type SessionRun = {
  result: SessionResult;
  /** All states and ledger integrals at the end, in the order of `Layout`. */
  finalState: number[];
  statistics: RunStatistics;
};

export const DEFAULT_EVERY_S = 10;
const MAX_HAND_OVERS = 10_000;
/** A ledge is left downwards only this far below its edge, so that the dip at plug-in does not rattle on one [soc]. */
const LEDGE_LEFT_SOC = 1e-6;
/** Longest gap between two looks at the solution [s], whatever the output grid. */
const LONGEST_LOOK_S = 15;

/**
 * Runs one charging session.
 *
 * @param study    a checked session study
 * @returns        metrics, ledgers, events and series as a result file holds them (engine/MODEL.md, section 8)
 * @throws {StudyError} `REFUSED` where the session cannot start; `BUDGET` or `INCONSISTENT` where it cannot be integrated
 */
export function simulateSession(study: SessionStudy, options: SessionOptions = {}): SessionRun {
  return new SessionSimulation(study, options).run();
}

class SessionSimulation {
  private readonly system: SessionSystem;
  private readonly solution: SessionSolution;
  private readonly stepper: Stepper;
  private readonly recorder: SeriesRecorder;
  private readonly marks: SessionMarks;
  private readonly events: RunEvent[] = [];
  private readonly powerSteps: { atS: number; watts: number }[];
  private readonly everyS: number;
  private readonly endS: number;

  /** Where the integration stands: time [s] and whole state. */
  private t = 0;
  private y: number[];
  /** Up to when rows, marks and hand-overs are settled [s]. */
  private settledS = 0;
  /** Limit in force (index in `limitCodes`), since when [s], and how often it has changed. */
  private code = -1;
  private heldSinceS = 0;
  private handOvers = 0;
  private nextRowS: number;
  private ended: EndReason | null = null;

  constructor(
    private readonly study: SessionStudy,
    private readonly options: SessionOptions,
  ) {
    this.system = new SessionSystem(study);
    this.solution = new Solution(this.system, this.system.start, this.system.pack.layout.integrals);
    this.stepper = makeStepper(this.system.derivative, this.system.pack, options);
    this.recorder = new SeriesRecorder(this.system.pack, this.system.charge);
    this.marks = new SessionMarks(study.session.startSoc, this.solution);
    this.y = this.system.start;
    this.everyS = options.everyS ?? DEFAULT_EVERY_S;
    this.nextRowS = this.everyS;
    this.endS = study.session.maxMin * 60;
    this.powerSteps = (study.station.powerSteps ?? []).map(({ atMin, powerKw }) => ({
      atS: atMin * 60,
      watts: powerKw * 1000,
    }));
  }

  run(): SessionRun {
    this.plugIn();
    while (this.ended === null) this.integrate();
    return this.finish();
  }

  private plugIn(): void {
    const { startSoc, targetSoc } = this.study.session;
    if (this.system.boosted) this.event('boost');
    this.system.taper.startAt(startSoc);
    if (this.powerSteps[0]?.atS === 0) this.takePowerStep();
    this.solution.decide(0);
    this.climbVoltageLedges();
    this.code = this.system.charge.code;
    this.event(`limit:${limitCodes[this.code]}`);
    this.options.observer?.begin?.(this.solution);
    this.row(this.code);
    this.sample(0);
    if (startSoc >= targetSoc) this.end('target');
    else if (this.isSpent()) this.end('cutoff');
  }

  /** Integrates from here to the next jump, hand-over or end. */
  private integrate(): void {
    const nextPowerS = this.powerSteps[0]?.atS ?? Infinity;
    const stopS = Math.min(this.endS, nextPowerS);
    this.system.followed = this.options.stopAtSwitchOvers === false ? -1 : this.code;
    try {
      for (const step of this.stepper.from(this.t, this.y, stopS)) {
        this.solution.advance(step);
        if (this.walk(step, stopS)) return;
        this.t = step.t1;
        this.y = step.y;
        this.options.onProgress?.(this.share());
      }
    } catch (error) {
      if (!(error instanceof NotFinite)) throw error;
      if (this.stepper.shorten()) return;
      throw this.system.stuckAt(this.t, this.y);
    }
    if (nextPowerS < this.endS) this.jump(() => this.takePowerStep());
    else this.finalRow('maxMin');
  }

  private share(): number {
    const { startSoc, targetSoc, maxMin } = this.study.session;
    const charged = (this.system.pack.soc - startSoc) / (targetSoc - startSoc);
    return Math.min(1, Math.max(0, charged, this.t / 60 / maxMin));
  }

  /**
   * Looks along one step, from grid row to grid row, until its end or until something happens on the way.
   * Returns true where the integration must start again or is over.
   */
  private walk(step: Step, stopS: number): boolean {
    const crossing = this.socCrossing(step);
    const end = crossing?.t ?? step.t1;
    const quietEnd = crossing === null && end < stopS;
    while (this.settledS < end) {
      const from = this.settledS;
      const to = Math.min(this.nextRowS, from + LONGEST_LOOK_S, end);
      const happening = firstHappening(this.solution, this.code, this.study.strategy.cutoffA, from, to);
      this.settle(step, happening?.t ?? to);
      if (happening !== null) {
        if (this.take(happening)) return true;
      } else if (to >= this.nextRowS && (to < end || quietEnd)) {
        this.row(this.code);
        this.nextRowS = this.rowAfter(to);
      }
    }
    if (crossing === null) return false;
    this.stopAt(end);
    if (crossing.ledge === null) this.finalRow('target');
    else this.jump(() => this.takeLedge(crossing.ledge!));
    return true;
  }

  /** Takes the marks and extremes on the way to a moment, and leaves the system showing it. */
  private settle(step: Step, t: number): void {
    this.solution.look(t);
    this.sample(t);
    this.marks.pass(step, this.settledS, t);
    this.options.observer?.pass?.(step, this.settledS, t);
    this.settledS = t;
  }

  /** Takes the moment shown into the extremes. */
  private sample(t: number): void {
    this.marks.sample(t);
    this.options.observer?.sample?.(t, this.code);
  }

  /** What comes next does not go on from here: a jump, or the end. */
  private close(): void {
    this.marks.close();
    this.options.observer?.close?.();
  }

  private rowAfter(t: number): number {
    return (Math.floor(t / this.everyS + 1e-9) + 1) * this.everyS;
  }

  /** Where this step first meets the target or a ledge's edge, by soc alone. */
  private socCrossing(step: Step): { t: number; ledge: number | null } | null {
    const { taper, pack } = this.system;
    const { targetSoc } = this.study.session;
    const left = taper.startSoc - LEDGE_LEFT_SOC;
    const z = step.dense(0, step.t1);
    if (taper.endSoc < targetSoc && z >= pack.zAt(taper.endSoc))
      return { t: whenAt(step, pack.zAt(taper.endSoc)), ledge: taper.step + 1 };
    if (z >= pack.zAt(targetSoc)) return { t: whenAt(step, pack.zAt(targetSoc)), ledge: null };
    if (left > -Infinity && z < pack.zAt(left)) return { t: whenAt(step, pack.zAt(left)), ledge: taper.step - 1 };
    return null;
  }

  /** Deals with what happened at the moment just settled; true where the integration must start again or is over. */
  private take({ t, kind, code }: Happening): boolean {
    if (kind === 'hand-over') {
      this.row(this.code);
      this.row(code);
      if (t === this.nextRowS) this.nextRowS = this.rowAfter(t);
      this.changeCode(t, code);
      const spent = endsAtCutoff(code) && allowedBy(this.solution, code) <= this.study.strategy.cutoffA;
      if (!spent && this.options.stopAtSwitchOvers === false) return false;
      this.stopAt(t);
      if (spent) this.end('cutoff');
      return true;
    }
    this.stopAt(t);
    if (kind === 'cutoff') this.finalRow('cutoff');
    else this.jump(() => this.climbVoltageLedges());
    return true;
  }

  private changeCode(t: number, code: number): void {
    if (code === this.code) return;
    if (++this.handOvers > MAX_HAND_OVERS) throw inconsistent(t);
    this.marks.hold(this.code, t - this.heldSinceS);
    this.code = code;
    this.heldSinceS = t;
    this.events.push({ tS: t, event: `limit:${limitCodes[code]}` });
  }

  /** Whether the current shown now ends the session. */
  private isSpent(): boolean {
    const { charge } = this.system;
    return endsAtCutoff(charge.code) && charge.current <= this.study.strategy.cutoffA;
  }

  private takePowerStep(): void {
    const { watts } = this.powerSteps.shift()!;
    this.system.charge.stationPowerW = Math.min(watts, this.study.station.powerMaxKw * 1000);
    this.event(`power:${watts / 1000}`);
  }

  private takeLedge(step: number): void {
    this.system.taper.step = step;
    this.event(`ledge:${step + 1}`);
  }

  /** Moves to the step that the highest cell voltage has reached; moves chain at once. */
  private climbVoltageLedges(): void {
    const { taper, pack, charge } = this.system;
    while (pack.highestCellV(charge.current) >= taper.endV - REACHED_V) {
      this.takeLedge(taper.step + 1);
      this.solution.decide(this.t);
    }
  }

  /** Makes a change at the present moment, and records both sides where the current jumps. */
  private jump(change: () => void): void {
    const { charge } = this.system;
    const { t, code } = this;
    this.close();
    this.solution.look(t);
    const before = charge.current;
    this.row(code);
    change();
    this.solution.decide(t);
    const jumped = Math.abs(charge.current - before) > 1e-9 * (1 + Math.abs(before)) || charge.code !== code;
    const onGrid = t === this.nextRowS;
    if (onGrid) this.nextRowS = this.rowAfter(t);
    if (jumped) this.row(charge.code);
    else if (!onGrid) this.dropRow();
    this.changeCode(t, charge.code);
    this.sample(t);
    if (this.isSpent()) this.end('cutoff');
  }

  private row(code: number): void {
    this.recorder.row(this.solution.at, this.solution.seen, code);
    this.options.observer?.row?.(this.solution.at, code);
  }

  private dropRow(): void {
    this.recorder.drop();
    this.options.observer?.dropRow?.();
  }

  private finalRow(reason: EndReason): void {
    this.solution.look(this.t);
    this.row(this.code);
    this.end(reason);
  }

  private end(reason: EndReason): void {
    this.close();
    this.marks.hold(this.code, this.t - this.heldSinceS);
    this.ended = reason;
    this.event(`end:${reason}`);
  }

  private stopAt(t: number): void {
    this.t = t;
    this.y = this.solution.stateAt(t);
  }

  private event(event: string): void {
    this.events.push({ tS: this.t, event });
  }

  private finish(): SessionRun {
    const { pack, start } = this.system;
    const result: SessionResult = {
      format: 'voltiplano/result',
      version: 1,
      kind: 'session',
      title: this.study.title ?? '',
      metrics: this.marks.metrics(this.ended!, this.t, this.y, this.study.session),
      energyLedger: energyLedger(pack, start, this.y, this.study.station.rectifierEfficiency),
      thermalLedger: thermalLedger(pack, start, this.y),
      events: this.events,
      series: this.recorder.series,
    };
    const { evaluations, steps, starts } = this.stepper;
    const statistics = { evaluations, looks: this.solution.looks, steps, starts, rows: result.series.tS.length };
    return { result, finalState: this.y, statistics };
  }
}

/** When z passes a value within a step that meets it [s]. */
function whenAt(step: Step, z: number): number {
  const off = (t: number) => step.dense(0, t) - z;
  return findRoot(off, step.t0, off(step.t0), step.t1, off(step.t1), MOMENT_S);
}
