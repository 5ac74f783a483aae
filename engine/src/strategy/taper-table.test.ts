import { describe, expect, test } from 'vitest';
import { TaperTable } from './taper-table.ts';

describe('TaperTable, none', () => {
  test('limits nothing and has no edges', () => {
    const table = new TaperTable({ shape: 'none' });
    expect(table.value(0.5, 20)).toBe(Infinity);
    expect([table.startSoc, table.endSoc, table.endV]).toEqual([-Infinity, Infinity, Infinity]);
  });
});

describe('TaperTable, slope', () => {
  const table = new TaperTable({
    shape: 'slope',
    unit: 'C',
    points: [
      { soc: 0.2, value: 3 },
      { soc: 0.6, value: 1 },
      { soc: 1, value: 0.5 },
    ],
  });

  test.each([
    [0, 3],
    [0.2, 3],
    [0.3, 2.5],
    [0.6, 1],
    [0.8, 0.75],
    [1, 0.5],
  ])('at soc %s it says %s C, straight between points and held before the first', (soc, value) => {
    expect(table.value(soc, -5)).toBeCloseTo(value, 12);
  });

  test('a single point holds everywhere', () => {
    const flat = new TaperTable({ shape: 'slope', unit: 'A', points: [{ soc: 0.5, value: 120 }] });
    expect([flat.value(0, 0), flat.value(0.5, 0), flat.value(1, 0)]).toEqual([120, 120, 120]);
  });
});

describe('TaperTable, ledges', () => {
  const make = () =>
    new TaperTable({
      shape: 'ledges',
      unit: 'A',
      steps: [
        { fromSoc: 0.1, value: 300 },
        { fromSoc: 0.4, value: 200 },
        { fromSoc: 0.7, value: 100 },
      ],
    });

  test.each([
    [0, 0, 300],
    [0.1, 0, 300],
    [0.3999999, 0, 300],
    [0.4, 1, 200],
    [0.69, 1, 200],
    [0.9, 2, 100],
  ])(
    'startAt(%s) stands on step %s with %s A: the last whose edge is reached, the first below all',
    (soc, step, value) => {
      const table = make();
      table.startAt(soc);
      expect(table.step).toBe(step);
      expect(table.value(soc, 20)).toBe(value);
    },
  );

  test('its edges bound the step in force; the first has none below, the last none above', () => {
    const table = make();
    expect([table.startSoc, table.endSoc]).toEqual([-Infinity, 0.4]);
    table.step = 1;
    expect([table.startSoc, table.endSoc]).toEqual([0.4, 0.7]);
    table.step = 2;
    expect([table.startSoc, table.endSoc, table.endV]).toEqual([0.7, Infinity, Infinity]);
  });

  test('its value is the step’s, whatever soc is asked: the run moves the step', () => {
    expect(make().value(0.95, 20)).toBe(300);
  });
});

describe('TaperTable, voltage-ledges', () => {
  test('starts on the first step at any soc, and ends each step at its voltage', () => {
    const table = new TaperTable({
      shape: 'voltage-ledges',
      unit: 'kW',
      steps: [{ untilCellV: 4.1, value: 150 }, { untilCellV: 4.05, value: 80 }, { value: 40 }],
    });
    table.startAt(0.95);
    expect([table.step, table.endV, table.value(0.95, 20)]).toEqual([0, 4.1, 150]);
    expect([table.startSoc, table.endSoc]).toEqual([-Infinity, Infinity]);
    table.step = 1;
    expect([table.endV, table.value(0.1, 20)]).toEqual([4.05, 80]);
    table.step = 2;
    expect([table.endV, table.value(0.1, 20)]).toEqual([Infinity, 40]);
  });
});

describe('TaperTable, map', () => {
  const table = new TaperTable({
    shape: 'map',
    unit: 'C',
    soc: [0, 0.5, 1],
    tempC: [0, 10, 40],
    values: [
      [1, 2, 4],
      [0.5, 1, 2],
      [0, 0.2, 0.4],
    ],
  });

  test.each([
    [0, 0, 1],
    [0.5, 10, 1],
    [0.25, 5, (1 + 2 + 0.5 + 1) / 4],
    [0.75, 25, (1 + 2 + 0.2 + 0.4) / 4],
    [0.1, 16, 0.8 * (0.8 * 2 + 0.2 * 1) + 0.2 * (0.8 * 4 + 0.2 * 2)],
  ])('at soc %s and %s °C it says %s, bilinear in both', (soc, temp, value) => {
    expect(table.value(soc, temp)).toBeCloseTo(value, 12);
  });

  test('holds its rim outside in soc and in temperature', () => {
    expect(table.value(0.25, -30)).toBeCloseTo(0.75, 12);
    expect(table.value(0.25, 70)).toBeCloseTo(3, 12);
    expect(table.value(2, 10)).toBeCloseTo(0.2, 12);
  });
});
