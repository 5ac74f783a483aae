import type { PackSystem } from '../pack/pack-system.ts';
import { integralsBetween, J_PER_KWH } from '../session/ledgers.ts';
import type { DriveLedger } from './result.ts';

/** Energy between two states while driving or at rest (engine/MODEL.md, section 8). */
export function legLedger(pack: PackSystem, from: readonly number[], to: readonly number[]): DriveLedger {
  const joule = integralsBetween(pack, from, to);
  const stored = pack.storedJ(from[0], to[0]);
  const explained = joule.busbar + joule.ohmic + joule.polarisation + joule.reversible + stored + joule.rcPairs;
  const kwh = (j: number) => j / J_PER_KWH;
  return {
    batteryKwh: kwh(joule.battery),
    tractionKwh: kwh(-joule.battery - joule.auxiliaries),
    auxiliariesKwh: kwh(joule.auxiliaries),
    busbarKwh: kwh(joule.busbar),
    ohmicKwh: kwh(joule.ohmic),
    polarisationKwh: kwh(joule.polarisation),
    reversibleKwh: kwh(joule.reversible),
    storedKwh: kwh(stored),
    rcPairsKwh: kwh(joule.rcPairs),
    remainderKwh: kwh(joule.battery - explained),
  };
}
