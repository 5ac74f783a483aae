import { pchipSlopes } from './pchip.ts';

/**
 * A function of one variable as cubics between breaks, held at its end values outside (or, where `outside`
 * is given, going on as that function).
 *
 * One class serves tables and tabulated formulas, so that the derivative meets a single shape of object.
 */
export class PiecewiseCubic {
  /** Breaks, rising, length N + 1. */
  readonly x: Float64Array;
  /** y0, y', y''/2, y'''/6 at the left break of each piece, length 4·N. */
  private readonly c: Float64Array;
  /** Integral from x[0] to each break. */
  private readonly area: Float64Array;
  private readonly first: number;
  private readonly last: number;
  /** 1/step where the breaks are evenly spaced, else 0. */
  private readonly perStep: number;
  private readonly outside: ((x: number) => number) | null;
  private hint = 0;

  private constructor(
    x: Float64Array,
    y: ArrayLike<number>,
    slopes: ArrayLike<number>,
    even: boolean,
    outside: ((x: number) => number) | null,
  ) {
    const pieces = x.length - 1;
    this.x = x;
    this.c = new Float64Array(4 * pieces);
    this.area = new Float64Array(pieces + 1);
    this.first = y[0]!;
    this.last = y[pieces]!;
    this.perStep = even ? pieces / (x[pieces] - x[0]) : 0;
    this.outside = outside;
    for (let i = 0; i < pieces; i++) {
      const h = x[i + 1] - x[i];
      const secant = (y[i + 1] - y[i]) / h;
      const d0 = slopes[i];
      const d1 = slopes[i + 1];
      this.setPiece(i, y[i], d0, (3 * secant - 2 * d0 - d1) / h, (d0 + d1 - 2 * secant) / (h * h));
    }
  }

  /** Sets a piece's coefficients and the area up to its right break; pieces come in order. */
  private setPiece(i: number, c0: number, c1: number, c2: number, c3: number): void {
    const { c, x, area } = this;
    const h = x[i + 1] - x[i];
    c[4 * i] = c0;
    c[4 * i + 1] = c1;
    c[4 * i + 2] = c2;
    c[4 * i + 3] = c3;
    area[i + 1] = area[i] + h * (c0 + h * (c1 / 2 + h * (c2 / 3 + (h * c3) / 4)));
  }

  /** PCHIP through the rows of a table (Fritsch & Butland 1984). */
  static pchip(table: { x: readonly number[]; y: readonly number[] }, scale = 1): PiecewiseCubic {
    const y = table.y.map((value) => value * scale);
    return new PiecewiseCubic(Float64Array.from(table.x), y, pchipSlopes(table.x, y), false, null);
  }

  /** Straight lines through the rows of a table. */
  static linear(x: readonly number[], y: readonly number[], scale = 1): PiecewiseCubic {
    const curve = new PiecewiseCubic(
      Float64Array.from(x),
      y.map((value) => value * scale),
      new Float64Array(x.length),
      false,
      null,
    );
    for (let i = 0; i < x.length - 1; i++)
      curve.setPiece(i, y[i] * scale, ((y[i + 1] - y[i]) * scale) / (x[i + 1] - x[i]), 0, 0);
    return curve;
  }

  /** A constant. */
  static constant(value: number): PiecewiseCubic {
    return PiecewiseCubic.linear([0, 1], [value, value]);
  }

  /**
   * A smooth formula, tabulated on `pieces` even pieces from `from` to `to` with its slopes; outside it is the formula itself.
   * At 2080 pieces over 0 to 1 the difference from the built-in electrode formulas is below 1e-8 V.
   */
  static tabulated(formula: (x: number) => number, from: number, to: number, pieces: number): PiecewiseCubic {
    const step = (to - from) / pieces;
    const x = Float64Array.from({ length: pieces + 1 }, (_, i) => from + step * i);
    const nudge = 1e-5;
    const slopes = x.map((at) => (formula(at + nudge) - formula(at - nudge)) / (2 * nudge));
    return new PiecewiseCubic(x, x.map(formula), slopes, true, formula);
  }

  value(x: number): number {
    const pieces = this.x.length - 1;
    if (!(x > this.x[0])) return this.outside === null || x === this.x[0] ? this.first : this.outside(x);
    if (x >= this.x[pieces]) return this.outside === null || x === this.x[pieces] ? this.last : this.outside(x);
    const i = this.pieceOf(x);
    const c = this.c;
    const h = x - this.x[i];
    const k = 4 * i;
    return c[k] + h * (c[k + 1] + h * (c[k + 2] + h * c[k + 3]));
  }

  /** Integral from `a` to `b`: exact for the pieces and for held values outside them, to 1e-9 or so for a formula there. */
  integral(a: number, b: number): number {
    return this.areaTo(b) - this.areaTo(a);
  }

  private areaTo(x: number): number {
    const pieces = this.x.length - 1;
    const low = this.x[0];
    const high = this.x[pieces];
    if (x <= low) return this.outside ? simpson(this.outside, low, x) : (x - low) * this.first;
    if (x >= high) return this.area[pieces] + (this.outside ? simpson(this.outside, high, x) : (x - high) * this.last);
    const i = this.pieceOf(x);
    const h = x - this.x[i];
    const c = this.c;
    const k = 4 * i;
    return this.area[i] + h * (c[k] + h * (c[k + 1] / 2 + h * (c[k + 2] / 3 + (h * c[k + 3]) / 4)));
  }

  /** Piece that holds x, x inside the breaks. Searches from the last piece used: neighbouring calls are near. */
  private pieceOf(x: number): number {
    const breaks = this.x;
    if (this.perStep > 0) {
      const i = ((x - breaks[0]) * this.perStep) | 0;
      return i < breaks.length - 1 ? i : breaks.length - 2;
    }
    let i = this.hint;
    while (x < breaks[i]) i--;
    while (x >= breaks[i + 1]) i++;
    this.hint = i;
    return i;
  }
}

/** Integral of a smooth formula from `a` to `b` by Simpson's rule. */
function simpson(f: (x: number) => number, a: number, b: number): number {
  const panels = 200;
  const h = (b - a) / panels;
  let sum = f(a) + f(b);
  for (let i = 1; i < panels; i++) sum += (i % 2 ? 4 : 2) * f(a + i * h);
  return (sum * h) / 3;
}
