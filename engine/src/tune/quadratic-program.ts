/** Minimise ½ d'Bd + g'd subject to G d ≤ h; B positive definite, rows of G as they come. */
export type QuadraticProgram = { B: number[][]; g: number[]; G: number[][]; h: number[] };

const MOST_ROUNDS = 60;
const NEAR = 1e-9;

/**
 * Primal–dual interior-point method with Mehrotra's predictor and corrector (Nocedal & Wright, Numerical Optimization, 2nd ed.
 * 2006, section 16.6). There must be a point that keeps every row.
 *
 * @returns the minimiser and the multipliers of the rows
 */
export function solveQuadraticProgram({ B, g, G, h }: QuadraticProgram): { d: number[]; multipliers: number[] } {
  const n = g.length;
  const m = h.length;
  const d = new Array<number>(n).fill(0);
  const s = h.map((b) => Math.max(b, 0.1));
  const z = new Array<number>(m).fill(0.1);
  const size = 1 + Math.max(...g.map(Math.abs), ...h.map((b) => Math.min(Math.abs(b), 1)));
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const rd = g.map((gi, i) => gi + dot(B[i], d));
    for (let k = 0; k < m; k++) addTo(rd, G[k], z[k]);
    const rp = h.map((b, k) => dot(G[k], d) + s[k] - b);
    const mu = dot(s, z) / m;
    if (Math.max(mu, largest(rd), largest(rp)) < NEAR * size) break;
    const factor = factorise(B, G, s, z);
    const step = (target: number[]) => newtonStep(factor, G, s, z, rd, rp, target);
    const affine = step(s.map((si, k) => si * z[k]));
    const reach = Math.min(longest(s, affine.ds), longest(z, affine.dz));
    const after = s.reduce((sum, si, k) => sum + (si + reach * affine.ds[k]) * (z[k] + reach * affine.dz[k]), 0) / m;
    const centre = (after / mu) ** 3 * mu;
    const full = step(s.map((si, k) => si * z[k] + affine.ds[k] * affine.dz[k] - centre));
    const length = 0.995 * Math.min(longest(s, full.ds), longest(z, full.dz));
    if (!(length > 1e-12)) break;
    addTo(d, full.dd, Math.min(1, length));
    addTo(s, full.ds, Math.min(1, length));
    addTo(z, full.dz, Math.min(1, length));
  }
  return { d, multipliers: z };
}

type Vector = ArrayLike<number>;

/** The lower Cholesky factor of B + G' diag(z/s) G. */
function factorise(B: number[][], G: number[][], s: number[], z: number[]): number[][] {
  const K = B.map((row) => row.slice());
  for (let k = 0; k < G.length; k++) {
    const weight = z[k] / s[k];
    const row = G[k];
    for (let i = 0; i < row.length; i++) {
      if (row[i] === 0) continue;
      const scaled = weight * row[i];
      for (let j = 0; j <= i; j++) K[i][j] += scaled * row[j];
    }
  }
  for (let i = 0; i < K.length; i++) {
    const row = K[i];
    for (let j = 0; j < i; j++) {
      const other = K[j];
      let sum = row[j];
      for (let k = 0; k < j; k++) sum -= row[k] * other[k];
      row[j] = sum / other[j];
    }
    // A whiff on the diagonal keeps the factor real where rounding would not.
    let sum = row[i] * (1 + 1e-13);
    for (let k = 0; k < i; k++) sum -= row[k] * row[k];
    row[i] = Math.sqrt(Math.max(sum, 1e-300));
  }
  return K;
}

/** Solves L L' x = right for the lower factor L. */
function solveFactor(L: number[][], right: readonly number[]): number[] {
  const x = right.slice();
  for (let i = 0; i < x.length; i++) {
    for (let k = 0; k < i; k++) x[i] -= L[i][k] * x[k];
    x[i] /= L[i][i];
  }
  for (let i = x.length - 1; i >= 0; i--) {
    for (let k = i + 1; k < x.length; k++) x[i] -= L[k][i] * x[k];
    x[i] /= L[i][i];
  }
  return x;
}

function newtonStep(
  factor: number[][],
  G: number[][],
  s: number[],
  z: number[],
  rd: number[],
  rp: number[],
  target: number[],
): { dd: number[]; ds: number[]; dz: number[] } {
  const right = rd.map((r) => -r);
  for (let k = 0; k < G.length; k++) addTo(right, G[k], (target[k] - z[k] * rp[k]) / s[k]);
  const dd = solveFactor(factor, right);
  const ds = rp.map((r, k) => -r - dot(G[k], dd));
  const dz = ds.map((dsk, k) => -(target[k] + z[k] * dsk) / s[k]);
  return { dd, ds, dz };
}

/** Longest share of a step that keeps every entry above 0, at most 1. */
function longest(x: number[], dx: number[]): number {
  let share = 1;
  for (let k = 0; k < x.length; k++) if (dx[k] < 0) share = Math.min(share, -x[k] / dx[k]);
  return share;
}

function dot(a: Vector, b: Vector): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}

function addTo(a: number[], b: Vector, factor: number): void {
  for (let i = 0; i < a.length; i++) a[i] += factor * b[i];
}

const largest = (a: number[]): number => a.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
