import { limitSide, type LimitCode } from '@voltiplano/engine';

export type LimitSide = 'station' | 'vehicle' | 'cell';

/** Sides in the order of the chain, which is also their depth in the limit band. */
export const limitSides: readonly LimitSide[] = ['station', 'vehicle', 'cell'];

const names: Record<LimitCode, readonly [label: string, short: string]> = {
  'station-current': ['station current', 'st A'],
  'station-power': ['station power', 'st kW'],
  'station-voltage': ['station voltage', 'st V'],
  'station-ramp': ['ramp', 'ramp'],
  inlet: ['inlet', 'inlet'],
  'pack-current': ['pack current', 'pack A'],
  taper: ['taper', 'taper'],
  'cell-voltage': ['voltage ceiling', 'ceiling'],
  anode: ['anode margin', 'anode'],
  hot: ['hot limit', 'hot'],
  cold: ['cold limit', 'cold'],
};

/** The eleven limits from the station to the cell, as every list shows them. */
export const limitsInOrder = Object.keys(names) as LimitCode[];

export const limitLabel = (code: LimitCode): string => names[code][0];

/** Shorter name for narrow beds. */
export const limitShort = (code: LimitCode): string => names[code][1];

/** Thirds of the band that a bed reaches down: the deeper, the nearer to the cell. */
export const limitDepth = (code: LimitCode): 1 | 2 | 3 => depths[limitSide[code]];

const depths = { station: 1, vehicle: 2, cell: 3 } as const;

export const limitTint = (code: LimitCode): string => `var(--l-${code})`;
export const limitOverprint = (code: LimitCode): string => `var(--o-${limitSide[code]})`;
export const limitBedEdge = (code: LimitCode): string => `var(--bed-edge-${limitSide[code]})`;

/** One tile of a hatch [px]: a stroked path, filled points, or open rings. */
export type HatchTile = {
  width: number;
  height: number;
  path?: string;
  circles?: readonly (readonly [x: number, y: number])[];
  radius?: number;
  filled?: boolean;
};

/** Ruled lines stand for the station, bedding marks for the vehicle, crossing and closed marks for the cell. */
export const hatchTiles: Record<LimitCode, HatchTile> = {
  'station-current': { width: 6, height: 5, path: 'M0 2.5H6' },
  'station-power': { width: 5, height: 6, path: 'M2.5 0V6' },
  'station-voltage': { width: 7, height: 7, path: 'M-1 8L8 -1M-1 1L1 -1M6 8L8 6' },
  'station-ramp': { width: 10, height: 10, path: 'M-1 -1L11 11M-1 5.2L5.2 11M5.2 -1L11 5.2' },
  inlet: {
    width: 7,
    height: 7,
    circles: [
      [1.75, 1.75],
      [5.25, 5.25],
    ],
    radius: 1.05,
    filled: true,
  },
  'pack-current': { width: 12, height: 8, path: 'M0 .5H12M0 4.5H12M3 .5V4.5M9 4.5V8.5' },
  taper: { width: 13, height: 9, path: 'M1 2.5H4V4.5H7M7.5 7H10.5V9M10.5 0H13.5M-3 0H.5' },
  'cell-voltage': { width: 7, height: 7, path: 'M-1 8L8 -1M-1 -1L8 8' },
  anode: {
    width: 9,
    height: 9,
    circles: [
      [2.25, 2.25],
      [6.75, 6.75],
    ],
    radius: 1.7,
  },
  hot: { width: 7, height: 6, path: 'M0 5L3.5 1.5L7 5' },
  cold: { width: 9, height: 9, path: 'M2.25 .4V4.1M.4 2.25H4.1M6.75 4.9V8.6M4.9 6.75H8.6' },
};
