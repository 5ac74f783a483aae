import type { SessionStudyInput } from '@voltiplano/engine';
import { examples, type Example } from '../../../lib/examples.ts';

/** Parts of a session study that can be kept, and edited, by themselves. */
export const sessionPartKinds = ['cell', 'pack', 'thermal', 'inlet', 'station', 'strategy'] as const;
export type SessionPartKind = (typeof sessionPartKinds)[number];

/** A part as it stands in a study file. */
export type PartBody = Record<string, unknown>;

/** Above these a part is made for the 800-V class: a pack's cells in series, a station's lowest voltage and power. */
const SERIES_800_V = 140;
const VOLTAGE_800_V = 300;
/** What a 400-V-class pack can take from a 500 A cable. */
const POWER_400_V_KW = 230;
/** Below this a station cannot charge an 800-V-class pack. */
const REACH_800_V = 850;
/** Cells and strategies below this voltage are made for LFP. */
const LFP_CEILING_V = 3.9;

/** The example that a part is shown on until somebody chooses another: the van, unless the part asks for more. */
export function carrierFor(kind: SessionPartKind, body: PartBody): Example {
  const number = (name: string) => (typeof body[name] === 'number' ? body[name] : Number.NaN);
  const isLfp = kind === 'cell' ? number('vMaxV') < LFP_CEILING_V : number('cellVoltageCeilingV') < LFP_CEILING_V;
  const isHigh =
    number('series') > SERIES_800_V ||
    number('voltageMinV') > VOLTAGE_800_V ||
    (number('powerMaxKw') > POWER_400_V_KW && number('voltageMaxV') >= REACH_800_V) ||
    mostPowerKw(body) > POWER_400_V_KW;
  const title = isLfp ? 'Vicuña town, LFP' : isHigh ? 'Suri, full power' : 'Vicuña, warm arrival';
  return examples.find((example) => example.title === title)!;
}

/** The most a taper in kW asks for; 0 for other tapers and parts. */
function mostPowerKw({ taper }: PartBody): number {
  const { unit, values, points, steps } = (taper ?? {}) as {
    unit?: string;
    values?: number[][];
    points?: { value: number }[];
    steps?: { value: number }[];
  };
  if (unit !== 'kW') return 0;
  return Math.max(0, ...(values ?? []).flat(), ...[...(points ?? []), ...(steps ?? [])].map(({ value }) => value));
}

/**
 * A session study that carries a part: the study given, with the part in it, and whatever else must give way to the
 * rules between parts. The part itself stays as it is.
 *
 * @param body  a part that its own schema takes
 */
export function carriedStudy(base: SessionStudyInput, kind: SessionPartKind, body: PartBody): SessionStudyInput {
  const study = { ...base, [kind]: body } as SessionStudyInput;
  switch (kind) {
    case 'cell':
      return { ...study, strategy: strategyWithin(study) };
    case 'strategy':
      return { ...study, cell: cellFor(study) };
    case 'thermal':
      return { ...study, pack: packFor(study) };
    case 'pack':
    case 'inlet':
    case 'station':
      return study;
  }
}

/** The ceiling stays within the cell's window; a margin needs an anode. */
function strategyWithin({ strategy, cell }: SessionStudyInput): SessionStudyInput['strategy'] {
  const { anodeMarginMv, ...others } = strategy;
  const ceiling = strategy.cellVoltageCeilingV;
  const isWithin = ceiling <= cell.vMaxV && ceiling > cell.vMinV;
  return {
    ...others,
    cellVoltageCeilingV: isWithin ? ceiling : cell.vMaxV,
    ...(anodeMarginMv !== undefined && cell.anode ? { anodeMarginMv } : {}),
  };
}

/** The cell's window holds the ceiling, and a margin finds an anode to guard. */
function cellFor({ strategy, cell }: SessionStudyInput): SessionStudyInput['cell'] {
  const ceiling = strategy.cellVoltageCeilingV;
  const needsAnode = strategy.anodeMarginMv !== undefined && !cell.anode;
  return {
    ...cell,
    vMaxV: Math.max(cell.vMaxV, ceiling),
    vMinV: cell.vMinV < ceiling ? cell.vMinV : 0,
    ...(needsAnode ? { anode: { potential: { electrodes: 'nmc811-graphite' as const }, share: 0.5 } } : {}),
  };
}

/** A structure for the surface node to warm, where the cooling counts none of the cells' mass to it. */
const STRUCTURE_J_PER_K = 30_000;

function packFor({ thermal, pack }: SessionStudyInput): SessionStudyInput['pack'] {
  const needsStructure = thermal.surfaceShare === 0 && (pack.structureJPerK ?? 0) === 0;
  return needsStructure ? { ...pack, structureJPerK: STRUCTURE_J_PER_K } : pack;
}
