import type { PackSystem } from '../pack/pack-system.ts';
import type { Pack, Strategy } from '../study/schema.ts';
import { PiecewiseCubic } from '../table/piecewise-cubic.ts';

/** The limits that hold wherever the current comes from: a station, or the wheels (engine/MODEL.md, section 6). */
export class PackLimits {
  readonly packMaxA: number;
  private readonly hotFromC: number;
  private readonly hotToC: number;
  private readonly coldA: PiecewiseCubic | null;

  constructor(
    { pack, strategy }: { pack: Pack; strategy: Strategy },
    private readonly system: PackSystem,
  ) {
    this.packMaxA = pack.chargeCurrentMaxA;
    this.hotFromC = strategy.hotDerate.fromC;
    this.hotToC = strategy.hotDerate.toC;
    const { coldLimit } = strategy;
    this.coldA = coldLimit ? PiecewiseCubic.linear(coldLimit.tempC, coldLimit.cRate, system.capacityAh) : null;
  }

  ceiling(): number {
    const allowed = this.system.ceilingCurrent;
    return allowed > 0 ? allowed : 0;
  }

  anode(): number {
    const allowed = this.system.anodeCurrent;
    return allowed > 0 ? allowed : 0;
  }

  hot(): number {
    const room = (this.hotToC - this.system.hottestSurface) / (this.hotToC - this.hotFromC);
    return this.packMaxA * (room < 0 ? 0 : room > 1 ? 1 : room);
  }

  cold(): number {
    return this.coldA === null ? Infinity : this.coldA.value(this.system.coldestSurface);
  }
}
