import { EigenvalueDecomposition, LuDecomposition, Matrix, solve } from 'ml-matrix';
import { findRoot } from '../integrate/find-root.ts';
import { PackSystem } from '../pack/pack-system.ts';
import { inletOf } from '../session/plug-in.ts';
import type { SessionStudy } from '../study/schema.ts';

/** Where the pack settles under a steady heat, controllers acting [°C, W]. */
export type SteadyState = {
  heatW: number;
  hottestCoreC: number;
  hottestSurfaceC: number;
  coolantInC: number;
  coolantOutC: number;
  chillerW: number;
  radiatorW: number;
};

export type ThermalAnalysis = {
  /** Time constants of a segment with the coolant's inlet temperature held, slowest first [s]. */
  timeConstantsS: number[];
  /** Minutes until the pack has gone 95 % of the way to where it settles: three of the slowest time constant. */
  heatSoakedMin: number;
  /** Slowest time constant with the loop left to itself, radiator open and chiller off [s]; null where nothing leaves. */
  loopTimeConstantS: number | null;
  steady: SteadyState | null;
  /** Why there is no steady state, in a sentence. */
  note: string | null;
};

const HEAT_SOAKED = 3;
const HOTTEST_C = 2000;

/**
 * The thermal network's own answers: how fast it is, and where it settles under a given heat.
 *
 * Coolant couples segments downstream only, so with its inlet temperature held the network's matrix is block triangular
 * with equal blocks, and its eigenvalues are those of one segment.
 *
 * @param study   a session study
 * @param heatW   steady heat in the cells, spread evenly over the segments [W]
 * @see engine/MODEL.md, section 4
 */
export function thermalAnalysis(study: SessionStudy, heatW: number): ThermalAnalysis {
  const system = new PackSystem({ ...study, inlet: inletOf(study) });
  system.ambientC = study.session.ambientC;
  const timeConstantsS = timeConstants(segmentMatrix(system));
  const slowest = timeConstantsS[0] ?? Infinity;
  const loop = slowestTimeConstant(loopMatrix(study, system));
  const steady = steadyState(system, heatW);
  return {
    timeConstantsS,
    heatSoakedMin: (HEAT_SOAKED * slowest) / 60,
    loopTimeConstantS: Number.isFinite(loop) ? loop : null,
    steady,
    note: steady ? null : 'Nothing carries this heat away for good, so the pack does not settle.',
  };
}

/** Rates below this share of the fastest are taken for none at all. */
const NO_RATE = 1e-12;
const MOST_ROUNDS = 1000;

const largestEntry = (matrix: Matrix): number =>
  matrix.to1DArray().reduce((most, value) => Math.max(most, Math.abs(value)), 0);

/** −1/λ of every eigenvalue that decays, slowest first [s]; an eigenvalue of 0 is Infinity. */
function timeConstants(matrix: Matrix): number[] {
  const scale = largestEntry(matrix);
  // A heat capacity too small for a number follows at once; the decomposition would not end on it.
  if (scale === Infinity) return matrix.diag().map((rate) => -1 / rate);
  return new EigenvalueDecomposition(Matrix.div(matrix, scale || 1)).realEigenvalues
    .map((value) => (value < -NO_RATE ? -1 / (value * scale) : Infinity))
    .sort((a, b) => b - a);
}

/**
 * Slowest time constant of a whole network [s]; Infinity where a mode does not decay.
 *
 * Heat only spreads: nothing off the diagonal is negative, so the slowest mode is real and of one sign (Perron,
 * Frobenius), and inverse iteration goes to it, in a moment even for 400 segments.
 */
function slowestTimeConstant(matrix: Matrix): number {
  const scale = largestEntry(matrix);
  const lu = new LuDecomposition(Matrix.div(matrix, scale || 1));
  if (!Number.isFinite(scale) || lu.isSingular()) return Infinity;
  let mode = Matrix.ones(matrix.rows, 1);
  let slowest = 0;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const next = lu.solve(mode).neg();
    const size = next.max();
    if (!(size > 0 && size < 1 / NO_RATE)) return Infinity;
    if (Math.abs(size - slowest) < 1e-10 * size) break;
    slowest = size;
    mode = next.div(size);
  }
  return slowest / scale;
}

/** d(T, S)/dt of one segment, coolant inlet and air held: one row and column where there is one node. */
function segmentMatrix(system: PackSystem): Matrix {
  const outward = system.coolant.wallConductance + system.surfaceToAir;
  if (!system.layout.twoNode) return new Matrix([[-outward / system.coreJPerK]]);
  const across = system.coreToSurface;
  return new Matrix([
    [-across / system.coreJPerK, across / system.coreJPerK],
    [across / system.surfaceJPerK, -(across + outward) / system.surfaceJPerK],
  ]);
}

/** d(T_j, S_j, θ_L)/dt of the whole network with its loop closed, radiator open at a stand, chiller and heater off. */
function loopMatrix(study: SessionStudy, system: PackSystem): Matrix {
  const { segments: M, twoNode } = system.layout;
  const { coolant } = system;
  const nodes = twoNode ? 2 * M : M;
  const matrix = Matrix.zeros(nodes + 1, nodes + 1);
  const surfaceAt = twoNode ? M : 0;
  const surfaceJPerK = twoNode ? system.surfaceJPerK : system.coreJPerK;
  const add = (row: number, column: number, value: number) => matrix.set(row, column, matrix.get(row, column) + value);
  // θ into segment j as weights on (S_1 … S_{j−1}, θ_L): the radiator takes a share of θ_L − T_amb.
  const W = coolant.flowWPerK;
  const radiatorShare = W > 0 && study.thermal.radiator ? -Math.expm1(-study.thermal.radiator.parkedWPerK / W) : 0;
  let theta = new Array<number>(nodes + 1).fill(0);
  theta[nodes] = 1 - radiatorShare;
  for (let j = 0; j < M; j++) {
    const s = surfaceAt + j;
    if (twoNode) {
      add(j, j, -system.coreToSurface / system.coreJPerK);
      add(j, s, system.coreToSurface / system.coreJPerK);
      add(s, j, system.coreToSurface / system.surfaceJPerK);
      add(s, s, -system.coreToSurface / system.surfaceJPerK);
    }
    add(s, s, -(coolant.wallConductance + system.surfaceToAir) / surfaceJPerK);
    theta.forEach((weight, column) => add(s, column, (coolant.wallConductance * weight) / surfaceJPerK));
    theta = theta.map(
      (weight, column) => weight * (1 - coolant.effectiveness) + (column === s ? coolant.effectiveness : 0),
    );
  }
  theta.forEach((weight, column) => add(nodes, column, (W * weight) / coolant.loopJPerK));
  add(nodes, nodes, -W / coolant.loopJPerK);
  return matrix;
}

/** Surfaces that carry `heatW` to coolant entering at `coolantIn` and to the air [°C]. */
function surfacesAt(system: PackSystem, heatW: number, coolantIn: number): number[] {
  const { segments: M } = system.layout;
  const { wallConductance, effectiveness } = system.coolant;
  const air = system.surfaceToAir;
  const matrix = Matrix.zeros(M, M);
  const right = Matrix.zeros(M, 1);
  let upstream = new Array<number>(M).fill(0);
  let held = coolantIn;
  for (let j = 0; j < M; j++) {
    upstream.forEach((weight, i) => matrix.set(j, i, -wallConductance * weight));
    matrix.set(j, j, wallConductance + air);
    right.set(j, 0, heatW / M + wallConductance * held + air * system.ambientC);
    upstream = upstream.map((weight, i) => weight * (1 - effectiveness) + (i === j ? effectiveness : 0));
    held *= 1 - effectiveness;
  }
  return solve(matrix, right).to1DArray();
}

/** Finds the loop temperature at which chiller, radiator and air carry the heat away together. */
function steadyState(system: PackSystem, heatW: number): SteadyState | null {
  const { coolant, layout } = system;
  const W = coolant.flowWPerK;
  if (coolant.wallConductance + system.surfaceToAir === 0) return null;
  const atZero = surfacesAt(system, heatW, 0);
  const perKelvin = surfacesAt(system, heatW, 1).map((value, j) => value - atZero[j]);
  const settle = (loop: number) => {
    // The coolant's inlet depends on the controllers, which read the surfaces, which depend on the inlet: a short iteration.
    let inlet = loop;
    let surfaces = atZero;
    for (let round = 0; round < 60; round++) {
      surfaces = atZero.map((value, j) => value + perKelvin[j] * inlet);
      const { ambientC } = system;
      const hottestSurface = Math.max(...surfaces);
      coolant.control({ hottestSurface, coldestSurface: Math.min(...surfaces), loopC: loop, ambientC, speed: 0 });
      inlet = 0.5 * (inlet + coolant.inC);
    }
    const out = surfaces.reduce((theta, surface) => theta + coolant.effectiveness * (surface - theta), coolant.inC);
    return { surfaces, out, gain: W > 0 ? W * (out - loop) : 0 };
  };
  const gainAt = (loop: number) => settle(loop).gain;
  const low = Math.min(system.ambientC, 0) - 60;
  if (W > 0 && gainAt(HOTTEST_C) > 0) return null;
  const loop = W > 0 ? findRoot(gainAt, low, gainAt(low), HOTTEST_C, gainAt(HOTTEST_C), 1e-6) : system.ambientC;
  const { surfaces, out } = settle(loop);
  const across = layout.twoNode ? heatW / layout.segments / system.coreToSurface : 0;
  const hottestSurfaceC = Math.max(...surfaces);
  if (!(hottestSurfaceC < HOTTEST_C)) return null;
  return {
    heatW,
    hottestCoreC: hottestSurfaceC + across,
    hottestSurfaceC,
    coolantInC: coolant.inC,
    coolantOutC: out,
    chillerW: coolant.chillerW,
    radiatorW: coolant.radiatorW,
  };
}
