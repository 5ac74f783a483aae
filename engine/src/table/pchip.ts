/**
 * Slopes of the monotone piecewise cubic through (x, y): Fritsch & Butland 1984, the rule of SciPy's `PchipInterpolator`.
 *
 * @param x  rising, at least two rows
 * @param y  one value per x
 * @returns  dy/dx at each row
 */
export function pchipSlopes(x: readonly number[], y: readonly number[]): Float64Array {
  const n = x.length;
  const h = Float64Array.from({ length: n - 1 }, (_, i) => x[i + 1] - x[i]);
  const secant = h.map((width, i) => (y[i + 1] - y[i]) / width);
  const slopes = new Float64Array(n);
  if (n === 2) return slopes.fill(secant[0]);
  for (let i = 1; i < n - 1; i++) {
    const before = secant[i - 1];
    const after = secant[i];
    if (before * after <= 0) continue;
    const w1 = 2 * h[i] + h[i - 1];
    const w2 = h[i] + 2 * h[i - 1];
    slopes[i] = (w1 + w2) / (w1 / before + w2 / after);
  }
  slopes[0] = endSlope(h[0], h[1], secant[0], secant[1]);
  slopes[n - 1] = endSlope(h[n - 2], h[n - 3], secant[n - 2], secant[n - 3]);
  return slopes;
}

/** One-sided three-point slope at an end, kept from overshooting. */
function endSlope(h0: number, h1: number, d0: number, d1: number): number {
  const slope = ((2 * h0 + h1) * d0 - h0 * d1) / (h0 + h1);
  if (Math.sign(slope) !== Math.sign(d0)) return 0;
  if (Math.sign(d0) !== Math.sign(d1) && Math.abs(slope) > 3 * Math.abs(d0)) return 3 * d0;
  return slope;
}
