import { findRoot } from '../integrate/find-root.ts';
import type { Step } from '../integrate/stepper.ts';
import { INTEGRAL } from '../pack/layout.ts';
import { LIMIT } from '../session/charge-current.ts';
import type { SessionSolution } from '../session/happenings.ts';
import { J_PER_KWH } from '../session/ledgers.ts';
import { limitCodes } from '../session/limits.ts';
import type { SessionObserver } from '../session/session-observer.ts';
import type { TuneGoal } from '../study/tune-request.ts';
import type { BoundSpec } from './bound-specs.ts';

/** The pieces of a taper: ledges, or what lies before, between and after a slope's points. */
export type Pieces = { kind: 'ledges' | 'slope'; soc: readonly number[]; hi: number };

export const pieceCount = ({ kind, soc }: Pieces): number => (kind === 'ledges' ? soc.length : soc.length + 1);

/**
 * Shares of a piece are watched apart: what binds at its start and at its end moves smoothly with the taper, the worst of the whole
 * does not. A slope may touch its bound all along a piece, so it has more of them.
 */
export const sharesOf = ({ kind }: Pieces): number => (kind === 'ledges' ? 2 : 6);

/**
 * Watches a run for what a tuning asks: how near each bound came in each share of each piece, when soc or time of the goal
 * passed, and how long each limit held in each piece.
 */
export class BoundWatch implements SessionObserver {
  /** Highest of sign·value per bound and share of a piece, and where it stood; −∞ where the run never was. */
  readonly worst: Float64Array;
  readonly worstS: Float64Array;
  readonly worstSoc: Float64Array;
  /** Seconds under each limit per piece. */
  readonly heldS: Float64Array;
  /** When the goal's two soc were passed [s], and the energy at the goal's time [kWh]; NaN where they were not. */
  fromS = Number.NaN;
  toS = Number.NaN;
  energyKwh = Number.NaN;

  /** Shares of a piece, and of all pieces. */
  readonly shares: number;
  private readonly all: number;
  /** Where each piece begins, and where the last one ends [soc]. */
  private readonly ends: number[];
  private solution: SessionSolution | null = null;
  /** The last two samples: moment, share, soc, and sign·value per bound; NaN where a stretch has just begun. */
  private lastS = Number.NaN;
  private beforeS = Number.NaN;
  private lastShare = 0;
  private lastCode = -1;
  private lastPiece = -1;
  /** Whether the last two samples stood under one limit in one piece. */
  private smooth = false;
  private lastSoc = 0;
  private readonly last: Float64Array;
  private readonly before: Float64Array;

  constructor(
    private readonly specs: readonly BoundSpec[],
    private readonly pieces: Pieces,
    private readonly goal: TuneGoal,
  ) {
    const count = pieceCount(pieces);
    this.shares = sharesOf(pieces);
    this.all = count * this.shares;
    this.worst = new Float64Array(specs.length * this.all).fill(-Infinity);
    this.worstS = new Float64Array(this.worst.length).fill(Number.NaN);
    this.worstSoc = new Float64Array(this.worst.length).fill(Number.NaN);
    this.heldS = new Float64Array(count * limitCodes.length);
    this.last = new Float64Array(specs.length);
    this.before = new Float64Array(specs.length);
    this.ends = [...(pieces.kind === 'ledges' ? [] : [0]), ...pieces.soc, pieces.hi];
  }

  begin(solution: SessionSolution): void {
    this.solution = solution;
    const { pack } = solution.system;
    if (this.goal.kind === 'least-minutes' && pack.soc >= this.goal.fromSoc - 1e-12) this.fromS = 0;
  }

  sample(t: number, code: number): void {
    const { system, seen } = this.solution!;
    const { soc } = system.pack;
    const piece = this.pieceAt(soc);
    const share = this.shareAt(piece, soc);
    // Where a limit hands over, or a slope has a point, the course has a corner and is not one parabola.
    const same = code === this.lastCode && piece === this.lastPiece && this.lastS < t;
    const goesOn = same && this.smooth;
    if (t > this.lastS) this.heldS[piece * limitCodes.length + code] += t - this.lastS;
    const { specs, last, before } = this;
    for (let b = 0; b < specs.length; b++) {
      const value = specs[b].sign * specs[b].read(system, seen);
      this.note(b, share, value, t, soc);
      if (goesOn && last[b] > value && last[b] > before[b]) this.notePeak(b, t, value);
      before[b] = last[b];
      last[b] = value;
    }
    this.smooth = same;
    this.beforeS = this.lastS;
    this.lastS = t;
    this.lastCode = code;
    this.lastPiece = piece;
    this.lastShare = share;
    this.lastSoc = soc;
  }

  pass(step: Step, from: number, to: number): void {
    const { pack } = this.solution!.system;
    const { goal } = this;
    if (this.pieces.kind === 'slope') this.lookAtPoints(step, from, to);
    if (goal.kind === 'most-energy') {
      const s = goal.minutes * 60;
      // Held after the end: the latest reading stands until the goal's time is passed.
      if (from <= s) this.energyKwh = step.dense(pack.layout.integrals + INTEGRAL.battery, Math.min(s, to)) / J_PER_KWH;
      return;
    }
    if (Number.isNaN(this.fromS)) this.fromS = crossing(step, pack.zAt(goal.fromSoc), from, to);
    if (Number.isNaN(this.toS)) this.toS = crossing(step, pack.zAt(goal.toSoc), from, to);
  }

  close(): void {
    this.lastS = this.beforeS = Number.NaN;
    this.smooth = false;
    this.last.fill(-Infinity);
    this.before.fill(-Infinity);
  }

  private pieceAt(soc: number): number {
    const { kind, soc: places } = this.pieces;
    if (kind === 'ledges') return this.solution!.system.taper.step;
    let piece = 0;
    while (piece < places.length && soc >= places[piece]) piece++;
    return piece;
  }

  /** A slope's points are corners, and may be the worst of a stretch: they are looked at themselves. */
  private lookAtPoints(step: Step, from: number, to: number): void {
    const solution = this.solution!;
    const { system, seen } = solution;
    const [low, high] = [step.dense(0, from), step.dense(0, to)];
    const inside = this.pieces.soc.findIndex((soc) => system.pack.zAt(soc) > low);
    for (let p = inside; p >= 0 && p < this.pieces.soc.length; p++) {
      const z = system.pack.zAt(this.pieces.soc[p]);
      if (!(z < high)) break;
      const t = crossing(step, z, from, to);
      solution.look(t);
      for (let b = 0; b < this.specs.length; b++) {
        const value = this.specs[b].sign * this.specs[b].read(system, seen);
        for (const piece of [p, p + 1])
          this.note(b, piece * this.shares + (piece === p ? this.shares - 1 : 0), value, t, this.pieces.soc[p]);
      }
    }
    solution.look(to);
  }

  private shareAt(piece: number, soc: number): number {
    const [from, to] = [this.ends[piece], this.ends[piece + 1]];
    const share = Math.floor((this.shares * (soc - from)) / Math.max(1e-9, to - from));
    return piece * this.shares + Math.min(this.shares - 1, Math.max(0, share));
  }

  private note(b: number, share: number, value: number, t: number, soc: number): void {
    const at = b * this.all + share;
    if (!(value > this.worst[at])) return;
    this.worst[at] = value;
    this.worstS[at] = t;
    this.worstSoc[at] = soc;
  }

  /** The parabola through the last two samples and this one, at its vertex: the peak between samples. */
  private notePeak(b: number, t: number, value: number): void {
    const h0 = this.lastS - this.beforeS;
    const h1 = t - this.lastS;
    // Looks that all but coincide tell rounding, not curvature.
    if (!(Math.min(h0, h1) > 0.1 * Math.max(h0, h1))) return;
    const d0 = (this.last[b] - this.before[b]) / h0;
    const d1 = (value - this.last[b]) / h1;
    const curve = (d1 - d0) / (h0 + h1);
    const slope = d0 + curve * h0;
    this.note(b, this.lastShare, this.last[b] - (slope * slope) / (4 * curve), this.lastS, this.lastSoc);
  }
}

function crossing(step: Step, z: number, from: number, to: number): number {
  const off = (t: number) => step.dense(0, t) - z;
  const end = off(to);
  if (end < -1e-12) return Number.NaN;
  const start = off(from);
  return start < 0 && end > 0 ? findRoot(off, from, start, to, end, 1e-7) : start < 0 ? to : from;
}

/** Whether the taper itself held the current back somewhere in a piece. */
export const taperHeld = (watch: BoundWatch, piece: number): boolean =>
  watch.heldS[piece * limitCodes.length + LIMIT.taper] > 0;
