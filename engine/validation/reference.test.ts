import { execFileSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import type { SessionResult } from '../src/index.ts';
import { readJson, referenceStudies, run } from './studies.ts';

/** SciPy's results, stored and fresh; SciPy 1.10.1, Radau at rtol 1e-10 (see reference/README.md). */

const PYTHON = '/usr/bin/python3';
const folder = new URL('./reference/', import.meta.url).pathname;
const studies = referenceStudies();

/**
 * Two limits may cross at so flat an angle that 1e-9 of the state is a millisecond: 5e-6 of a number is the largest
 * difference seen, most are below 1e-7.
 */
const AGREED = 1e-5;

const scipyIsHere = (() => {
  if (!existsSync(PYTHON)) return false;
  try {
    execFileSync(PYTHON, ['-c', 'import scipy'], { stdio: 'ignore' });
    return true;
  } catch {
    return false;
  }
})();
if (!scipyIsHere) console.log('SciPy is not installed: its stored results are compared, its script is not run again.');

type Leaf = { path: string; value: unknown };

const leaves = (value: unknown, path = ''): Leaf[] =>
  typeof value === 'object' && value !== null
    ? Object.entries(value).flatMap(([key, inner]) => leaves(inner, path ? `${path}.${key}` : key))
    : [{ path, value }];

/** Largest difference between two sets of metrics or ledgers, over the greater of each number and 1. */
function worst(got: object, expected: object): { path: string; off: number } {
  const found = new Map(leaves(got).map(({ path, value }) => [path, value]));
  let most = { path: '', off: 0 };
  for (const { path, value } of leaves(expected)) {
    if (typeof value !== 'number') {
      expect([path, found.get(path)]).toEqual([path, value]);
      continue;
    }
    const off = Math.abs((found.get(path) as number) - value) / Math.max(Math.abs(value), 1);
    if (!(off <= most.off)) most = { path, off };
  }
  return most;
}

/** Moments of extremes on a curve held flat by its limit depend on 1e-6 of it: they are compared to a second. */
const FLAT = [
  'peakStationPowerMin',
  'peakStationPowerSoc',
  'peakBatteryPowerMin',
  'peakBatteryPowerSoc',
  'hottestCoreMin',
  'lowestAnodeMin',
];
const withoutFlat = (metrics: object) =>
  Object.fromEntries(Object.entries(metrics).filter(([key]) => !FLAT.includes(key)));

function compare(got: SessionResult, expected: SessionResult, share: number): void {
  for (const part of ['metrics', 'energyLedger', 'thermalLedger'] as const) {
    const { path, off } = worst(withoutFlat(got[part]), withoutFlat(expected[part]));
    expect(off, `${part}.${path}`).toBeLessThan(share);
  }
  for (const key of FLAT) {
    const [a, b] = [got, expected].map(({ metrics }) => metrics[key as keyof typeof metrics] as number | null);
    if (b === null) expect(a).toBeNull();
    else expect(Math.abs(a! - b), key).toBeLessThan(1 / 60);
  }
}

const expectedOf = (name: string) => readJson(`./reference/${name}.expected.json`) as SessionResult;

describe.each(studies)('$name', ({ name, study }) => {
  const expected = expectedOf(name);

  test('at rtol 1e-9: metrics and ledgers to 1e-5', () => {
    compare(run(study, { everyS: 60, rtol: 1e-9 }).result, expected, AGREED);
  });

  test('at rtol 1e-9: events, in order, to 2 ms', () => {
    const { events } = run(study, { everyS: 60, rtol: 1e-9 }).result;
    const names = (list: SessionResult['events']) => list.map(({ event }) => event);
    expect(names(events)).toEqual(names(expected.events));
    events.forEach(({ tS }, i) => expect(Math.abs(tS - expected.events[i].tS)).toBeLessThan(2e-3));
  });

  test('at rtol 1e-9: every column of the series at every full minute', () => {
    const { series } = run(study, { everyS: 60, rtol: 1e-9 }).result;
    const rowsAt = (tS: number[], t: number) => tS.flatMap((at, i) => (Math.abs(at - t) < 1e-9 ? [i] : []));
    for (let t = 0; t <= expected.series.tS.at(-1)!; t += 60) {
      const [ours, theirs] = [rowsAt(series.tS, t), rowsAt(expected.series.tS, t)];
      expect(ours.length).toBeGreaterThan(0);
      for (const [column, values] of Object.entries(expected.series)) {
        if (column === 'limit') continue;
        // A controller's band of a few kelvin makes some mW of a microkelvin.
        const unit = /^(chiller|radiator|heater|auxiliary)W$/.test(column) ? 1e4 : 1;
        const mine = series[column as keyof typeof series];
        // First and last of a double row are its two sides.
        for (const side of [0, -1]) {
          const [a, b] = [mine[ours.at(side)!], values[theirs.at(side)!]] as [number | null, number | null];
          if (b === null) expect(a).toBeNull();
          else expect(Math.abs(a! - b), `${column} at ${t} s`).toBeLessThan(1e-6 * Math.max(unit, Math.abs(b)));
        }
      }
    }
  });

  test('at the default accuracy: minutes to each 10 % within 0.05 %, temperatures within 0.05 K', () => {
    const { metrics } = run(study).result;
    for (const [soc, minutes] of Object.entries(expected.metrics.minutesToSoc)) {
      const mine = metrics.minutesToSoc[soc as '10'];
      if (minutes === null) expect(mine).toBeNull();
      else expect(Math.abs(mine! - minutes)).toBeLessThan(Math.max(5e-4 * minutes, 0.05 / 60));
    }
    expect(Math.abs(metrics.hottestCoreC - expected.metrics.hottestCoreC)).toBeLessThan(0.05);
  });

  // Another method of SciPy's than the stored one, so that the stored numbers are checked as well.
  test.runIf(scipyIsHere)('SciPy run again with DOP853', () => {
    const output = execFileSync(
      PYTHON,
      ['session.py', `${name}.json`, '--every', '60', '--rtol', '1e-9', '--method', 'DOP853'],
      {
        cwd: folder,
        env: { ...process.env, OMP_NUM_THREADS: '1' },
        encoding: 'utf8',
        maxBuffer: 1e8,
      },
    );
    const fresh = JSON.parse(output) as SessionResult;
    compare(fresh, expected, AGREED);
    compare(run(study, { everyS: 60, rtol: 1e-9 }).result, fresh, AGREED);
  });
});
