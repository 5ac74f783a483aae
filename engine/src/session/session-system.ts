import { INTEGRAL } from '../pack/layout.ts';
import { PackSystem } from '../pack/pack-system.ts';
import { TaperTable } from '../strategy/taper-table.ts';
import type { SessionStudy } from '../study/schema.ts';
import { studyError } from '../study/study-error.ts';
import { ChargeCurrent } from './charge-current.ts';
import { checkAuxiliaries, decideBoost, inletOf, stateAtPlugIn } from './plug-in.ts';

const { station: STATION, battery: BATTERY, boostLoss: BOOST_LOSS, ambient: AMBIENT } = INTEGRAL;

/** Raised inside a trial step that ran out of the numbers' range; the run shortens its steps and tries again. */
export class NotFinite extends Error {}

/** One session's physics, ready to be integrated: pack and heat, the current, and what changes at jumps. */
export class SessionSystem {
  readonly pack: PackSystem;
  readonly taper: TaperTable;
  readonly charge: ChargeCurrent;
  readonly start: number[];
  readonly boosted: boolean;
  /** Limit that the derivative follows alone (index in `limitCodes`), or −1 for the smallest of all. */
  followed = -1;

  /** @throws {StudyError} `REFUSED` where the session cannot start */
  constructor(study: SessionStudy) {
    const inlet = inletOf(study);
    this.pack = new PackSystem({ ...study, inlet });
    this.pack.ambientC = study.session.ambientC;
    this.pack.hotelW = study.session.hotelW;
    this.taper = new TaperTable(study.strategy.taper);
    this.start = stateAtPlugIn(this.pack, study.session);
    this.pack.observe(this.start);
    this.boosted = decideBoost(this.pack.restV, study.station, study.boost);
    checkAuxiliaries(this.pack);
    this.charge = new ChargeCurrent({ ...study, inlet, boost: study.boost }, this.pack, this.taper, this.boosted);
  }

  /** Reads a state at t seconds after plug-in and decides the current there by all limits. */
  at(t: number, y: ArrayLike<number>): void {
    this.pack.observe(y);
    this.charge.decide(t);
  }

  /** dy/dt for the integrator. */
  readonly derivative = (t: number, y: number[], dy: number[]): void => {
    const { pack, charge } = this;
    const { inlet, integrals } = pack.layout;
    pack.observe(y);
    if (this.followed < 0) charge.decide(t);
    else charge.follow(this.followed, t);
    const { stationCurrent } = charge;
    pack.current = charge.current;
    pack.inletCurrent = stationCurrent;
    pack.rates(y, dy);
    dy[integrals + STATION] = charge.stationVoltage * stationCurrent;
    dy[integrals + BOOST_LOSS] = charge.boostLossW;
    // Every state feeds one of these sums, so anything not finite shows here; odex would take NaN for converged.
    const sum = dy[integrals + BATTERY] + dy[integrals + AMBIENT] + pack.coolant.outC + y[inlet] + stationCurrent;
    if (!(sum - sum === 0)) throw new NotFinite();
  };

  /** The error for a session that cannot go on from a state, with the reason. */
  stuckAt(t: number, y: ArrayLike<number>): Error {
    this.at(t, y);
    const { restV, ohm, auxiliaryW, soc } = this.pack;
    if (restV + ohm * this.charge.current > COLLAPSED * restV) return inconsistent(t);
    const message =
      `Stopped at ${(t / 60).toFixed(1)} min: the station gives less than the ${(auxiliaryW / 1000).toFixed(1)} kW of auxiliaries, ` +
      `and the pack, at ${(100 * soc).toFixed(0).replace('-', '−')} %, can give the rest no longer.`;
    return studyError('INCONSISTENT', 'session.hotelW', 'auxiliaries-above-pack', message);
  }
}

/** At the most power a pack can give its voltage is half of that at rest; this near it there is no way on. */
const COLLAPSED = 0.6;

/** The error for a run that leaves the numbers' range however short its steps. */
export function inconsistent(t: number): Error {
  const message = `Stopped at ${(t / 60).toFixed(1)} min: the state left the range of numbers. A heat capacity, resistance or table of this study is far out of proportion.`;
  return studyError('INCONSISTENT', '', 'finite', message);
}
