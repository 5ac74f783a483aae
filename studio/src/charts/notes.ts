import type { SessionResult } from '@voltiplano/engine';
import { formatNumber, formatQuantity, formatSoc } from '../lib/format.ts';
import type { Units } from '../lib/units.ts';
import { textWidth } from './label-fit.ts';
import type { StripKey } from './strip-specs.ts';

/** Words on a leader line, tied to a point of a strip. */
export type StripNote = {
  strip: StripKey;
  atMin: number;
  /** In the strip's unit. */
  value: number;
  text: string;
  /** Way from the point to the words [px]. */
  dx: number;
  dy: number;
  wideOnly?: boolean;
};

/** What every session is noted with: its peak, its hottest core, and where shared power cuts in. */
export function sessionNotes(result: SessionResult, units: Units): StripNote[] {
  const { metrics, series } = result;
  const notes: StripNote[] = [
    {
      strip: 'power',
      atMin: metrics.peakStationPowerMin,
      value: metrics.peakStationPowerKw,
      text: `peak ${formatQuantity('kW', metrics.peakStationPowerKw)} kW at ${formatSoc(metrics.peakStationPowerSoc)} %`,
      dx: 34,
      dy: -10,
    },
    {
      strip: 'temperatures',
      atMin: metrics.hottestCoreMin,
      value: units.temperature(metrics.hottestCoreC),
      text: `hottest core ${formatQuantity('temperature', units.temperature(metrics.hottestCoreC))} ${units.temperatureUnit}`,
      dx: 22,
      dy: -16,
    },
  ];
  for (const { tS, event } of result.events) {
    const kw = event.startsWith('power:') ? Number(event.slice(6)) : Number.NaN;
    const row = series.tS.findIndex((t) => t > tS);
    if (!(kw > 0) || tS <= 0 || row < 0 || series.limit[row] !== 'station-power') continue;
    const atMin = (tS + 120) / 60;
    const text = `power shared, ${formatNumber(kw, 0)} kW`;
    notes.push({ strip: 'power', atMin, value: kw, text, dx: 16, dy: 34, wideOnly: true });
  }
  return notes;
}

/** A note's elbow and words on the sheet [px]. */
export type PlacedNote = { elbowX: number; elbowY: number; toLeft: boolean };

/**
 * Places a note's words inside its strip: to the other side where the right end is too near, below where the top is.
 * Null where neither side has room.
 */
export function placeNote(
  point: readonly [x: number, y: number],
  note: Pick<StripNote, 'dx' | 'dy' | 'text'>,
  area: { left: number; right: number; top: number; bottom: number },
): PlacedNote | null {
  const [x, y] = point;
  if (x < area.left || x > area.right) return null;
  const reach = Math.abs(note.dx) + 12 + textWidth(note.text);
  const wantsLeft = note.dx < 0;
  const fitsRight = x + reach <= area.right;
  const fitsLeft = x - reach >= area.left;
  if (!fitsRight && !fitsLeft) return null;
  const toLeft = wantsLeft ? fitsLeft : !fitsRight;
  const dy = y + note.dy < area.top + 8 || y + note.dy > area.bottom - 6 ? -note.dy : note.dy;
  return { elbowX: x + (toLeft ? -1 : 1) * Math.abs(note.dx), elbowY: Math.max(y + dy, area.top + 8), toLeft };
}
