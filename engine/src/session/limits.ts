/** What can limit the current, in the order in which equal limits are named (engine/MODEL.md, section 6). */
export const limitCodes = [
  'station-current',
  'station-power',
  'station-voltage',
  'station-ramp',
  'inlet',
  'pack-current',
  'cell-voltage',
  'taper',
  'anode',
  'hot',
  'cold',
] as const;

export type LimitCode = (typeof limitCodes)[number];

/** Which side of the chain a limit stands on: the station, the vehicle, or the cell. */
export const limitSide: Record<LimitCode, 'station' | 'vehicle' | 'cell'> = {
  'station-current': 'station',
  'station-power': 'station',
  'station-voltage': 'station',
  'station-ramp': 'station',
  inlet: 'vehicle',
  'pack-current': 'vehicle',
  'cell-voltage': 'cell',
  taper: 'vehicle',
  anode: 'cell',
  hot: 'cell',
  cold: 'cell',
};
