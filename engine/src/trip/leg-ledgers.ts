import type { PackSystem } from '../pack/pack-system.ts';
import { integralsBetween, J_PER_KWH, packParts, sumOf } from '../session/ledgers.ts';
import type { DriveLedger } from './result.ts';

/** Energy between two states while driving or at rest (engine/MODEL.md, section 8). */
export function legLedger(pack: PackSystem, from: readonly number[], to: readonly number[]): DriveLedger {
  const joule = integralsBetween(pack, from, to);
  const parts = packParts(pack, from, to);
  const batteryKwh = joule.battery / J_PER_KWH;
  const auxiliariesKwh = joule.auxiliaries / J_PER_KWH;
  const remainderKwh = batteryKwh - sumOf(parts);
  return { batteryKwh, tractionKwh: -batteryKwh - auxiliariesKwh, auxiliariesKwh, ...parts, remainderKwh };
}
