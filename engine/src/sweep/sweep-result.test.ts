import { expect, test } from 'vitest';
import { timedStudy } from '../../bench/studies.ts';
import { limitCodes } from '../session/limits.ts';
import { limitBorders } from './limit-borders.ts';
import { parseSweep } from './parse-sweep.ts';
import { CELL, failedChunk, type SweepChunk } from './run-cells.ts';
import { decodeSweep, encodeSweep, SweepDataError } from './sweep-bytes.ts';
import { sliceValues } from './slice.ts';
import { SweepResult } from './sweep-result.ts';
import type { GridPlan } from './sweep-plan.ts';

const planOf = (hotelW = 300) =>
  parseSweep({
    format: 'voltiplano/study',
    version: 1,
    kind: 'sweep',
    base: { ...timedStudy('b1'), session: { ...timedStudy('b1').session, hotelW } },
    sweep: {
      axes: [
        { path: 'session.ambientC', values: [-10, 0, 10] },
        { path: 'session.startTempC', values: [5, 10, 15, 20] },
      ],
    },
  }) as GridPlan;
const plan = planOf();

/** Numbers that name their column and cell, in place of runs; every third number is not covered. */
function invented(...indices: number[]): SweepChunk {
  const values = plan.columns.flatMap((_, column) =>
    indices.map((index) => ((column + index) % 3 === 0 ? NaN : column + index / 16)),
  );
  const status = new Uint8Array(indices.length).fill(CELL.done);
  return { indices: Uint32Array.from(indices), status, values: Float64Array.from(values), failures: [] };
}
const refused = {
  code: 'REFUSED',
  path: 'station.voltageMinV',
  message: 'Cannot start: the pack rests at 300 V − “too low”.',
};

function filled(...chunks: SweepChunk[]) {
  const result = new SweepResult(plan);
  for (const chunk of chunks) result.merge(chunk);
  return result;
}
const codeOf = (work: () => unknown) => {
  try {
    work();
  } catch (error) {
    return [(error as SweepDataError).code, (error as SweepDataError).message];
  }
  throw new Error('taken without complaint');
};

test('merge puts each number into its column and cell, counts, and lets no cell in twice', () => {
  const result = filled(invented(5, 1), failedChunk(plan, [7], refused), invented(5), failedChunk(plan, [1], refused));
  expect({ done: result.done, failed: result.failed }).toEqual({ done: 2, failed: 1 });
  expect(result.column('minutes10To80')[5]).toBeNaN();
  expect(result.column('minutes10To80')[1]).toBe(1 + 1 / 16);
  expect(result.column('minutes10To80')[7]).toBeNaN();
  expect(result.failures.get(7)).toEqual(refused);
  expect([...result.pending()].sort((a, b) => a - b)).toEqual([0, 2, 3, 4, 6, 8, 9, 10, 11]);
  expect(() => result.column('minutes')).toThrow(RangeError);
});

test('what was encoded comes back to the last bit, failures and all, from any place in a buffer', () => {
  const result = filled(invented(3, 11, 0), failedChunk(plan, [4, 9], refused));
  const bytes = encodeSweep(result, '1.2.3');
  const shifted = new Uint8Array(bytes.length + 3);
  shifted.set(bytes, 3);
  const back = decodeSweep(shifted.subarray(3), plan, '1.2.3');
  expect(back).toEqual(result);
  expect(encodeSweep(back, '1.2.3')).toEqual(bytes);
});

test('the order in which cells came leaves no trace in the bytes', () => {
  const one = filled(invented(0, 1), failedChunk(plan, [2], refused), invented(3));
  const other = filled(invented(3), invented(1), failedChunk(plan, [2], refused), invented(0));
  expect(encodeSweep(other, '1')).toEqual(encodeSweep(one, '1'));
});

test('20 finished cells take 8 bytes a number and little more', () => {
  const bytes = encodeSweep(filled(invented(0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11)), '1');
  expect(bytes.length - 12 * plan.columns.length * 8).toBeLessThan(1200);
});

test('results of another engine, another request, another format or damaged ones are refused, and say so', () => {
  const bytes = encodeSweep(filled(invented(0, 1), failedChunk(plan, [2], refused)), '0.1.0');
  const changed = (at: number, value: number) => Uint8Array.from(bytes, (byte, i) => (i === at ? value : byte));
  expect(codeOf(() => decodeSweep(bytes, plan, '0.2.0'))).toEqual([
    'OTHER_ENGINE',
    'These results were made by engine 0.1.0, but this is 0.2.0: run the sweep again.',
  ]);
  expect(codeOf(() => decodeSweep(bytes, planOf(301), '0.1.0'))[0]).toBe('OTHER_REQUEST');
  expect(codeOf(() => decodeSweep(changed(7, 50), plan, '0.1.0'))[0]).toBe('NOT_SWEEP_DATA');
  expect(codeOf(() => decodeSweep(new Uint8Array(4), plan, '0.1.0'))[0]).toBe('NOT_SWEEP_DATA');
  expect(codeOf(() => decodeSweep(changed(11, 255), plan, '0.1.0'))[0]).toBe('DAMAGED');
  expect(codeOf(() => decodeSweep(changed(16, 0), plan, '0.1.0'))[0]).toBe('DAMAGED');
  expect(codeOf(() => decodeSweep(bytes.subarray(0, bytes.length - 8), plan, '0.1.0'))[0]).toBe('DAMAGED');
});

test('a change to any single byte is refused', () => {
  const result = filled(invented(0, 1), failedChunk(plan, [2], refused));
  const bytes = encodeSweep(result, '0.1.0');
  for (let at = 0; at < bytes.length; at++) {
    const broken = Uint8Array.from(bytes, (byte, i) => (i === at ? byte ^ 3 : byte));
    expect(() => decodeSweep(broken, plan, '0.1.0')).toThrow(SweepDataError);
  }
});

test('limitBorders lie between neighbours of different dominant limit, and none beside a cell without numbers', () => {
  const column = plan.columns.indexOf('dominantLimit');
  const code = (name: (typeof limitCodes)[number]) => limitCodes.indexOf(name);
  // Rows are ambient (3), columns start temperature (4): cold | cold | taper | taper, the last row failed.
  const names = ['cold', 'cold', 'taper', 'taper', 'cold', 'taper', 'taper', 'taper'] as const;
  const chunk = invented(...names.keys());
  names.forEach((name, i) => (chunk.values[column * names.length + i] = code(name)));
  const result = filled(chunk, failedChunk(plan, [8, 9, 10, 11], refused));
  const borders = limitBorders(plan, result, { x: 1, y: 0, at: [0, 0] });
  expect(borders).toEqual([
    { x1: 1.5, y1: -0.5, x2: 1.5, y2: 0.5, lower: 'cold', upper: 'taper' },
    { x1: 0.5, y1: 0.5, x2: 1.5, y2: 0.5, lower: 'cold', upper: 'taper' },
    { x1: 0.5, y1: 0.5, x2: 0.5, y2: 1.5, lower: 'cold', upper: 'taper' },
  ]);
});

test('sliceValues has one row per value along y; axes may be turned, a third is held, one axis gives one row', () => {
  const { base } = plan;
  const gridOf = (...axes: object[]) =>
    parseSweep({ format: 'voltiplano/study', version: 1, kind: 'sweep', base, sweep: { axes } }) as GridPlan;
  const cube = gridOf(
    { path: 'session.ambientC', values: [0, 1] },
    { path: 'session.startTempC', values: [10, 11, 12] },
    { path: 'station.powerMaxKw', values: [100, 200] },
  );
  const numbered = (grid: GridPlan) => {
    const result = new SweepResult(grid);
    const indices = Uint32Array.from({ length: grid.size }, (_, index) => index);
    const values = new Float64Array(grid.columns.length * grid.size);
    values.set(indices, 0);
    result.merge({ indices, status: new Uint8Array(grid.size).fill(CELL.done), values, failures: [] });
    return result;
  };
  const [first] = cube.columns;
  const rows = (slice: { x: number; y: number; at: number[] }) =>
    sliceValues(cube, numbered(cube), first, slice).map((row) => [...row]);
  expect(rows({ x: 1, y: 0, at: [0, 0, 1] })).toEqual([
    [1, 3, 5],
    [7, 9, 11],
  ]);
  expect(rows({ x: 0, y: 2, at: [0, 2, 0] })).toEqual([
    [4, 10],
    [5, 11],
  ]);
  const line = gridOf({ path: 'session.ambientC', values: [0, 1, 2] });
  expect(sliceValues(line, numbered(line), first, { x: 0, y: 0, at: [0] })).toEqual([Float64Array.of(0, 1, 2)]);
});
