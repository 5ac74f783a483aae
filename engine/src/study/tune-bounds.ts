import type { Quantity } from './quantity.ts';
import { PRACTICE, quantity as q } from './quantity.ts';

/** What a tuned taper can be held to at every moment of a run, and what a person needs to know to type it. */
export const tuneBounds = {
  hottestCoreMaxC: q('Hottest core, most', '°C', -40, 150, 'No core gets hotter.', [45, 60], PRACTICE),
  hottestSurfaceMaxC: q('Hottest surface, most', '°C', -40, 150, 'No surface gets hotter.', [40, 55], PRACTICE),
  lowestAnodeMinMv: q(
    'Lowest anode potential, least',
    'mV',
    -1000,
    1000,
    'No anode comes nearer to plating, against Li/Li⁺.',
    [0, 40],
    PRACTICE,
  ),
  highestCellMaxV: q('Highest cell voltage, most', 'V', 0.5, 10, 'No cell rises above it.', [4.1, 4.2], PRACTICE),
  inletMaxC: q('Inlet, most', '°C', -40, 200, 'The inlet gets no hotter.', [70, 90], PRACTICE),
  stationPowerMaxKw: q(
    'Station power, most',
    'kW',
    0,
    100000,
    'The station never gives more.',
    [50, 400],
    PRACTICE,
    'above',
  ),
  stationCurrentMaxA: q(
    'Station current, most',
    'A',
    0,
    100000,
    'The station never gives more.',
    [125, 600],
    PRACTICE,
    'above',
  ),
} as const satisfies Record<string, Quantity>;

export type BoundName = keyof typeof tuneBounds;

/** Every bound, in the order in which results list them. */
export const boundNames = Object.keys(tuneBounds) as BoundName[];
