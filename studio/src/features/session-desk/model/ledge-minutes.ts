import type { SessionResult, SessionStudyInput } from '@voltiplano/engine';

type Taper = SessionStudyInput['strategy']['taper'];

/**
 * Minutes each row of a taper held the current, in the order of its rows.
 * A point of a slope answers for the line from it to the next; a row of a map for the socs from it to the next.
 */
export function ledgeMinutes({ series, events }: SessionResult, taper: Taper): number[] {
  const rowAt = rowFinder(taper, events);
  if (!rowAt) return [];
  const held = new Array<number>(rowAt.rows).fill(0);
  for (let i = 1; i < series.tS.length; i++) {
    const dt = series.tS[i]! - series.tS[i - 1]!;
    // A row's limit holds from it to the next; both sides of a change stand at the same time.
    if (dt <= 0 || series.limit[i - 1] !== 'taper') continue;
    const midSoc = (series.soc[i]! + series.soc[i - 1]!) / 2;
    held[rowAt.find(midSoc, series.tS[i - 1]!)]! += dt / 60;
  }
  return held;
}

type RowFinder = { rows: number; find: (soc: number, tS: number) => number };

function rowFinder(taper: Taper, events: SessionResult['events']): RowFinder | undefined {
  switch (taper.shape) {
    case 'none':
      return undefined;
    case 'voltage-ledges':
      return { rows: taper.steps.length, find: (_soc, tS) => ledgeAt(events, tS) };
    case 'ledges':
      return bySoc(taper.steps.map((step) => step.fromSoc));
    case 'slope':
      return bySoc(taper.points.map((point) => point.soc));
    case 'map':
      return bySoc(taper.soc);
  }
}

/** Below the first row its value holds, so it answers for what lies below it too. */
function bySoc(socs: number[]): RowFinder {
  return {
    rows: socs.length,
    find: (soc) =>
      Math.max(
        0,
        socs.findLastIndex((from) => soc >= from),
      ),
  };
}

function ledgeAt(events: SessionResult['events'], tS: number): number {
  const last = events.findLast((event) => event.event.startsWith('ledge:') && event.tS <= tS);
  // Events count ledges from 1.
  return last ? Number(last.event.slice('ledge:'.length)) - 1 : 0;
}
