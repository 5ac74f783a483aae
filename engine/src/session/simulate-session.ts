import { findRoot } from '../integrate/find-root.ts';
import { Stepper, type Step } from '../integrate/stepper.ts';
import type { SessionStudy } from '../study/schema.ts';
import { LIMIT } from './charge-current.ts';
import { energyLedger, thermalLedger } from './ledgers.ts';
import { limitCodes } from './limits.ts';
import { SessionMarks } from './session-marks.ts';
import type { EndReason, RunEvent, SessionResult } from './result.ts';
import { SeriesRecorder } from './series-recorder.ts';
import { inconsistent, NotFinite, SessionSystem } from './session-system.ts';
import { tolerances } from './tolerances.ts';

export type SessionOptions = {
  /** Output grid [s]. */
  everyS?: number;
  /** Relative tolerance of the integration. */
  rtol?: number;
  /** Called now and then with the share done, 0 to 1. */
  onProgress?: (share: number) => void;
  /** Stop the integration where one limit hands over to another (default), or let steps run across. */
  stopAtSwitchOvers?: boolean;
};

export type RunStatistics = { evaluations: number; observations: number; steps: number; starts: number; rows: number };

export type SessionRun = {
  result: SessionResult;
  /** All states and ledger integrals at the end, in the order of `Layout`. */
  finalState: number[];
  statistics: RunStatistics;
};

export const DEFAULT_EVERY_S = 10;
export const DEFAULT_RTOL = 1e-5;
const MAX_EVALUATIONS = 2_000_000;
/** Longest gap between two looks at the solution [s], whatever the output grid. */
const LONGEST_LOOK_S = 15;
/** How exactly moments are found [s]. */
const MOMENT_S = 1e-7;
/** A voltage-ledge counts as reached this near [V]. */
const REACHED_V = 1e-9;

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
  private readonly stepper: Stepper;
  private readonly recorder: SeriesRecorder;
  private readonly marks: SessionMarks;
  private readonly events: RunEvent[] = [];
  private readonly powerSteps: { atS: number; watts: number }[];
  private readonly everyS: number;
  private readonly endS: number;
  private readonly stopAtSwitchOvers: boolean;
  private readonly onProgress: ((share: number) => void) | undefined;

  /** Where the run stands: time [s], full state, and the state last looked at. */
  private t = 0;
  private y: number[];
  private readonly seen: number[];
  private observations = 0;
  /** Limit in force, since when it holds, up to when the solution is settled, and the moment the system shows [s]. */
  private code = -1;
  private lookedS = 0;
  private lookedAt = 0;
  private handOvers = 0;
  private heldSinceS = 0;
  private nextRowS: number;
  private ended: EndReason | null = null;
  /** The step under way and the one before it. */
  private step: Step | null = null;
  private before: Step | null = null;

  constructor(
    private readonly study: SessionStudy,
    options: SessionOptions,
  ) {
    const rtol = options.rtol ?? DEFAULT_RTOL;
    this.everyS = options.everyS ?? DEFAULT_EVERY_S;
    this.stopAtSwitchOvers = options.stopAtSwitchOvers ?? true;
    this.onProgress = options.onProgress;
    this.system = new SessionSystem(study);
    const { pack } = this.system;
    const fastest = this.system.fastest();
    this.stepper = new Stepper(this.system.derivative, {
      ...tolerances(pack, rtol),
      maxStepS: STABLE_STEPS * fastest.seconds,
      firstStepS: Math.min(FIRST_STEP_S, fastest.seconds),
      maxEvaluations: MAX_EVALUATIONS,
      diagnose: () => `the shortest time constant is ${fastest.seconds.toPrecision(3)} s, of ${fastest.name}`,
    });
    this.recorder = new SeriesRecorder(pack, this.system.charge);
    this.seen = new Array<number>(pack.layout.integrals).fill(0);
    this.marks = new SessionMarks(study.session.startSoc, this.system, this.seen, (t) => this.look(t));
    this.y = this.system.start;
    this.nextRowS = this.everyS;
    this.endS = study.session.maxMin * 60;
    this.powerSteps = (study.station.powerSteps ?? []).map(({ atMin, powerKw }) => ({ atS: atMin * 60, watts: powerKw * 1000 }));
  }

  run(): SessionRun {
    this.plugIn();
    while (this.ended === null) this.integrate();
    return this.finish();
  }

  private plugIn(): void {
    const { taper, charge } = this.system;
    const { startSoc, targetSoc } = this.study.session;
    if (this.system.boosted) this.event('boost');
    if (taper.shape === 'ledges') taper.step = taper.stepAtSoc(startSoc);
    if (this.powerSteps[0]?.atS === 0) this.takePowerStep();
    for (let i = 0; i < this.seen.length; i++) this.seen[i] = this.y[i]!;
    this.decideHere();
    this.climbVoltageLedges();
    this.code = charge.code;
    this.event(`limit:${limitCodes[this.code]}`);
    this.recorder.row(0, this.seen, this.code);
    this.marks.sample(0);
    if (startSoc >= targetSoc) this.end('target', false);
    else if (this.isCutoff()) this.end('cutoff', false);
  }

  /** Integrates from here to the next jump, hand-over or end. */
  private integrate(): void {
    const nextPower = this.powerSteps[0]?.atS ?? Infinity;
    const stop = Math.min(this.endS, nextPower);
    this.system.followed = this.stopAtSwitchOvers ? this.code : -1;
    this.before = this.step;
    try {
      for (const step of this.stepper.from(this.t, this.y, stop)) {
        this.step = step;
        if (this.walk(step)) return;
        this.before = step;
        this.t = step.t1;
        this.y = step.y;
        this.onProgress?.(this.share());
      }
    } catch (error) {
      throw error instanceof NotFinite ? inconsistent(this.t) : error;
    }
    if (nextPower < this.endS) this.jump(() => this.takePowerStep());
    else this.end('maxMin');
  }

  private share(): number {
    const { startSoc, targetSoc } = this.study.session;
    return Math.min(1, Math.max(0, (this.system.pack.soc - startSoc) / (targetSoc - startSoc)));
  }

  /**
   * Looks along one step, from grid row to grid row, until its end or until something happens on the way.
   * Returns true where the integration must start again or is over.
   */
  private walk(step: Step): boolean {
    const crossing = this.socCrossing(step);
    const end = crossing?.t ?? step.t1;
    while (this.lookedS < end) {
      const to = Math.min(this.nextRowS, this.lookedS + LONGEST_LOOK_S, end);
      const happening = this.firstBetween(this.lookedS, to);
      this.arrive(happening?.t ?? to, happening === null && (crossing === null || to < end) && to < this.stopS());
      if (happening !== null && this.take(happening)) return true;
    }
    if (crossing === null) return false;
    this.stopAt(end);
    if (crossing.step === null) this.end('target');
    else this.jump(() => this.takeLedge(crossing.step!));
    return true;
  }

  private stopS(): number {
    return Math.min(this.endS, this.powerSteps[0]?.atS ?? Infinity);
  }

  /** Settles a moment: the marks passed on the way to it, extremes, and a row if the grid asks for one. */
  private arrive(t: number, mayRecord: boolean): void {
    this.look(t);
    this.marks.sample(t);
    this.marks.pass(this.step!, this.lookedS, t);
    this.lookedS = t;
    if (!mayRecord || t < this.nextRowS) return;
    this.recorder.row(t, this.seen, this.code);
    this.nextRowS = this.rowAfter(t);
  }

  private rowAfter(t: number): number {
    return (Math.floor(t / this.everyS + 1e-9) + 1) * this.everyS;
  }

  /** Where this step first meets the target or a ledge's edge, by soc alone. */
  private socCrossing(step: Step): { t: number; step: number | null } | null {
    const { taper } = this.system;
    const socEnd = this.socAt(step, step.t1);
    const target = this.study.session.targetSoc;
    const ledges = taper.shape === 'ledges' ? taper.edges : NO_EDGES;
    const next = ledges[taper.step + 1] ?? Infinity;
    const left = (ledges[taper.step] ?? -Infinity) - LEDGE_LEFT_SOC;
    if (next < target && socEnd >= next) return { t: this.whenSoc(step, next), step: taper.step + 1 };
    if (socEnd >= target) return { t: this.whenSoc(step, target), step: null };
    if (socEnd < left) return { t: this.whenSoc(step, left), step: taper.step - 1 };
    return null;
  }

  private socAt(step: Step, t: number): number {
    const { zLow, zSpan } = this.system.pack;
    return (step.dense(0, t) - zLow) / zSpan;
  }

  private whenSoc(step: Step, soc: number): number {
    const off = (t: number) => this.socAt(step, t) - soc;
    return findRoot(off, step.t0, off(step.t0), step.t1, off(step.t1), MOMENT_S);
  }

  /** The first thing that happens after one look and up to the next, if anything does; the next has not been looked at yet. */
  private firstBetween(from: number, to: number): Happening | null {
    const { charge, pack, taper } = this.system;
    this.look(to);
    const code = charge.code;
    const until = taper.shape === 'voltage-ledges' ? (taper.edges[taper.step + 1] ?? Infinity) - REACHED_V : Infinity;
    const overLedge = pack.highestCellV(charge.current) >= until;
    const found: Happening[] = [];
    if (overLedge) found.push({ kind: 'voltage-ledge', t: this.crossing(() => pack.highestCellV(charge.current) - until, from, to) });
    if (code !== this.code) found.push(this.handOver(from, to, code));
    if (ENDING.has(this.code) && this.room() <= 0) found.push({ kind: 'cutoff', t: this.crossing(() => -this.room(), from, to) });
    if (found.length === 0) return null;
    return found.reduce((a, b) => (b.t < a.t ? b : a));
  }

  /** What the limit in force allows above the end current, at the moment last looked at [A]. */
  private room(): number {
    const inletC = this.seen[this.system.pack.layout.inlet]!;
    return this.system.charge.allowedBy(this.code, this.lookedAt, inletC) - this.study.strategy.cutoffA;
  }

  /** First moment at which `value`, read after a look, is no longer below 0; it is not below 0 at `to`. */
  private crossing(value: () => number, from: number, to: number): number {
    const at = (t: number) => {
      this.look(t);
      return value();
    };
    const start = at(from);
    return start >= 0 ? from : findRoot(at, from, start, to, at(to), MOMENT_S);
  }

  /** The moment at which the limit in force gives way to another, which is the one that binds at `to` unless a third comes first. */
  private handOver(from: number, to: number, code: number): Happening {
    const { charge, pack } = this.system;
    const held = this.code;
    let t = to;
    for (let round = 0; round < limitCodes.length; round++) {
      const other = code;
      const lead = () => {
        const inletC = this.seen[pack.layout.inlet]!;
        return charge.allowedBy(held, this.lookedAt, inletC) - charge.allowedBy(other, this.lookedAt, inletC);
      };
      t = this.crossing(lead, from, t);
      this.look(t);
      if (charge.code === held || charge.code === other) break;
      code = charge.code;
    }
    return { kind: 'hand-over', t, code };
  }

  /** Deals with what happened at the moment just arrived at; true where the integration must start again or is over. */
  private take(happening: Happening): boolean {
    const { t } = happening;
    if (happening.kind === 'cutoff') {
      this.stopAt(t);
      this.end('cutoff');
      return true;
    }
    if (happening.kind === 'voltage-ledge') {
      this.stopAt(t);
      this.jump(() => this.climbVoltageLedges());
      return true;
    }
    this.recorder.row(t, this.seen, this.code);
    this.recorder.row(t, this.seen, happening.code);
    if (t === this.nextRowS) this.nextRowS = this.rowAfter(t);
    this.changeCode(t, happening.code);
    const over = ENDING.has(this.code) && this.room() <= 0;
    if (!over && !this.stopAtSwitchOvers) return false;
    this.stopAt(t);
    if (over) this.end('cutoff', false);
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

  private isCutoff(): boolean {
    const { charge } = this.system;
    return ENDING.has(charge.code) && charge.current <= this.study.strategy.cutoffA;
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
    if (taper.shape !== 'voltage-ledges') return;
    while (taper.step + 1 < taper.edges.length && pack.highestCellV(charge.current) >= taper.edges[taper.step + 1]! - REACHED_V) {
      taper.step++;
      this.event(`ledge:${taper.step + 1}`);
      this.decideHere();
    }
  }

  /** Makes a change at the present moment, which was arrived at, and records both sides where the current jumps. */
  private jump(change: () => void): void {
    const { charge } = this.system;
    const { t, code } = this;
    this.marks.close();
    this.look(t);
    const before = charge.current;
    this.recorder.row(t, this.seen, code);
    change();
    this.decideHere();
    const jumped = Math.abs(charge.current - before) > 1e-9 * (1 + Math.abs(before)) || charge.code !== code;
    const onGrid = t === this.nextRowS;
    if (onGrid) this.nextRowS = this.rowAfter(t);
    if (jumped) this.recorder.row(t, this.seen, charge.code);
    else if (!onGrid) this.recorder.drop();
    this.marks.sample(t);
    this.changeCode(t, charge.code);
    if (this.isCutoff()) this.end('cutoff', false);
  }

  private end(reason: EndReason, record = true): void {
    this.marks.close();
    if (record) {
      this.look(this.t);
      this.recorder.row(this.t, this.seen, this.code);
    }
    this.marks.hold(this.code, this.t - this.heldSinceS);
    this.ended = reason;
    this.event(`end:${reason}`);
  }

  /** Takes the whole state, integrals too, from the step under way at a moment inside it. */
  private stopAt(t: number): void {
    const step = this.step!;
    this.t = t;
    this.y = step.y.map((_, i) => step.dense(i, t));
  }

  /** Observes the solution at a moment of this step or the one before it, and decides the current there. */
  private look(t: number): void {
    const step = this.before !== null && this.step !== null && t < this.step.t0 ? this.before : this.step;
    if (step !== null) for (let i = 0; i < this.seen.length; i++) this.seen[i] = step.dense(i, t);
    this.observations++;
    this.lookedAt = t;
    this.system.at(t, this.seen);
  }

  private decideHere(): void {
    this.lookedAt = this.t;
    this.system.at(this.t, this.seen);
  }

  private event(event: string): void {
    this.events.push({ tS: this.t, event });
  }

  private finish(): SessionRun {
    const { pack } = this.system;
    const { rectifierEfficiency } = this.study.station;
    const metrics = this.marks.metrics(this.ended!, this.t, this.y, this.study.session);
    const result: SessionResult = {
      format: 'voltiplano/result',
      version: 1,
      kind: 'session',
      title: this.study.title ?? '',
      metrics,
      energyLedger: energyLedger(pack, this.system.start, this.y, rectifierEfficiency),
      thermalLedger: thermalLedger(pack, this.system.start, this.y),
      events: this.events,
      series: this.recorder.series,
    };
    const { evaluations, steps, starts } = this.stepper;
    const rows = this.recorder.series.tS.length;
    return { result, finalState: this.y, statistics: { evaluations, observations: this.observations, steps, starts, rows } };
  }
}

/** Longest step as a multiple of the shortest time constant, and the first step after a start [s] (measured, see bench). */
const STABLE_STEPS = Number((globalThis as any).STABLE ?? 3);
const FIRST_STEP_S = 2;
const MAX_HAND_OVERS = 10_000;
/** A ledge is left downwards only this far below its edge, so that the dip at plug-in does not rattle on one [soc]. */
const LEDGE_LEFT_SOC = 1e-6;
const NO_EDGES = new Float64Array(0);
const ENDING = new Set([LIMIT['cell-voltage'], LIMIT.taper, LIMIT.anode]);

type Happening = { t: number; kind: 'voltage-ledge' | 'cutoff' } | { t: number; kind: 'hand-over'; code: number };
