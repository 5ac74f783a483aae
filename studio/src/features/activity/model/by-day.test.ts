import { expect, test } from 'vitest';
import { byDay } from './by-day.ts';

test('byDay parts deeds at the reader’s midnight and keeps their order', () => {
  const now = new Date(2026, 5, 4, 12).getTime();
  const at = (day: number, hour: number) => ({ at: new Date(2026, 5, day, hour).toISOString() });
  const deeds = [at(4, 11), at(4, 0), at(3, 23), at(1, 9)];
  const days = byDay(deeds, now);
  expect(days.map((one) => one.deeds.length)).toEqual([2, 1, 1]);
  expect(days.slice(0, 2).map(({ day }) => day)).toEqual(['today', 'yesterday']);
  expect(days.flatMap((one) => one.deeds)).toEqual(deeds);
});
