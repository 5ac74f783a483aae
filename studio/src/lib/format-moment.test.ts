import { expect, test } from 'vitest';
import { formatMoment } from './format-moment.ts';

const now = new Date(2026, 10, 12, 15, 40).getTime();
const at = (year: number, month: number, day: number, hour: number, minute: number) =>
  formatMoment(new Date(year, month - 1, day, hour, minute).toISOString(), now);

test('formatMoment says just now, the clock, yesterday, the day, and the year of another year', () => {
  expect(at(2026, 11, 12, 15, 40)).toBe('just now');
  expect(at(2026, 11, 12, 7, 5)).toBe('07:05');
  expect(at(2026, 11, 11, 23, 59)).toBe('yesterday 23:59');
  expect(at(2026, 11, 2, 9, 30)).toMatch(/2.*09:30$/);
  expect(at(2025, 11, 2, 9, 30)).toMatch(/2025/);
});
