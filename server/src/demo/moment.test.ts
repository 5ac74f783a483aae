import { describe, expect, it } from 'vitest';
import { momentBefore } from './moment.ts';

/** Local time, as the server's clock shows it. */
function at(text: string): number {
  return new Date(text).getTime();
}

describe('momentBefore', () => {
  it('counts working days back: two before a Monday is the Thursday', () => {
    expect(momentBefore(at('2026-03-02T08:00'), '1d 09:05')).toBe(at('2026-02-27T09:05'));
    expect(momentBefore(at('2026-03-02T08:00'), '2d 17:40')).toBe(at('2026-02-26T17:40'));
  });

  it.each(['2026-02-28T11:00', '2026-03-01T11:00', '2026-03-02T00:01'])('takes Friday for the day before %s', (now) => {
    expect(momentBefore(at(now), '1d 16:00')).toBe(at('2026-02-27T16:00'));
  });

  it('passes weeks: ten working days are two of them', () => {
    expect(momentBefore(at('2026-03-04T08:00'), '10d 12:00')).toBe(at('2026-02-18T12:00'));
  });

  it('counts minutes back from now', () => {
    expect(momentBefore(at('2026-03-02T08:00'), '95m')).toBe(at('2026-03-02T06:25'));
  });

  it('refuses today at a time of day, which may not have come yet', () => {
    expect(() => momentBefore(at('2026-03-02T08:00'), '0d 09:00')).toThrow('"0d 09:00" is not a moment before today.');
  });
});
