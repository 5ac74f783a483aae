import type { Curve } from './taper-space.ts';

/** What a slope is laid under: soc, room and time per soc of a value at each node. */
export type Ground = {
  soc: readonly number[];
  room: readonly number[];
  /** Least nodes between two points; whether values may only fall. */
  wide: number;
  monotone: boolean;
  /** Time from a node to the next at a value, up to a factor. */
  time: (node: number, value: number) => number;
};

/** Values a point may take, as shares of the room there: a straight line under a hollow must begin below its rims. */
const SHARES = [1, 0.98, 0.96, 0.93, 0.9, 0.86, 0.82, 0.77, 0.72, 0.65];
const EVERY = 3;
/** A line may pass the room by this share; the envelope is no more exact. */
const OVER = 1.005;

/**
 * The fastest slope under an envelope, by dynamic programming over where its points stand and how high: exact for the envelope, on
 * a grid of places and shares of the room.
 */
export class SlopeProgram {
  private readonly nodes: number[];
  /** Cost of the line between two states, −1 where it is not known yet; a state is a node and a share. */
  private readonly costs: Float64Array;
  private readonly states: number;

  constructor(
    private readonly ground: Ground,
    private readonly cap: number,
  ) {
    const last = ground.soc.length - 1;
    this.nodes = Array.from({ length: Math.floor(last / EVERY) + 1 }, (_, i) => Math.min(last, i * EVERY));
    if (this.nodes[this.nodes.length - 1] !== last) this.nodes.push(last);
    this.states = this.nodes.length * SHARES.length;
    this.costs = new Float64Array(this.states * this.states).fill(-1);
  }

  /** The fastest slope of so many points over the whole range; null where no line of them stays under the envelope. */
  best(points: number): Curve | null {
    const { states } = this;
    const first = this.nodes.length - 1;
    let before = Float64Array.from({ length: states }, (_, s) => (s < SHARES.length ? 0 : Infinity));
    const from: Int32Array[] = [];
    for (let p = 1; p < points; p++) {
      const now = new Float64Array(states).fill(Infinity);
      const back = new Int32Array(states).fill(-1);
      for (let b = SHARES.length; b < states; b++)
        for (let a = 0; a < b - (b % SHARES.length); a++) {
          if (before[a] === Infinity) continue;
          const sum = before[a] + this.cost(a, b);
          if (sum < now[b]) [now[b], back[b]] = [sum, a];
        }
      before = now;
      from.push(back);
    }
    let end = -1;
    for (let s = first * SHARES.length; s < states; s++) if (end < 0 || before[s] < before[end]) end = s;
    if (before[end] === Infinity) return null;
    const path = [end];
    for (let p = from.length - 1; p >= 0; p--) path.unshift(from[p][path[0]]);
    return { soc: path.map((s) => this.ground.soc[this.nodeOf(s)]), value: path.map((s) => this.valueOf(s)) };
  }

  private nodeOf(state: number): number {
    return this.nodes[Math.floor(state / SHARES.length)];
  }

  private valueOf(state: number): number {
    return SHARES[state % SHARES.length] * Math.min(this.cap, this.ground.room[this.nodeOf(state)]);
  }

  private cost(a: number, b: number): number {
    const at = a * this.states + b;
    if (this.costs[at] < 0) this.costs[at] = this.lineCost(a, b);
    return this.costs[at];
  }

  private lineCost(a: number, b: number): number {
    const { room, wide, monotone, time } = this.ground;
    const [i, j] = [this.nodeOf(a), this.nodeOf(b)];
    const [v, w] = [this.valueOf(a), this.valueOf(b)];
    if (j - i < wide || (monotone && w > v)) return Infinity;
    const rise = (w - v) / (j - i);
    for (let k = i + 1; k < j; k++) if (v + rise * (k - i) > OVER * Math.min(this.cap, room[k])) return Infinity;
    let sum = 0;
    for (let k = i; k < j; k++) sum += time(k, v + rise * (k - i + 0.5));
    return sum;
  }
}
