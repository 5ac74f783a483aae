import { describe, expect, test } from 'vitest';
import { formatAgo, formatDay, formatWholeMoment } from './moments.ts';

const now = new Date(2026, 5, 4, 12, 30, 40);
const at = (...parts: [number, number, number, number, number]) => new Date(...parts).toISOString();

describe('formatAgo', () => {
  test('is as exact as it is worth', () => {
    expect(formatAgo(at(2026, 5, 4, 12, 30), now)).toBe('just now');
    expect(formatAgo(at(2026, 5, 4, 12, 18), now)).toBe('12 min ago');
    expect(formatAgo(at(2026, 5, 4, 9, 5), now)).toBe('today 09:05');
    expect(formatAgo(at(2026, 5, 3, 23, 59), now)).toBe('yesterday');
  });

  test('counts minutes over midnight', () => {
    const pastMidnight = new Date(2026, 5, 4, 0, 10);
    expect(formatAgo(at(2026, 5, 3, 23, 50), pastMidnight)).toBe('20 min ago');
    expect(formatAgo(at(2026, 5, 3, 23, 0), pastMidnight)).toBe('yesterday');
  });

  test('a server clock that runs ahead reads as just now', () => {
    expect(formatAgo(at(2026, 5, 4, 12, 33), now)).toBe('just now');
  });
});

describe('formatDay', () => {
  test('names the year only where it is another', () => {
    expect(formatDay(at(2026, 4, 27, 8, 0), now)).not.toContain('2026');
    expect(formatDay(at(2025, 4, 27, 8, 0), now)).toContain('2025');
  });

  test('counts calendar days, not spans of 24 hours', () => {
    expect(formatDay(at(2026, 5, 4, 0, 1), now)).toBe('today');
    expect(formatDay(at(2026, 5, 3, 0, 1), now)).toBe('yesterday');
    expect(formatDay(at(2026, 5, 2, 23, 59), now)).not.toBe('yesterday');
  });
});

test('formatWholeMoment says the day with its year, and the clock to the second', () => {
  const whole = formatWholeMoment(new Date(2026, 5, 4, 9, 5, 7).toISOString());
  expect(whole).toContain('2026');
  expect(whole).toContain('09:05:07');
});
