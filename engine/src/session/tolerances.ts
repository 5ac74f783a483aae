import type { PackSystem } from '../pack/pack-system.ts';

/** Tolerances of each state from one relative tolerance: absolute ones stand at a usual size of the state. */
export function tolerances(pack: PackSystem, rtol: number): { relativeTolerance: number; absoluteTolerance: number[] } {
  const { layout } = pack;
  const scale = new Array<number>(layout.size).fill(0);
  scale[0] = 1;
  scale.fill(USUAL_K, layout.core, layout.rc);
  scale.fill(USUAL_V * pack.cellsPerSegment, layout.rc, layout.loop);
  scale.fill(USUAL_K, layout.loop, layout.integrals);
  // Integrals feed nothing back: their scale is the pack's own energy, so that they never set the step.
  scale.fill(3600 * 4 * pack.capacityAh * pack.cellsPerSegment * layout.segments, layout.integrals);
  return { relativeTolerance: rtol, absoluteTolerance: scale.map((size) => size * rtol) };
}

const USUAL_K = 30;
const USUAL_V = 0.5;
