import { limitCodes, type LimitCode, type RunEvent } from '@voltiplano/engine';

/** What held the current, from one minute of a session to another. */
export type LimitSpan = { limit: LimitCode; fromMin: number; toMin: number };

const EVENT = 'limit:';

/**
 * Reads which limit held when from the events of a session. Spans meet without a gap.
 *
 * @param endMin    end of the session [min]
 * @param leastMin  shorter spans pass into the one before them, the first into the one behind it [min]
 */
export function limitSpans(events: readonly RunEvent[], endMin: number, leastMin: number): LimitSpan[] {
  const changes = events.flatMap(({ tS, event }) => {
    const limit = limitCodes.find((code) => event === EVENT + code);
    return limit ? [{ limit, fromMin: tS / 60 }] : [];
  });
  const spans: LimitSpan[] = [];
  for (const [i, { limit, fromMin }] of changes.entries()) {
    const toMin = changes[i + 1]?.fromMin ?? endMin;
    const last = spans.at(-1);
    if (!last) spans.push({ limit, fromMin, toMin });
    else if (last.limit === limit || toMin - fromMin < leastMin) last.toMin = toMin;
    // The first span was too short until now: what comes behind it takes its place.
    else if (spans.length === 1 && last.toMin - last.fromMin < leastMin) spans[0] = { ...last, limit, toMin };
    else spans.push({ limit, fromMin, toMin });
  }
  return spans;
}
