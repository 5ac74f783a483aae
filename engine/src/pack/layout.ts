/**
 * Where each state stands in the vector that is integrated:
 * z; T_j core [°C]; S_j surface [°C] (two nodes only); v_kj [V]; loop [°C]; inlet [°C]; then the ledgers' integrals [J].
 */
export type Layout = {
  segments: number;
  pairs: number;
  twoNode: boolean;
  /** First index of cores, surfaces (that of the cores where there is one node), RC voltages. */
  core: number;
  surface: number;
  rc: number;
  loop: number;
  inlet: number;
  /** First index of the integrals, which is the number of physical states. */
  integrals: number;
  /** Length of the whole vector. */
  size: number;
};

/** The ledgers' integrals, in order [J]. */
export const integralNames = [
  'station',
  'battery',
  'inlet',
  'boostLoss',
  'auxiliaries',
  'busbar',
  'ohmic',
  'polarisation',
  'reversible',
  'rcPairs',
  'chiller',
  'radiator',
  'ambient',
  'heater',
] as const;

export type IntegralName = (typeof integralNames)[number];

/** Place of each integral behind `Layout.integrals`. */
export const INTEGRAL = Object.fromEntries(integralNames.map((name, i) => [name, i])) as Record<IntegralName, number>;

export function layoutOf(segments: number, pairs: number, twoNode: boolean): Layout {
  const core = 1;
  const surface = twoNode ? core + segments : core;
  const rc = surface + segments;
  const loop = rc + pairs * segments;
  const integrals = loop + 2;
  return {
    segments,
    pairs,
    twoNode,
    core,
    surface,
    rc,
    loop,
    inlet: loop + 1,
    integrals,
    size: integrals + integralNames.length,
  };
}
