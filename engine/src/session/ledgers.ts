import { integralNames, type IntegralName } from '../pack/layout.ts';
import type { PackSystem } from '../pack/pack-system.ts';
import type { EnergyLedger, ThermalLedger } from './result.ts';

export const J_PER_KWH = 3.6e6;

/** Growth of each ledger integral between two states [J]. */
export function integralsBetween(
  pack: PackSystem,
  from: readonly number[],
  to: readonly number[],
): Record<IntegralName, number> {
  const first = pack.layout.integrals;
  return Object.fromEntries(integralNames.map((name, i) => [name, to[first + i] - from[first + i]])) as Record<
    IntegralName,
    number
  >;
}

type PackParts = Pick<
  EnergyLedger,
  'busbarKwh' | 'ohmicKwh' | 'polarisationKwh' | 'reversibleKwh' | 'storedKwh' | 'rcPairsKwh'
>;

/** What becomes of the energy at the pack's terminals between two states [kWh]. */
export function packParts(pack: PackSystem, from: readonly number[], to: readonly number[]): PackParts {
  const joule = integralsBetween(pack, from, to);
  return {
    busbarKwh: joule.busbar / J_PER_KWH,
    ohmicKwh: joule.ohmic / J_PER_KWH,
    polarisationKwh: joule.polarisation / J_PER_KWH,
    reversibleKwh: joule.reversible / J_PER_KWH,
    storedKwh: pack.storedJ(from[0], to[0]) / J_PER_KWH,
    rcPairsKwh: joule.rcPairs / J_PER_KWH,
  };
}

export const sumOf = (parts: Record<string, number>): number =>
  Object.values(parts).reduce((sum, part) => sum + part, 0);

/** Energy from the grid to the cells between two states of a session (engine/MODEL.md, section 8). */
export function energyLedger(
  pack: PackSystem,
  from: readonly number[],
  to: readonly number[],
  rectifierEfficiency: number,
): EnergyLedger {
  const joule = integralsBetween(pack, from, to);
  const stationKwh = joule.station / J_PER_KWH;
  const gridKwh = stationKwh / rectifierEfficiency;
  const spent = {
    inletKwh: joule.inlet / J_PER_KWH,
    boostLossKwh: joule.boostLoss / J_PER_KWH,
    auxiliariesKwh: joule.auxiliaries / J_PER_KWH,
    ...packParts(pack, from, to),
  };
  return {
    gridKwh,
    rectifierLossKwh: gridKwh - stationKwh,
    stationKwh,
    ...spent,
    remainderKwh: stationKwh - sumOf(spent),
  };
}

/** Heat made, kept and carried away between two states (engine/MODEL.md, section 8). */
export function thermalLedger(pack: PackSystem, from: readonly number[], to: readonly number[]): ThermalLedger {
  const joule = integralsBetween(pack, from, to);
  const { core, surface, segments, twoNode, loop } = pack.layout;
  const gained = (first: number) => {
    let kelvin = 0;
    for (let j = 0; j < segments; j++) kelvin += to[first + j] - from[first + j];
    return kelvin;
  };
  const cells = joule.ohmic + joule.polarisation + joule.reversible;
  const cores = pack.coreJPerK * gained(core);
  const surfaces = twoNode ? pack.surfaceJPerK * gained(surface) : 0;
  const inLoop = pack.coolant.loopJPerK * (to[loop] - from[loop]);
  const explained = cores + surfaces + inLoop + joule.chiller + joule.radiator + joule.ambient - joule.heater;
  return {
    cellsKj: cells / 1000,
    busbarKj: joule.busbar / 1000,
    coresKj: cores / 1000,
    surfacesKj: surfaces / 1000,
    loopKj: inLoop / 1000,
    chillerKj: joule.chiller / 1000,
    radiatorKj: joule.radiator / 1000,
    ambientKj: joule.ambient / 1000,
    heaterKj: joule.heater / 1000,
    remainderKj: (cells + joule.busbar - explained) / 1000,
  };
}
