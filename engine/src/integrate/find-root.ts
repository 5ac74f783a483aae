/**
 * Where a continuous function changes sign, by regula falsi with Anderson and Björck's weights (BIT 13 (1973) 253),
 * halving where that is slow. Returns the end of the last bracket on `b`'s side, so that f there has f(b)'s sign.
 *
 * @param fa, fb    values at a and b, of opposite sign (fb may be 0)
 * @param tolerance widest last bracket, in units of x
 */
export function findRoot(
  f: (x: number) => number,
  a: number,
  fa: number,
  b: number,
  fb: number,
  tolerance: number,
): number {
  for (let round = 0; round < 80 && Math.abs(b - a) > tolerance && fb !== 0; round++) {
    const slow = round > 20;
    let x = slow ? (a + b) / 2 : b - (fb * (b - a)) / (fb - fa);
    // Keep off the ends, so that a bracket always shrinks from both sides.
    const least = Math.max(tolerance / 2, 1e-15 * Math.abs(b));
    if (Math.abs(x - a) < least) x = a + Math.sign(b - a) * least;
    if (Math.abs(x - b) < least) x = b - Math.sign(b - a) * least;
    const fx = f(x);
    if (fx === 0 || fx > 0 === fb > 0) {
      const weight = 1 - fx / fb;
      fa *= slow ? 1 : weight > 0 ? weight : 0.5;
      b = x;
      fb = fx;
    } else {
      const weight = 1 - fx / fa;
      fb *= slow ? 1 : weight > 0 ? weight : 0.5;
      a = x;
      fa = fx;
    }
  }
  return b;
}

/**
 * The highest point of a function between `a` and `c`, by golden section down to `tolerance`; `b` lies between and is higher.
 */
export function findPeak(
  f: (x: number) => number,
  a: number,
  c: number,
  tolerance: number,
): { x: number; value: number } {
  const golden = (Math.sqrt(5) - 1) / 2;
  let left = c - golden * (c - a);
  let right = a + golden * (c - a);
  let fLeft = f(left);
  let fRight = f(right);
  while (c - a > tolerance) {
    if (fLeft >= fRight) {
      c = right;
      right = left;
      fRight = fLeft;
      left = c - golden * (c - a);
      fLeft = f(left);
    } else {
      a = left;
      left = right;
      fLeft = fRight;
      right = a + golden * (c - a);
      fRight = f(right);
    }
  }
  return fLeft >= fRight ? { x: left, value: fLeft } : { x: right, value: fRight };
}
