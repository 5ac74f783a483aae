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

/** Energy from the grid to the cells between two states of a session (engine/MODEL.md, section 8). */
export function energyLedger(
  pack: PackSystem,
  from: readonly number[],
  to: readonly number[],
  rectifierEfficiency: number,
): EnergyLedger {
  const joule = integralsBetween(pack, from, to);
  const kwh = (j: number) => j / J_PER_KWH;
  const stored = pack.storedJ(from[0], to[0]);
  const explained =
    joule.inlet +
    joule.boostLoss +
    joule.auxiliaries +
    joule.busbar +
    joule.ohmic +
    joule.polarisation +
    joule.reversible +
    stored +
    joule.rcPairs;
  const grid = joule.station / rectifierEfficiency;
  return {
    gridKwh: kwh(grid),
    rectifierLossKwh: kwh(grid - joule.station),
    stationKwh: kwh(joule.station),
    inletKwh: kwh(joule.inlet),
    boostLossKwh: kwh(joule.boostLoss),
    auxiliariesKwh: kwh(joule.auxiliaries),
    busbarKwh: kwh(joule.busbar),
    ohmicKwh: kwh(joule.ohmic),
    polarisationKwh: kwh(joule.polarisation),
    reversibleKwh: kwh(joule.reversible),
    storedKwh: kwh(stored),
    rcPairsKwh: kwh(joule.rcPairs),
    remainderKwh: kwh(joule.station - explained),
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
