import type { Thermal } from '../study/schema.ts';

/** u of a proportional band, 0 to 1. */
const ramp = (value: number, zero: number, one: number) => {
  const u = (value - zero) / (one - zero);
  return u < 0 ? 0 : u > 1 ? 1 : u;
};

/** What the controllers act on: hottest and coldest surface, loop and ambient [°C], vehicle speed [m/s]. */
export type Sensed = {
  hottestSurface: number;
  coldestSurface: number;
  loopC: number;
  ambientC: number;
  speed: number;
};

/**
 * Coolant loop with chiller, radiator and heater (engine/MODEL.md, section 4).
 *
 * `control` sets the heat moved and the coolant's temperature into the pack; what it found stands in the fields.
 */
export class CoolantLoop {
  /** W, heat capacity flow [W/K]; C_L of the loop [J/K]; ε per segment; W·ε per segment [W/K]. */
  readonly flowWPerK: number;
  readonly loopJPerK: number;
  readonly effectiveness: number;
  readonly wallConductance: number;

  /** Heat moved [W], coolant into and out of the pack [°C], electrical power of pump, chiller and heater [W]. */
  chillerW = 0;
  radiatorW = 0;
  heaterW = 0;
  inC = 0;
  outC = 0;
  electricalW = 0;

  private readonly pumpW: number;
  private readonly chiller: Thermal['chiller'];
  private readonly radiator: Thermal['radiator'];
  private readonly heater: Thermal['heater'];

  constructor(thermal: Thermal, segments: number) {
    const { flowLPerMin, densityKgPerM3, specificHeatJPerKgK, volumeL } = thermal.coolant;
    this.flowWPerK = (flowLPerMin / 60000) * densityKgPerM3 * specificHeatJPerKgK;
    this.loopJPerK = (volumeL / 1000) * densityKgPerM3 * specificHeatJPerKgK;
    this.effectiveness = this.flowWPerK > 0 ? -Math.expm1(-thermal.plateWPerK / segments / this.flowWPerK) : 0;
    this.wallConductance = this.flowWPerK * this.effectiveness;
    this.pumpW = thermal.pumpW;
    this.chiller = thermal.chiller;
    this.radiator = thermal.radiator;
    this.heater = thermal.heater;
  }

  /** Sets what the controllers do. One object comes in, since numbers passed one by one would be boxed. */
  control(sensed: Sensed): void {
    const { hottestSurface: hottest, coldestSurface: coldest, loopC: loop, ambientC: ambient, speed } = sensed;
    const W = this.flowWPerK;
    this.chillerW = 0;
    this.radiatorW = 0;
    this.heaterW = 0;
    this.electricalW = this.pumpW;
    this.inC = loop;
    if (W === 0) return;
    if (this.chiller !== undefined) this.chill(this.chiller, sensed);
    if (this.radiator !== undefined) {
      const { parkedWPerK, perMpsWPerK, onC, fullC } = this.radiator;
      const u = ramp(hottest, onC, fullC);
      if (u > 0 && loop > ambient)
        this.radiatorW = -u * W * Math.expm1(-(parkedWPerK + perMpsWPerK * speed) / W) * (loop - ambient);
    }
    if (this.heater !== undefined) {
      const { ratedW, efficiency, onC, offC, maxCoolantC } = this.heater;
      const electrical = ramp(coldest, offC, onC) * ramp(loop, maxCoolantC, maxCoolantC - 5) * ratedW;
      this.heaterW = efficiency * electrical;
      this.electricalW += electrical;
    }
    this.inC = loop + (this.heaterW - this.chillerW - this.radiatorW) / W;
  }

  /** dθ_L/dt [K/s] for coolant leaving the last segment at `out` [°C]. */
  reservoirRate(out: number, loop: number): number {
    return (this.flowWPerK * (out - loop)) / this.loopJPerK;
  }

  private chill(chiller: NonNullable<Thermal['chiller']>, sensed: Sensed): void {
    const { loopC: loop, ambientC: ambient } = sensed;
    const u = ramp(sensed.hottestSurface, chiller.onC, chiller.fullC);
    if (u === 0 || loop <= chiller.minCoolantC) return;
    const hot = ambient > 35 ? 1 - chiller.deratePerKAbove35 * (ambient - 35) : 1;
    const rated = u * chiller.ratedW * (hot < 0 ? 0 : hot);
    const room = this.flowWPerK * (loop - chiller.minCoolantC);
    const cop = chiller.cop35 + chiller.copPerK * (35 - ambient);
    this.chillerW = rated < room ? rated : room;
    this.electricalW += this.chillerW / (cop < 1 ? 1 : cop);
  }
}
