import { describe, expect, it } from 'vitest';
import type { StripColumns } from './strip-columns.ts';
import { taperLine } from './taper-line.ts';

// A run from 0 to 100 % in 100 min at a steady pace, 400 V throughout.
const columns = {
  min: [0, 50, 100],
  socPercent: [0, 50, 100],
  packV: [400, 400, 400],
} as unknown as StripColumns;
const steps = [
  { fromSoc: 0, value: 200 },
  { fromSoc: 0.5, value: 100 },
];

describe('taperLine', () => {
  it('steps at each ledge and gives a handle where the run passes it', () => {
    const drawn = taperLine({ taper: { shape: 'ledges', unit: 'A', steps }, packAh: 200 }, columns, 'time')!;
    expect(drawn.line).toEqual([
      { at: 0, currentA: 200 },
      { at: 50, currentA: 200 },
      { at: 50, currentA: 100 },
      { at: 100, currentA: 100 },
    ]);
    expect(drawn.handles).toEqual([{ at: 50, currentA: 100 }]);
  });
  it('reads C as multiples of the capacity and kW at the pack voltage', () => {
    const inC = taperLine(
      { taper: { shape: 'ledges', unit: 'C', steps: [{ fromSoc: 0, value: 1.5 }] }, packAh: 200 },
      columns,
      'soc',
    )!;
    expect(inC.line[0]!.currentA).toBe(300);
    const inKw = taperLine(
      { taper: { shape: 'ledges', unit: 'kW', steps: [{ fromSoc: 0, value: 80 }] }, packAh: 200 },
      columns,
      'soc',
    )!;
    expect(inKw.line[0]!.currentA).toBe(200);
  });
  it('slopes between points and holds the last', () => {
    const points = [
      { soc: 0, value: 200 },
      { soc: 0.5, value: 100 },
    ];
    const drawn = taperLine({ taper: { shape: 'slope', unit: 'A', points }, packAh: 200 }, columns, 'soc')!;
    expect(drawn.line).toEqual([
      { at: 0, currentA: 200 },
      { at: 50, currentA: 100 },
      { at: 100, currentA: 100 },
    ]);
  });
  it('has no line for a taper that does not stand on soc', () => {
    expect(taperLine({ taper: { shape: 'none' }, packAh: 200 }, columns, 'time')).toBeNull();
  });
});
