import type { SessionSystem } from '../session/session-system.ts';
import type { SessionStudy } from '../study/schema.ts';
import { boundNames, tuneBounds, type BoundName } from '../study/tune-bounds.ts';
import type { TuneBounds } from '../study/tune-request.ts';

/** How one bound is read, compared and shown. */
type Kind = {
  /** +1: never above; −1: never below. */
  sign: 1 | -1;
  /** Decimals with which the quantity is shown. */
  digits: number;
  /** What counts as one unit of excess against another bound's. */
  scale: number;
  /** Room left to the bound, so that other tolerances and grids than the tuning's keep it too. */
  backOff: number;
  read(system: SessionSystem, y: ArrayLike<number>): number;
};

const stationKw = ({ charge }: SessionSystem) => (charge.stationVoltage * charge.stationCurrent) / 1000;

const KINDS: Record<BoundName, Kind> = {
  hottestCoreMaxC: {
    sign: 1,
    digits: 1,
    scale: 1,
    backOff: 2e-3,

    read: ({ pack }, y) => pack.hottestCore(y),
  },
  hottestSurfaceMaxC: {
    sign: 1,
    digits: 1,
    scale: 1,
    backOff: 2e-3,

    read: ({ pack }) => pack.hottestSurface,
  },
  lowestAnodeMinMv: {
    sign: -1,
    digits: 0,
    scale: 10,
    backOff: 5e-3,
    read: ({ pack, charge }) => 1000 * pack.lowestAnodeV(charge.current),
  },
  highestCellMaxV: {
    sign: 1,
    digits: 3,
    scale: 0.02,
    backOff: 5e-6,
    read: ({ pack, charge }) => pack.highestCellV(charge.current),
  },
  inletMaxC: { sign: 1, digits: 1, scale: 1, backOff: 2e-3, read: ({ pack }) => pack.inletC },
  stationPowerMaxKw: { sign: 1, digits: 1, scale: 5, backOff: 5e-3, read: stationKw },
  stationCurrentMaxA: { sign: 1, digits: 1, scale: 10, backOff: 5e-3, read: ({ charge }) => charge.stationCurrent },
};

/** A bound as a tuning holds it. */
export type BoundSpec = Kind & {
  name: BoundName;
  limit: number;
  unit: string;
  /** Kept by a limit of the study itself, whatever the taper: that limit stands exactly on it. */
  guarded: boolean;
};

/** The bounds of a request, in the order of `boundNames`, for studies that are all run under them. */
export function boundSpecs(bounds: TuneBounds, studies: readonly SessionStudy[]): BoundSpec[] {
  return boundNames.flatMap((name) => {
    const limit = bounds[name];
    if (limit === undefined) return [];
    const guarded = studies.every((study) => isGuarded(name, limit, study));
    const kind = KINDS[name];
    return [{ ...kind, name, limit, unit: tuneBounds[name].unit, guarded, backOff: guarded ? 0 : kind.backOff }];
  });
}

function isGuarded(name: BoundName, limit: number, { strategy, station }: SessionStudy): boolean {
  switch (name) {
    case 'lowestAnodeMinMv':
      return strategy.anodeMarginMv !== undefined && strategy.anodeMarginMv >= limit;
    case 'highestCellMaxV':
      return strategy.cellVoltageCeilingV <= limit;
    case 'stationPowerMaxKw':
      return station.powerMaxKw <= limit;
    case 'stationCurrentMaxA':
      return station.currentMaxA <= limit;
    default:
      return false;
  }
}

/** What arithmetic leaves of a bound that is held exactly, in scales. */
const ROUNDING = 1e-6;

/** By how much a value passes its bound, in scales; at most 0 where it keeps it. */
export const excess = ({ sign, limit, scale }: BoundSpec, value: number): number =>
  (sign * (value - limit)) / scale - ROUNDING;

/** Room between a value and its bound, in the bound's unit; below 0 where it is passed. */
export const marginOf = ({ sign, limit }: BoundSpec, value: number): number => sign * (limit - value);
