import { expect, test } from 'vitest';
import { PiecewiseCubic } from '../src/table/piecewise-cubic.ts';
import { bareStudy, readJson, run } from './studies.ts';

type Case = { name: string; x: number[]; y: number[]; at: number[]; value: number[]; area: number[] };

// Values and integrals by SciPy 1.10.1, from pchip.py. Both sides round in double precision, values up to 5: 1e-13.
const cases = readJson('./pchip.expected.json') as Case[];

test.each(cases)('PCHIP as SciPy has it: $name', ({ x, y, at, value, area }) => {
  const curve = PiecewiseCubic.pchip({ x, y });
  at.forEach((point, i) => {
    expect(Math.abs(curve.value(point) - value[i])).toBeLessThan(1e-13);
    expect(Math.abs(curve.integral(x[0], point) - area[i])).toBeLessThan(1e-13);
  });
  expect(curve.value(x[0] - 0.4)).toBe(y[0]);
  expect(curve.value(x.at(-1)! + 0.4)).toBe(y.at(-1));
});

test('a session’s ocv table is that PCHIP: at plug-in no current flows and the cells stand at it', () => {
  const { x, y, at, value } = cases.find(({ name }) => name === 'monotone with a knee')!;
  at.slice(0, -1).forEach((startSoc, i) => {
    const study = bareStudy((s) => {
      s.cell.ocv = { x, y };
      s.session.startSoc = startSoc;
      s.session.maxMin = 1e-6;
    });
    expect(run(study).result.series.highestCellV[0]).toBeCloseTo(value[i], 12);
  });
});
