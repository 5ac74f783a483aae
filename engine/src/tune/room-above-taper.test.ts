import { expect, test } from 'vitest';
import { limitCodes, roomAboveTaper, simulateSession } from '../index.ts';
import { exampleStudies } from '../../validation/studies.ts';

const cases = exampleStudies().map(({ name, study }) => [name, study] as const);

test.each(cases)('roomAboveTaper of %s: row for row, the smallest allowance is what flowed', (_, study) => {
  const { result, room } = roomAboveTaper(study, { everyS: 30 });
  const { series } = result;
  expect(result).toStrictEqual(simulateSession(study, { everyS: 30 }).result);
  expect(room.tS).toEqual(series.tS);
  series.limit.forEach((limit, row) => {
    const allowed = limitCodes.map((code) => room.allowedA[code][row] ?? Infinity);
    const flowed = series.packCurrentA[row];
    expect(Math.abs(room.allowedA[limit][row]! - flowed)).toBeLessThan(1e-6 * (1 + Math.abs(flowed)));
    expect(Math.min(...allowed)).toBeGreaterThan(flowed - 1e-4 * (1 + Math.abs(flowed)));
    const others = limitCodes.map((code, i) => (code === 'taper' ? Infinity : allowed[i]));
    expect(room.withoutTaperA[row]).toBe(Math.min(...others));
    expect(room.allowedA[room.withoutTaper[row]][row]).toBe(room.withoutTaperA[row]);
  });
});

test('where the taper held, raising it would have helped; where another limit held, not', () => {
  const [, study] = cases.find(([name]) => name === 'vicuna-warm-arrival')!;
  const { result, room } = roomAboveTaper(study);
  const rows = result.series.limit.map((limit, row) => ({ limit, room: room.withoutTaperA[row], row }));
  const held = rows.filter(({ limit }) => limit === 'taper');
  expect(held.length).toBeGreaterThan(50);
  const more = held.filter(({ room, row }) => room > result.series.packCurrentA[row] + 1);
  expect(more.length).toBeGreaterThan(held.length * 0.9);
});
