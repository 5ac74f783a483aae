import type { DistributedInput } from '../study/sweep-schema.ts';

type Normal = DistributedInput & { distribution: 'normal' };
type Triangular = DistributedInput & { distribution: 'triangular' };

// Acklam's rational approximation of the normal quantile, from memory: relative error below 1.2e-9.
const A = [
  -3.969683028665376e1, 2.209460984245205e2, -2.759285104469687e2, 1.38357751867269e2, -3.066479806614716e1,
  2.506628277459239,
];
const B = [
  -5.447609879822406e1, 1.615858368580409e2, -1.556989798598866e2, 6.680131188771972e1, -1.328068155288572e1, 1,
];
const C = [
  -7.784894002430293e-3, -3.223964580411365e-1, -2.400758277161838, -2.549732539343734, 4.374664141464968,
  2.938163982698783,
];
const D = [7.784695709041462e-3, 3.224671290700398e-1, 2.445134137142996, 3.754408661907416, 1];
const TAIL = 0.02425;

const polynomial = (coefficients: readonly number[], x: number): number =>
  coefficients.reduce((sum, coefficient) => sum * x + coefficient, 0);

/** Value below which a standard normal variable lies with probability p, 0 < p < 1. */
export function normalQuantile(p: number): number {
  if (p > 1 - TAIL) return -normalQuantile(1 - p);
  if (p < TAIL) {
    const q = Math.sqrt(-2 * Math.log(p));
    return polynomial(C, q) / polynomial(D, q);
  }
  const q = p - 0.5;
  return (q * polynomial(A, q * q)) / polynomial(B, q * q);
}

/** Probability that a standard normal variable lies below x: the inverse of `normalQuantile`, by halving. */
function normalBelow(x: number): number {
  let low = 1e-300;
  let high = 1 - 1e-16;
  if (x <= normalQuantile(low)) return low;
  if (x >= normalQuantile(high)) return high;
  for (let i = 0; i < 1100 && low < high; i++) {
    const middle = 0.5 * (low + high);
    if (middle <= low || middle >= high) break;
    if (normalQuantile(middle) < x) low = middle;
    else high = middle;
  }
  return high;
}

/**
 * Quantile function of an input's distribution, cut off at the input's allowed range: probability 0 to 1 in, value out.
 * A cut distribution is the whole one under the condition that the value is allowed.
 *
 * @param base  value in the base study: the mean, or the mode, where the request names none
 */
export function quantileOf(request: DistributedInput, base: number, min: number, max: number): (p: number) => number {
  switch (request.distribution) {
    case 'uniform':
      return (p) => request.from + p * (request.to - request.from);
    case 'triangular':
      return triangular(request, base);
    case 'normal':
      return normal(request, base, min, max);
  }
}

function normal({ mean, sd }: Normal, base: number, min: number, max: number): (p: number) => number {
  const middle = mean ?? base;
  const low = normalBelow((min - middle) / sd);
  const high = normalBelow((max - middle) / sd);
  return (p) => {
    const inside = Math.min(1 - 1e-16, Math.max(1e-300, low + p * (high - low)));
    return Math.min(max, Math.max(min, middle + sd * normalQuantile(inside)));
  };
}

function triangular({ from, mode, to }: Triangular, base: number): (p: number) => number {
  const peak = mode ?? base;
  const rising = (peak - from) / (to - from);
  return (p) =>
    p < rising
      ? from + Math.sqrt(p * (to - from) * (peak - from))
      : to - Math.sqrt((1 - p) * (to - from) * (to - peak));
}
