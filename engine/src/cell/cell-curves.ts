import { PiecewiseCubic } from '../table/piecewise-cubic.ts';
import { potentialsOf, type ElectrodePair } from './electrodes.ts';
import type { Cell } from '../study/schema.ts';

type Curve = { x: number[]; y: number[] } | { electrodes: ElectrodePair };

/** What a cell is over z: all in SI units, each a function of z. */
export type CellCurves = {
  /** Open-circuit voltage at 25 °C [V]. */
  ocv: PiecewiseCubic;
  /** Entropic coefficient dU/dT [V/K]. */
  entropic: PiecewiseCubic;
  /** Factor on every resistance. */
  shape: PiecewiseCubic;
  /** Anode potential at rest [V vs Li/Li⁺]; null where the cell has none. */
  anode: PiecewiseCubic | null;
};

export function cellCurves(cell: Cell): CellCurves {
  return {
    ocv: curve(cell.ocv, 'ocv'),
    entropic: cell.entropicMvPerK ? PiecewiseCubic.pchip(cell.entropicMvPerK, 1e-3) : PiecewiseCubic.constant(0),
    shape: cell.resistanceShape ? PiecewiseCubic.pchip(cell.resistanceShape) : PiecewiseCubic.constant(1),
    anode: cell.anode ? curve(cell.anode.potential, 'anode') : null,
  };
}

const PIECES = 2080;
const tabulated = new Map<string, PiecewiseCubic>();

/** A built-in formula is tabulated once and shared by every run; a table is the study's own. */
function curve(source: Curve, which: 'ocv' | 'anode'): PiecewiseCubic {
  if (!('electrodes' in source)) return PiecewiseCubic.pchip(source);
  const key = `${source.electrodes} ${which}`;
  const known = tabulated.get(key);
  if (known) return known;
  const made = PiecewiseCubic.tabulated(potentialsOf[source.electrodes][which], -0.02, 1.02, PIECES);
  tabulated.set(key, made);
  return made;
}
