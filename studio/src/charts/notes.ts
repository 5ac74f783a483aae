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

export type Box = { left: number; right: number; top: number; bottom: number };

const overlap = (a: Box, b: Box) => a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;

/**
 * Places a note's words inside its strip: as wished where they fit, else on the other side or below, clear of words
 * that already stand there. Null where no place has room.
 *
 * @param taken  boxes of other words
 */
export function placeNote(
  point: readonly [x: number, y: number],
  note: Pick<StripNote, 'dx' | 'dy' | 'text'>,
  area: Box,
  taken: readonly Box[] = [],
): PlacedNote | null {
  const [x, y] = point;
  if (x < area.left || x > area.right) return null;
  const width = textWidth(note.text);
  const wishes = [note.dx, -note.dx].flatMap((dx) => [note.dy, -note.dy].map((dy) => ({ dx, dy })));
  for (const { dx, dy } of wishes) {
    const way = Math.sign(dx);
    const elbowX = x + dx;
    const elbowY = y + dy;
    const start = elbowX + 12 * way;
    const words = {
      left: Math.min(start, start + way * width),
      right: Math.max(start, start + way * width),
      top: elbowY - 8,
      bottom: elbowY + 6,
    };
    const inside =
      words.left >= area.left && words.right <= area.right && words.top >= area.top && words.bottom <= area.bottom;
    if (inside && !taken.some((box) => overlap(box, words))) return { elbowX, elbowY, toLeft: way < 0 };
  }
  return null;
}
