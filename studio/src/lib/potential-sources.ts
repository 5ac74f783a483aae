import { electrodePairs, potentialsOf, type ElectrodePair } from '@voltiplano/engine';

/** Rest voltage and anode potential come from a built-in electrode pair or from a table. */
export type PotentialSource = ElectrodePair | 'table';

const NAMES: Record<ElectrodePair, string> = {
  'nmc811-graphite': 'NMC811 and graphite',
  'lfp-graphite': 'LFP and graphite',
};

export const potentialSources: { value: PotentialSource; label: string }[] = [
  ...electrodePairs.map((pair) => ({ value: pair, label: NAMES[pair] })),
  { value: 'table', label: 'A table over z' },
];

type Potential = { electrodes: ElectrodePair } | { x: number[]; y: number[] };

export function sourceOf(potential: Potential): PotentialSource {
  return 'electrodes' in potential ? potential.electrodes : 'table';
}

/** Rows of a table made from a pair's formulas: ends close together, where the curves bend. */
const TABLE_Z = [0, 0.05, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 0.95, 1];

/**
 * A potential from another source; a table starts from the formulas of the pair before, to be changed row by row.
 *
 * @param part  which potential: the cell's rest voltage or the anode against lithium
 */
export function potentialFrom(source: PotentialSource, before: Potential, part: 'ocv' | 'anode'): Potential {
  if (source !== 'table') return { electrodes: source };
  if (!('electrodes' in before)) return before;
  const y = TABLE_Z.map((z) => Number(potentialsOf[before.electrodes][part](z).toFixed(4)));
  return { x: TABLE_Z, y };
}
