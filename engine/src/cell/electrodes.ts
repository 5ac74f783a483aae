const { exp, tanh } = Math;

/** Electrode pairs with built-in potentials. */
export const electrodePairs = ['nmc811-graphite', 'lfp-graphite'] as const;
export type ElectrodePair = (typeof electrodePairs)[number];

/** Potential of a cell and of its negative electrode [V], over z (fraction of full capacity). */
export type Potentials = { ocv: (z: number) => number; anode: (z: number) => number };

// Chen et al. 2020, J. Electrochem. Soc. 167 080534 (coefficients from memory). x: lithiation of the electrode.
const nmc811Cathode = (x: number) =>
  -0.809 * x +
  4.4875 -
  0.0428 * tanh(18.5138 * (x - 0.5542)) -
  17.7326 * tanh(15.789 * (x - 0.3117)) +
  17.5842 * tanh(15.9308 * (x - 0.312));
const graphiteSiliconAnode = (x: number) =>
  1.9793 * exp(-39.3631 * x) +
  0.2482 -
  0.0909 * tanh(29.8538 * (x - 0.1234)) -
  0.04478 * tanh(14.9159 * (x - 0.2769)) -
  0.0205 * tanh(30.4444 * (x - 0.6103));

// Afshar et al. 2017 and Safari & Delacourt 2011 (from memory); window of Prada et al. 2012 (from memory).
const lfpCathode = (y: number) => 3.4077 - 0.020269 * y + 0.5 * exp(-150 * y) - 0.9 * exp(-30 * (1 - y));
const graphiteAnode = (x: number) =>
  0.6379 +
  0.5416 * exp(-305.5309 * x) +
  0.044 * tanh(-(x - 0.1958) / 0.1088) -
  0.1978 * tanh((x - 1.0571) / 0.0854) -
  0.6875 * tanh((x + 0.0117) / 0.0529) -
  0.0175 * tanh((x - 0.5692) / 0.0875);

const nmc811Anode = (z: number) => graphiteSiliconAnode(0.0279 + (0.9014 - 0.0279) * z);
const lfpAnode = (z: number) => graphiteAnode(0.0132 + (0.811 - 0.0132) * z);

/** Formulas of the built-in pairs; they go on as formulas outside 0 ≤ z ≤ 1. */
export const potentialsOf: Record<ElectrodePair, Potentials> = {
  'nmc811-graphite': {
    ocv: (z) => nmc811Cathode(0.9084 + (0.2661 - 0.9084) * z) - nmc811Anode(z),
    anode: nmc811Anode,
  },
  'lfp-graphite': {
    ocv: (z) => lfpCathode(0.74 + (0.035 - 0.74) * z) - lfpAnode(z),
    anode: lfpAnode,
  },
};
