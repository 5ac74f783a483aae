import type { Envelope } from './envelope.ts';
import { SlopeProgram } from './slope-program.ts';
import type { Curve, TaperSpace } from './taper-space.ts';

/** Nodes between two places at which a part is put in. */
const APART = 12;

/** Where to begin: tapers that are best for an envelope, without any run. */
export class StartCurves {
  /** What a value may be at each node: the envelope, falling where the taper must. */
  private readonly room: number[];
  private readonly step: number;
  private readonly programs = new Map<number, SlopeProgram>();

  constructor(
    private readonly space: TaperSpace,
    private readonly envelope: Envelope,
  ) {
    const { least, most, monotone } = space;
    let lowest = Infinity;
    this.room = envelope.allowed.map((value) => {
      lowest = Math.min(lowest, value);
      return Math.min(most, Math.max(least, monotone ? lowest : value));
    });
    this.step = envelope.soc[1] - envelope.soc[0];
  }

  /** Levels at which the envelope is cut off, from the least that helps to none. */
  caps(count: number): number[] {
    const top = Math.max(...this.room.map((value, i) => Math.min(value, this.otherMost(i))));
    const low = Math.max(this.space.least, 0.12 * top);
    return Array.from({ length: count }, (_, i) => top * (low / top) ** (i / (count - 1)));
  }

  /** The fastest taper of `parts` ledges or points under the envelope cut off at `cap`, by dynamic programming over the nodes. */
  best(parts: number, cap: number): Curve | null {
    return this.space.kind === 'ledges' ? this.bestLedges(parts, cap) : this.bestSlope(parts, cap);
  }

  private bestLedges(parts: number, cap: number): Curve {
    const { hi, lo } = this.space;
    const last = this.envelope.soc.length - 1;
    const wide = Math.max(1, Math.ceil(this.space.width / this.step - 1e-9));
    const piece = (a: number, b: number): { cost: number; value: number } => {
      let value = cap;
      for (let i = a; i <= b; i++) value = Math.min(value, this.room[i]);
      return { cost: this.timeOf(a, b, () => value), value };
    };
    const most = Math.min(parts, Math.max(1, Math.floor((hi - lo) / (wide * this.step) + 1e-9)));
    const ends = cheapestPath(last, most, wide, (a, b) => piece(a, b).cost);
    return {
      soc: ends.slice(0, -1).map((i) => this.envelope.soc[i]),
      value: ends.slice(0, -1).map((a, k) => piece(a, ends[k + 1]).value),
    };
  }

  /** Laid out once for each level; more points take up where fewer left off. */
  private bestSlope(points: number, cap: number): Curve | null {
    let program = this.programs.get(cap);
    if (program === undefined) {
      const wide = Math.max(1, Math.ceil(this.space.width / this.step - 1e-9));
      const time = (node: number, value: number) => this.timeOf(node, node + 1, () => value);
      const ground = { soc: this.envelope.soc, room: this.room, wide, monotone: this.space.monotone, time };
      this.programs.set(cap, (program = new SlopeProgram(ground, cap)));
    }
    return program.best(points);
  }

  /**
   * The curve with one part more and the same values everywhere, at the places where the envelope says that it helps most, the
   * best first; as many as fit and are asked for, apart from each other.
   */
  insertions(curve: Curve, count: number): Curve[] {
    const { kind, width, hi } = this.space;
    const ends = kind === 'ledges' ? [...curve.soc, hi] : curve.soc;
    const places: { gain: number; i: number; k: number }[] = [];
    for (const [i, s] of this.envelope.soc.entries()) {
      const k = ends.findIndex((end, j) => s >= end + width - 1e-9 && s <= (ends[j + 1] ?? -1) - width + 1e-9);
      if (k < 0) continue;
      const gain = kind === 'ledges' ? this.ledgeGain(ends, curve.value, k, i) : this.pointGain(curve, k, i);
      places.push({ gain, i, k });
    }
    places.sort((a, b) => b.gain - a.gain || a.i - b.i);
    const taken: typeof places = [];
    for (const place of places) {
      if (taken.length === count) break;
      if (taken.every(({ i }) => Math.abs(i - place.i) >= APART)) taken.push(place);
    }
    return taken.map(({ i, k }) => this.inserted(curve, k, this.envelope.soc[i]));
  }

  private inserted({ soc, value }: Curve, k: number, s: number): Curve {
    const share = (s - soc[k]) / ((soc[k + 1] ?? s + 1) - soc[k]);
    const between = this.space.kind === 'ledges' ? value[k] : value[k] + share * (value[k + 1] - value[k]);
    const put = (list: number[], entry: number) => [...list.slice(0, k + 1), entry, ...list.slice(k + 1)];
    return { soc: put(soc, s), value: put(value, between) };
  }

  private ledgeGain(ends: number[], value: number[], k: number, i: number): number {
    const [a, b] = [this.node(ends[k]), this.node(ends[k + 1])];
    const top = Math.max(...value);
    const level = (from: number, to: number) => Math.min(top, ...this.room.slice(from, to + 1));
    const parts = this.timeOf(a, i, () => level(a, i)) + this.timeOf(i, b, () => level(i, b));
    return this.timeOf(a, b, () => Math.min(value[k], level(a, b))) - parts;
  }

  private pointGain({ soc, value }: Curve, k: number, i: number): number {
    const [a, b] = [this.node(soc[k]), this.node(soc[k + 1])];
    const before = (j: number) => value[k] + ((value[k + 1] - value[k]) * (j - a)) / Math.max(1, b - a);
    const hat = (j: number) => (j <= i ? (j - a) / Math.max(1, i - a) : (b - j) / Math.max(1, b - i));
    let raise = Infinity;
    for (let j = a + 1; j < b; j++) raise = Math.min(raise, (this.room[j] - before(j)) / hat(j));
    const gain = raise > 0 && raise < Infinity ? raise : 0;
    return (
      this.timeOf(a, b, before) - this.timeOf(a, b, (j) => before(j) + gain * hat(j)) + 1e-6 * Math.min(i - a, b - i)
    );
  }

  private node(soc: number): number {
    const i = Math.round((soc - this.envelope.soc[0]) / this.step);
    return Math.min(this.envelope.soc.length - 1, Math.max(0, i));
  }

  private otherMost(i: number): number {
    return Math.max(...this.envelope.others.map(({ value }) => (value[i] === Infinity ? 0 : value[i])));
  }

  /** Time from node a to node b at a value, up to a factor: weighted over the circumstances, other limits kept. */
  private timeOf(a: number, b: number, value: (node: number) => number): number {
    const { others, timeWeight } = this.envelope;
    let sum = 0;
    for (let i = a; i < b; i++) {
      const v = value(i);
      for (const other of others) {
        const limit = other.value[i];
        if (limit !== Infinity) sum += (other.weight * timeWeight[i]) / Math.max(1e-9, v < limit ? v : limit);
      }
    }
    return sum;
  }
}

/** Nodes of the cheapest way from node 0 to the last in `pieces` pieces, each at least `wide` nodes long. */
function cheapestPath(last: number, pieces: number, wide: number, cost: (a: number, b: number) => number): number[] {
  const table: { cost: number; from: number }[][] = [];
  const first = Array.from({ length: last + 1 }, (_, b) => ({ cost: b === 0 ? 0 : Infinity, from: 0 }));
  table.push(first);
  const known = new Map<number, number>();
  const costOf = (a: number, b: number) => {
    const key = a * (last + 1) + b;
    let value = known.get(key);
    if (value === undefined) known.set(key, (value = cost(a, b)));
    return value;
  };
  for (let p = 1; p <= pieces; p++) {
    const before = table[p - 1];
    table.push(
      Array.from({ length: last + 1 }, (_, b) => {
        let best = { cost: Infinity, from: 0 };
        for (let a = 0; a <= b - wide; a++) {
          if (before[a].cost === Infinity) continue;
          const sum = before[a].cost + costOf(a, b);
          if (sum < best.cost) best = { cost: sum, from: a };
        }
        return best;
      }),
    );
  }
  const ends = [last];
  for (let p = pieces; p > 0; p--) ends.unshift(table[p][ends[0]].from);
  return ends;
}
