import type { PackSystem } from '../pack/pack-system.ts';
import {
  boostInputCurrent,
  currentForPower,
  packCurrentFor,
  packCurrentForStationPower,
  packCurrentForStationVoltage,
} from '../station/link.ts';
import type { TaperTable } from '../strategy/taper-table.ts';
import type { Boost, Inlet, Pack, Station, Strategy } from '../study/schema.ts';
import { limitCodes } from './limits.ts';
import { PackLimits } from './pack-limits.ts';

/** Index of each limit in `limitCodes`, for the hot path. */
export const LIMIT = Object.fromEntries(limitCodes.map((code, i) => [code, i])) as Record<
  (typeof limitCodes)[number],
  number
>;

const STATION_CURRENT = LIMIT['station-current'];
const STATION_POWER = LIMIT['station-power'];
const STATION_VOLTAGE = LIMIT['station-voltage'];
const STATION_RAMP = LIMIT['station-ramp'];
const INLET = LIMIT['inlet'];
const PACK_CURRENT = LIMIT['pack-current'];
const CELL_VOLTAGE = LIMIT['cell-voltage'];
const TAPER = LIMIT['taper'];
const ANODE = LIMIT['anode'];
const HOT = LIMIT['hot'];
const COLD = LIMIT['cold'];

export type ChargeParts = { pack: Pack; inlet: Inlet; station: Station; strategy: Strategy; boost: Boost | undefined };

/**
 * The current while plugged in: the smallest of all limits, and which of them it is (engine/MODEL.md, section 6).
 *
 * `decide` fills the fields for a state the pack system has observed; `allowedBy` gives any single limit's current.
 */
export class ChargeCurrent {
  /** Current into the pack and from the station [A], the limit that binds (index in `limitCodes`). */
  current = 0;
  stationCurrent = 0;
  code = 0;
  /** Station-side voltage [V] and what the boost converter loses [W]. */
  stationVoltage = 0;
  boostLossW = 0;

  /** Power the station gives this car now [W]; steps are set by the run. */
  stationPowerW: number;
  readonly boosted: boolean;
  readonly stationVoltageMaxV: number;

  private readonly system: PackSystem;
  private readonly taper: TaperTable;
  private readonly taperFactor: number;
  private readonly stationCurrentMaxA: number;
  /** Station current at which a boost converter behind this inlet gets its most power [A]: more brings less. */
  private readonly mostPowerA: number;
  private readonly rampAPerS: number;
  private readonly inletMaxA: number;
  private readonly inletFromC: number;
  private readonly inletToC: number;
  private readonly limits: PackLimits;
  private readonly boostW: number;
  private readonly efficiency: number;

  constructor(parts: ChargeParts, system: PackSystem, taper: TaperTable, boosted: boolean) {
    const { pack, inlet, station, strategy, boost } = parts;
    this.system = system;
    this.taper = taper;
    this.taperFactor = taper.unit === 'A' ? 1 : taper.unit === 'C' ? system.capacityAh : 1000;
    this.stationPowerW = station.powerMaxKw * 1000;
    this.stationCurrentMaxA = station.currentMaxA;
    this.stationVoltageMaxV = station.voltageMaxV;
    this.rampAPerS = station.rampAPerS;
    this.inletMaxA = inlet.currentMaxA ?? Infinity;
    this.inletFromC = inlet.derateFromC;
    this.inletToC = inlet.derateToC;
    this.limits = new PackLimits({ pack, strategy }, system);
    this.boosted = boosted;
    this.mostPowerA = boosted && system.inletOhm > 0 ? station.voltageMaxV / (2 * system.inletOhm) : Infinity;
    this.boostW = (boost?.powerMaxKw ?? 0) * 1000;
    this.efficiency = boost?.efficiency ?? 1;
  }

  /** Sets current, station current and binding limit, `seconds` after plug-in. */
  decide(seconds: number): void {
    const system = this.system;
    const limits = this.limits;
    let I = limits.packMaxA;
    let code = PACK_CURRENT;
    const ceiling = limits.ceiling();
    if (ceiling < I) {
      I = ceiling;
      code = CELL_VOLTAGE;
    }
    const taper = this.taperCurrent();
    if (taper < I) {
      I = taper;
      code = TAPER;
    }
    const anode = limits.anode();
    if (anode < I) {
      I = anode;
      code = ANODE;
    }
    const hot = limits.hot();
    if (hot < I) {
      I = hot;
      code = HOT;
    }
    const cold = limits.cold();
    if (cold < I) {
      I = cold;
      code = COLD;
    }
    // Station-side limits on I_d; of equal limits the station's are listed first.
    let Id = this.stationSide(I);
    let cap = this.stationCurrentMaxA < this.mostPowerA ? this.stationCurrentMaxA : this.mostPowerA;
    let capCode = STATION_CURRENT;
    const rampA = this.rampAPerS * seconds;
    if (rampA < cap) {
      cap = rampA;
      capCode = STATION_RAMP;
    }
    const inlet = this.inletMaxA === Infinity ? Infinity : this.inletLimit();
    if (inlet < cap) {
      cap = inlet;
      capCode = INLET;
    }
    if (cap <= Id) {
      Id = cap;
      I = this.packSide(cap);
      code = capCode;
    }
    // Power and voltage are asked only where they would bind: solving for them takes more work.
    if (this.overPower(Id, I, code)) {
      I = this.allowedBy(STATION_POWER, seconds);
      Id = this.stationSide(I);
      code = STATION_POWER;
    }
    if (!this.boosted && system.restV + system.ohm * I + Id * system.inletOhm >= this.stationVoltageMaxV) {
      const voltage = this.allowedBy(STATION_VOLTAGE, seconds);
      if (voltage < I || (voltage === I && code > STATION_VOLTAGE)) {
        I = voltage;
        Id = this.stationSide(I);
        code = STATION_VOLTAGE;
      }
    }
    this.take(I, Id, code);
  }

  /** Sets the fields as if only one limit stood. */
  follow(code: number, seconds: number): void {
    const I = this.allowedBy(code, seconds);
    this.take(I, this.stationSide(I), code);
  }

  /** Largest current into the pack that one limit allows now [A]; Infinity where it does not stand. */
  allowedBy(code: number, seconds: number): number {
    const system = this.system;
    switch (code) {
      case STATION_CURRENT:
        return this.packSide(this.stationCurrentMaxA);
      case STATION_POWER:
        return this.powerCurrent();
      case STATION_VOLTAGE:
        return this.boosted
          ? Infinity
          : packCurrentForStationVoltage(
              system.restV,
              system.ohm,
              system.auxiliaryW,
              system.inletOhm,
              this.stationVoltageMaxV,
            );
      case STATION_RAMP:
        return this.packSide(this.rampAPerS * seconds);
      case INLET:
        return this.inletMaxA === Infinity ? Infinity : this.packSide(this.inletLimit());
      case PACK_CURRENT:
        return this.limits.packMaxA;
      case CELL_VOLTAGE:
        return this.limits.ceiling();
      case TAPER:
        return this.taperCurrent();
      case ANODE:
        return this.limits.anode();
      case HOT:
        return this.limits.hot();
      case COLD:
        return this.limits.cold();
      default:
        return Infinity;
    }
  }

  private take(I: number, Id: number, code: number): void {
    const { restV, ohm, inletOhm, auxiliaryW } = this.system;
    this.current = I;
    this.stationCurrent = Id;
    this.code = code;
    const V = restV + ohm * I;
    this.stationVoltage = this.boosted ? this.stationVoltageMaxV : V + Id * inletOhm;
    this.boostLossW = this.boosted ? (this.stationVoltageMaxV - Id * inletOhm) * Id - V * I - auxiliaryW : 0;
  }

  private taperCurrent(): number {
    const { soc, coldestSurface, restV, ohm } = this.system;
    const value = this.taper.value(soc, coldestSurface) * this.taperFactor;
    return this.taper.unit === 'kW' ? currentForPower(restV, ohm, value) : value;
  }

  private inletLimit(): number {
    const room = (this.inletToC - this.system.inletC) / (this.inletToC - this.inletFromC);
    return this.inletMaxA * (room < 0 ? 0 : room > 1 ? 1 : room);
  }

  /** Whether the station would give more than its power at this current (on a tie power is named before all but current). */
  private overPower(Id: number, I: number, code: number): boolean {
    const { restV, ohm, inletOhm, auxiliaryW } = this.system;
    const volts = this.boosted ? this.stationVoltageMaxV : restV + ohm * I + Id * inletOhm;
    const watts = volts * Id;
    if (watts > this.stationPowerW || (watts === this.stationPowerW && code !== STATION_CURRENT)) return true;
    return this.boosted && (restV + ohm * I) * I + auxiliaryW > this.boostW;
  }

  private powerCurrent(): number {
    const { restV, ohm, inletOhm, auxiliaryW } = this.system;
    if (!this.boosted) return packCurrentForStationPower(restV, ohm, auxiliaryW, inletOhm, this.stationPowerW);
    const fromStation = this.packSide(this.stationPowerW / this.stationVoltageMaxV);
    const fromConverter = currentForPower(restV, ohm, this.boostW - auxiliaryW);
    return fromStation < fromConverter ? fromStation : fromConverter;
  }

  /** Station current that goes with a pack current [A]. */
  private stationSide(I: number): number {
    const { restV, ohm, inletOhm, auxiliaryW } = this.system;
    const V = restV + ohm * I;
    if (!this.boosted) return I + auxiliaryW / V;
    return boostInputCurrent(this.stationVoltageMaxV, inletOhm, (V * I + auxiliaryW) / this.efficiency);
  }

  /** Pack current that goes with a station current [A]. */
  private packSide(Id: number): number {
    const { restV, ohm, inletOhm, auxiliaryW } = this.system;
    if (!this.boosted) return packCurrentFor(restV, ohm, auxiliaryW, Id);
    const held = Id < this.mostPowerA ? Id : this.mostPowerA;
    const watts = this.efficiency * (this.stationVoltageMaxV - held * inletOhm) * held - auxiliaryW;
    return currentForPower(restV, ohm, watts);
  }
}
