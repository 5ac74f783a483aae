import { expect, test } from 'vitest';
import { momentText } from './moment-text.ts';

const now = new Date(2026, 5, 10, 14, 30).getTime();
const at = (...parts: [number, number, number, number, number]) => momentText(new Date(...parts).toISOString(), now);

test('momentText says how long ago, then the day, then the date', () => {
  expect(at(2026, 5, 10, 14, 30)).toBe('just now');
  expect(at(2026, 5, 10, 14, 18)).toBe('12 min ago');
  expect(at(2026, 5, 10, 11, 40)).toBe('today 11:40');
  expect(at(2026, 5, 9, 23, 59)).toBe('yesterday 23:59');
  expect(at(2026, 5, 3, 9, 5)).toMatch(/^(3 June|June 3)$/);
  expect(at(2025, 5, 3, 9, 5)).toMatch(/2025/);
});

test('momentText takes a clock that runs ahead for now', () => {
  expect(at(2026, 5, 10, 14, 31)).toBe('just now');
});
