import { decimals } from '../lib/format.ts';
import type { Units } from '../lib/units.ts';
import type { LineColumn, StripColumns } from './strip-columns.ts';
import { rangeAround, rangeFromZero } from './ticks.ts';

export const stripKeys = ['power', 'current', 'voltage', 'temperatures', 'anode'] as const;
export type StripKey = (typeof stripKeys)[number];

export type LineSpec = {
  column: LineColumn;
  label: string;
  /** Token of its ink. */
  ink: string;
  widthPx: number;
  /** Dash lengths [px]; empty for a solid line. */
  dash: readonly number[];
  /** Drawn for the baseline too. */
  onBaseline?: boolean;
  /** Left out where there is no room for more than one line. */
  wideOnly?: boolean;
};

export type StripSpec = {
  key: StripKey;
  name: string;
  unit: string;
  lines: readonly LineSpec[];
  /** Read in the margin without a line of its own. */
  alsoRead?: { column: LineColumn; label: string; digits: number };
  digits: number;
  /** Heights [px] on a wide sheet and on a phone. */
  heights: readonly [wide: number, phone: number];
  tickCount: number;
  range: (runs: readonly StripColumns[], bounds: ShownBounds) => [number, number];
};

/** Bounds of the strategy in shown units. */
export type ShownBounds = { ceilingV?: number; marginMv?: number; hotFrom?: number; hotTo?: number };

/** What each strip shows, top to bottom. */
export function stripSpecs(units: Units): readonly StripSpec[] {
  return [power, current, voltage, { ...temperatures, unit: units.temperatureUnit }, anode];
}

const extremes = (columns: readonly (readonly (number | null)[])[]): [number, number] => {
  let least = Number.POSITIVE_INFINITY;
  let greatest = Number.NEGATIVE_INFINITY;
  for (const column of columns) {
    for (const value of column) {
      if (value === null) continue;
      if (value < least) least = value;
      if (value > greatest) greatest = value;
    }
  }
  return [least, greatest];
};

/** The value only three rows in a hundred lie below: the steep first moments may leave a strip at its foot. */
const lowQuantile = (column: readonly number[]): number =>
  [...column].sort((a, b) => a - b)[Math.floor(column.length * 0.03)] ?? 0;

const power: StripSpec = {
  key: 'power',
  name: 'Power',
  unit: 'kW',
  lines: [
    { column: 'stationKw', label: 'station', ink: '--s-power', widthPx: 2.1, dash: [], onBaseline: true },
    { column: 'batteryKw', label: 'battery', ink: '--s-power', widthPx: 1, dash: [1.5, 2.5], wideOnly: true },
  ],
  digits: decimals.kW,
  heights: [206, 170],
  tickCount: 4,
  range: (runs) => rangeFromZero(extremes(runs.map((run) => run.stationKw))[1], 4),
};

const current: StripSpec = {
  key: 'current',
  name: 'Current',
  unit: 'A',
  lines: [{ column: 'packA', label: 'pack', ink: '--s-current', widthPx: 1.8, dash: [], onBaseline: true }],
  digits: decimals.A,
  heights: [92, 84],
  tickCount: 2,
  range: (runs) => rangeFromZero(extremes(runs.map((run) => run.packA))[1], 2),
};

const voltage: StripSpec = {
  key: 'voltage',
  name: 'Voltage',
  unit: 'V per cell',
  lines: [{ column: 'cellV', label: 'highest cell', ink: '--s-voltage', widthPx: 1.8, dash: [], onBaseline: true }],
  alsoRead: { column: 'packV', label: 'pack', digits: decimals.packV },
  digits: decimals.cellV,
  heights: [84, 76],
  tickCount: 2,
  range: (runs, { ceilingV }) => {
    const [, greatest] = extremes(runs.map((run) => run.cellV));
    const least = Math.min(...runs.map((run) => lowQuantile(run.cellV)));
    // Air above the ceiling, so that a curve lying on it is seen to lie on it.
    return rangeAround(least, Math.max(greatest, ceilingV ?? greatest) + 0.06, 3);
  },
};

const temperatures: StripSpec = {
  key: 'temperatures',
  name: 'Temperatures',
  unit: '°C',
  lines: [
    { column: 'core', label: 'core', ink: '--s-core', widthPx: 2.1, dash: [], onBaseline: true },
    { column: 'surface', label: 'surface', ink: '--s-surface', widthPx: 1.6, dash: [] },
    { column: 'inlet', label: 'inlet', ink: '--s-inlet', widthPx: 1.3, dash: [9, 3, 2, 3] },
    { column: 'coolantIn', label: 'coolant in', ink: '--s-coolant', widthPx: 1.4, dash: [5, 3] },
  ],
  digits: decimals.temperature,
  heights: [132, 120],
  tickCount: 4,
  range: ([live, ...others], { hotTo }) => {
    const [least, greatest] = extremes([
      ...(live ? [live.core, live.surface, live.inlet, live.coolantIn] : []),
      ...others.map((run) => run.core),
    ]);
    const span = Math.max(greatest - least, 1);
    // The end of the hot limit belongs in sight once the session comes near it.
    const near = hotTo !== undefined && hotTo < greatest + span / 4 ? hotTo : greatest;
    return rangeAround(least, Math.max(greatest, near) + span * 0.1, 4);
  },
};

const anode: StripSpec = {
  key: 'anode',
  name: 'Anode potential',
  unit: 'mV',
  lines: [{ column: 'anodeMv', label: 'vs Li', ink: '--s-anode', widthPx: 1.8, dash: [], onBaseline: true }],
  digits: decimals.mV,
  heights: [84, 76],
  tickCount: 2,
  range: (runs, { marginMv = 0 }) => {
    const least = extremes(runs.map((run) => run.anodeMv))[0];
    // The room above the margin is what counts; near empty the potential is far up and may leave the strip.
    const from = Math.min(0, Math.floor(Math.min(least, marginMv) / 50) * 50);
    return [from, Math.max(220, Math.ceil((least * 2) / 50) * 50)];
  },
};
