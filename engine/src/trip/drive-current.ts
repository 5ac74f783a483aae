import type { PackSystem } from '../pack/pack-system.ts';
import { LIMIT } from '../session/charge-current.ts';
import type { PackLimits } from '../session/pack-limits.ts';
import { currentForPower } from '../station/link.ts';

/**
 * The current while driving or at rest: what the load asks for, with regeneration held to the pack's limits
 * (engine/MODEL.md, section 7).
 */
export class DriveCurrent {
  /** Current into the pack [A], and the limit that holds regeneration (index in `limitCodes`), or −1. */
  current = 0;
  code = -1;
  /** Square of the voltage left at the most power, V0² − 4·R·P [V²]; below 0 no current gives the power asked for. */
  powerRoom = 0;
  /** Power that the wheels ask of the pack, negative while they feed it [W]. */
  tractionW = 0;

  constructor(
    private readonly system: PackSystem,
    private readonly limits: PackLimits,
  ) {}

  /** Sets current and code for a state the pack system has observed. */
  decide(): void {
    const { restV, ohm, auxiliaryW } = this.system;
    const load = this.tractionW + auxiliaryW;
    this.powerRoom = restV * restV - 4 * ohm * load;
    // Past its most power the pack cannot follow and the leg fails; until that moment is found it gives its most.
    this.current = this.powerRoom < 0 ? -restV / (2 * ohm) : currentForPower(restV, ohm, -load);
    this.code = -1;
    if (this.current <= 0) return;
    const { limits } = this;
    this.hold(limits.packMaxA, LIMIT['pack-current']);
    this.hold(limits.ceiling(), LIMIT['cell-voltage']);
    this.hold(limits.anode(), LIMIT.anode);
    this.hold(limits.hot(), LIMIT.hot);
    this.hold(limits.cold(), LIMIT.cold);
  }

  private hold(allowed: number, code: number): void {
    if (allowed >= this.current) return;
    this.current = allowed;
    this.code = code;
  }
}
