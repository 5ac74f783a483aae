import type { PackSystem } from './pack-system.ts';

export type TimeConstant = { seconds: number; name: string };

/** Shortest time constant of a pack's states [s] and what has it: an explicit integrator must stay within a few of them. */
export function shortestTimeConstant(pack: PackSystem): TimeConstant {
  return candidates(pack).reduce((a, b) => (b.seconds < a.seconds ? b : a), { seconds: 1e9, name: 'none' });
}

function candidates(pack: PackSystem): TimeConstant[] {
  const { coolant, layout } = pack;
  const outward = coolant.wallConductance + pack.surfaceToAir;
  const surface = 'the surface node’s heat capacity against its conductances (thermal)';
  const nodes = layout.twoNode
    ? [
        { seconds: pack.surfaceJPerK / (pack.coreToSurface + outward), name: surface },
        { seconds: pack.coreJPerK / pack.coreToSurface, name: 'the core node’s heat capacity (thermal)' },
      ]
    : [{ seconds: pack.coreJPerK / outward, name: surface }];
  const pairs = Array.from(pack.tau, (seconds, k) => ({ seconds, name: `RC pair ${k + 1} (cell.rcPairs[${k}].tauS)` }));
  const loop = {
    seconds: coolant.loopJPerK / coolant.flowWPerK,
    name: 'the coolant loop’s volume against its flow (thermal.coolant)',
  };
  const inlet = {
    seconds: pack.inletJPerK / pack.inletToAir,
    name: 'the inlet’s heat capacity (inlet.heatCapacityJPerK)',
  };
  return [...pairs, ...nodes, loop, inlet];
}
