import { findPeak, findRoot } from '../integrate/find-root.ts';

/** Of every extreme the first moment within this of it is named, in the quantity's own unit. */
const WITHIN = 1e-6;

/** Reads a quantity, or the soc, at any moment since the sample before last of the same piece. */
type Reading = (t: number) => number;

/**
 * The highest value of a quantity over a run and the first moment within 1e-6 of it, from samples and, around a peak,
 * from the quantity itself. For a lowest value give the negative.
 */
export class Extreme {
  value = -Infinity;
  tS = Number.NaN;
  soc = Number.NaN;
  /** The last two samples of the present piece; NaN where there is none. */
  private t1 = Number.NaN;
  private v1 = -Infinity;
  private t2 = Number.NaN;
  private v2 = -Infinity;

  constructor(
    private readonly at: Reading,
    private readonly socAt: Reading,
  ) {}

  sample(t: number, v: number): void {
    if (v <= this.v1) this.settle(t);
    if (t !== this.t1) {
      this.t2 = this.t1;
      this.v2 = this.v1;
      this.t1 = t;
    }
    this.v1 = v;
  }

  /** Ends a piece, at a jump or at the end of the run. */
  close(): void {
    this.settle(this.t1);
    this.t1 = this.t2 = Number.NaN;
    this.v1 = this.v2 = -Infinity;
  }

  /** The last sample is a peak of the samples, if a new one: find the true peak up to `until`, and the moment just below it. */
  private settle(until: number): void {
    const { t1, v1, t2, v2 } = this;
    const rise = Number.isNaN(t2) ? 0 : v1 - v2;
    if (v1 + rise <= this.value + WITHIN) {
      if (v1 > this.value) this.value = v1;
      return;
    }
    const from = Number.isNaN(t2) ? t1 : t2;
    const found = until > t1 ? findPeak(this.at, from, until, 1e-3) : { x: t1, value: v1 };
    const peak = found.value > v1 ? found : { x: t1, value: v1 };
    if (peak.value > this.value + WITHIN) {
      const low = peak.value - WITHIN;
      this.tS =
        from < peak.x && v2 < low ? findRoot((t) => this.at(t) - low, from, v2 - low, peak.x, WITHIN, 1e-6) : from;
      this.soc = this.socAt(this.tS);
    }
    this.value = Math.max(this.value, peak.value);
  }
}
