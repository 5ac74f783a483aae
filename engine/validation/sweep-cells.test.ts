import { expect, test } from 'vitest';
import {
  cellStudy,
  CELL,
  curveBands,
  limitCodes,
  metricBand,
  parseSessionStudy,
  parseSweep,
  runCells,
  sensitivityRows,
  simulateSession,
  spreadPercentiles,
  sweepMetrics,
  SweepResult,
  type SensitivityPlan,
  type SessionStudy,
  type SpreadPlan,
  type SweepPlan,
} from '../src/index.ts';
import { bareStudy, constant, exampleStudies } from './studies.ts';

const planOf = (base: SessionStudy, sweep: unknown): SweepPlan =>
  parseSweep({ format: 'voltiplano/study', version: 1, kind: 'sweep', base, sweep });

function resultOf(plan: SweepPlan): SweepResult {
  const result = new SweepResult(plan);
  result.merge(runCells(plan, result.pending()));
  return result;
}

/** 100 Ah charged at a constant 400 A: from 0 to 100 % in exactly 15 min, and the minutes are linear in the capacity. */
const constantCurrent = bareStudy((study) => {
  study.cell.capacityAh = 100;
  study.strategy.taper = constant(400);
  study.session.maxMin = 60;
});
/** The station's ramp takes 4 ms (see `bareStudy`): 7e-5 min at most, 1e-5 of the minutes here. */
const RAMP_MIN = 1e-4;

test.each(exampleStudies())('a cell of $name is the ordinary run of its study, to the last bit', ({ study }) => {
  const plan = planOf(study, {
    axes: [
      { path: 'session.ambientC', values: [-5, 20] },
      { path: 'station.powerMaxKw', values: [90, 250] },
    ],
  });
  const result = resultOf(plan);
  for (const index of [0, 3]) {
    const { metrics, energyLedger } = simulateSession(parseSessionStudy(cellStudy(plan, index))).result;
    const at = (id: string) => result.column(id)[index];
    expect(at('endMin')).toBe(metrics.endMin);
    expect(at('endSoc')).toBe(metrics.endSoc);
    expect(at('minutes10To80')).toBe(metrics.minutes10To80 ?? NaN);
    expect(at('peakStationPowerKw')).toBe(metrics.peakStationPowerKw);
    expect(at('kmAfter20Min')).toBe(metrics.kmAfterMin['20']);
    expect(at('hottestCoreC')).toBe(metrics.hottestCoreC);
    expect(at('lowestAnodeMv')).toBe(metrics.lowestAnodeMv ?? NaN);
    expect(at('storedKwh')).toBe(energyLedger.storedKwh);
    for (const code of limitCodes) expect(at(`limitMinutes.${code}`)).toBe(metrics.limitMinutes[code]);
  }
});

test('the dominant limit is the one with the most minutes where a session runs from 10 to 80 % and no further', () => {
  for (const { study } of exampleStudies()) {
    const session = { ...study.session, startSoc: 0.1, targetSoc: 0.8 };
    const result = resultOf(planOf({ ...study, session }, { axes: [{ path: 'session.ambientC', values: [15] }] }));
    const minutes = limitCodes.map((code) => result.column(`limitMinutes.${code}`)[0]);
    expect(result.column('dominantLimit')[0]).toBe(minutes.indexOf(Math.max(...minutes)));
  }
});

test('the dominant limit looks at 10 to 80 % alone: a long constant-voltage end does not name the session', () => {
  const study = bareStudy((change) => {
    change.cell.capacityAh = 100;
    change.strategy.taper = {
      shape: 'ledges',
      unit: 'A',
      steps: [
        { fromSoc: 0, value: 400 },
        { fromSoc: 0.8, value: 15 },
      ],
    };
    change.station.currentMaxA = 300;
    change.session.maxMin = 600;
  });
  const result = resultOf(planOf(study, { axes: [{ path: 'session.ambientC', values: [25] }] }));
  expect(result.column('limitMinutes.taper')[0]).toBeGreaterThan(result.column('limitMinutes.station-current')[0]);
  expect(limitCodes[result.column('dominantLimit')[0]]).toBe('station-current');
});

test('cells that cannot be say why and stop none of the others', () => {
  const { study } = exampleStudies().find(({ name }) => name === 'vicuna-cold-morning')!;
  const plan = planOf(study, {
    axes: [
      { path: 'station.voltageMaxV', values: [250, 920] },
      { path: 'strategy.cellVoltageCeilingV', values: [4.1, 4.5] },
    ],
  });
  const result = resultOf(plan);
  expect([...result.status]).toEqual([CELL.failed, CELL.failed, CELL.done, CELL.failed]);
  expect(result.failures.get(0)).toMatchObject({ code: 'REFUSED', path: 'station.voltageMaxV' });
  expect(result.failures.get(0)?.message).toMatch(/^Cannot start: the pack rests at \d+ V, above this station’s 250 V/);
  expect(result.failures.get(3)).toMatchObject({ code: 'INVALID_STUDY', path: 'strategy.cellVoltageCeilingV' });
  expect(result.failures.get(3)?.message).toContain('must not pass cell.vMaxV (4.2), but is 4.5');
  expect(result.column('endMin')[3]).toBeNaN();
});

test('every metric has a column, and the codes among them are indices that exist', () => {
  const result = resultOf(planOf(constantCurrent, { axes: [{ path: 'session.ambientC', values: [25] }] }));
  for (const { id, kind } of sweepMetrics) {
    const [value] = result.column(id);
    if (kind === 'limit') expect(limitCodes[value]).toBe('taper');
    if (kind === 'endReason') expect(value).toBe(0);
  }
});

test('sensitivity at constant current: minutes follow capacity and the inverse of the current, resistance moves nothing', () => {
  const plan = planOf(constantCurrent, {
    sensitivity: {
      inputs: [
        { path: 'cell.r0Milliohm', minus: 0.5, plus: 0.5 },
        { path: 'cell.capacityAh', minus: 0.1, plus: 0.1 },
        { path: 'strategy.taper.factor', minus: 0.2, plus: 0.25 },
        { path: 'session.startTempC', minus: 5, plus: 5, as: 'absolute' },
      ],
    },
  }) as SensitivityPlan;
  const rows = sensitivityRows(plan, resultOf(plan), 'minutes0To100');
  expect(rows.map(({ path }) => path).slice(0, 2)).toEqual(['strategy.taper.factor', 'cell.capacityAh']);
  const [taper, capacity, ...rest] = rows;
  // 15 min at 400 A; 15/0.8 and 15/1.25 with the taper scaled; 15·0.9 and 15·1.1 with the capacity.
  expect(Math.abs(taper.base! - 15)).toBeLessThan(RAMP_MIN);
  expect(Math.abs(taper.minus! - 18.75)).toBeLessThan(RAMP_MIN);
  expect(Math.abs(taper.plus! - 12)).toBeLessThan(RAMP_MIN);
  expect(Math.abs(capacity.minus! - 13.5)).toBeLessThan(RAMP_MIN);
  expect(Math.abs(capacity.plus! - 16.5)).toBeLessThan(RAMP_MIN);
  expect(taper.effect).toBeCloseTo(3.75, 3);
  for (const { effect } of rest) expect(effect).toBeLessThan(RAMP_MIN);
  expect([capacity.minusValue, capacity.baseValue, capacity.plusValue]).toEqual([90, 100, 110]);
});

test('a sensitivity whose moved run fails keeps its other side', () => {
  const plan = planOf(constantCurrent, {
    sensitivity: {
      inputs: [
        { path: 'cell.vMaxV', minus: 0.5, plus: 0 },
        { path: 'cell.capacityAh', minus: 0.1, plus: 0.1 },
      ],
    },
  }) as SensitivityPlan;
  const result = resultOf(plan);
  const rows = sensitivityRows(plan, result, 'minutes0To100');
  expect(rows[1]).toMatchObject({ path: 'cell.vMaxV', minus: null, effect: 0 });
  expect(result.failures.get(1)?.code).toBe('INVALID_STUDY');
});

const RUNS = 200;

/**
 * A Latin hypercube has one value in each of N slices of probability, so the k-th smallest of N (from 0) lies between the
 * quantiles at k/N and (k + 1)/N. Percentile p lies between the k-th and the next, k = ⌊(N − 1)p⌋.
 */
function expectWithinSlices(percentiles: (number | null)[], quantile: (p: number) => number): void {
  spreadPercentiles.forEach((percent, i) => {
    const k = Math.floor(((RUNS - 1) * percent) / 100);
    expect(percentiles[i]).toBeGreaterThan(quantile(k / RUNS) - RAMP_MIN);
    expect(percentiles[i]).toBeLessThan(quantile(Math.min(1, (k + 2) / RUNS)) + RAMP_MIN);
  });
}

const spreadOf = (input: object, seed = 1, runs = RUNS) =>
  planOf(constantCurrent, { spread: { inputs: [{ path: 'cell.capacityAh', ...input }], runs, seed } }) as SpreadPlan;

test('spread of a linear case: minutes have the percentiles of the capacity, uniform', () => {
  const { percentiles, count } = metricBand(
    resultOf(spreadOf({ distribution: 'uniform', from: 80, to: 120 })),
    'minutes0To100',
  );
  expect(count).toBe(RUNS);
  expectWithinSlices(percentiles, (p) => 0.15 * (80 + 40 * p));
});

test('spread of a linear case: 5, 50 and 95 % of a normal capacity stand at −1.645, 0 and 1.645 standard deviations', () => {
  const { percentiles } = metricBand(resultOf(spreadOf({ distribution: 'normal', sd: 4 })), 'minutes0To100');
  // Slices at 5 % are 0.005 wide in probability: 0.005/0.1031 (normal density there) = 0.05 standard deviations each; two of them.
  const sdMin = 0.15 * 4;
  for (const [i, z] of [-1.6448536, -0.6744898, 0, 0.6744898, 1.6448536].entries())
    expect(Math.abs(percentiles[i]! - (15 + z * sdMin))).toBeLessThan(0.1 * sdMin + RAMP_MIN);
});

test('the same seed gives the same numbers, another seed others', () => {
  const run = (seed: number) => resultOf(spreadOf({ distribution: 'normal', sd: 4 }, seed, 12)).column('minutes0To100');
  expect(run(5)).toEqual(run(5));
  expect(run(5)).not.toEqual(run(6));
});

test('bands around the curve: power of a constant current and voltage is one number over all soc, its band that of the current', () => {
  const plan = planOf(constantCurrent, {
    spread: { inputs: [{ path: 'strategy.taper.factor', distribution: 'uniform', from: 0.9, to: 1.1 }], runs: RUNS },
  });
  const bands = curveBands(resultOf(plan));
  expect(bands.map(({ socPercent }) => socPercent)).toEqual(Array.from({ length: 41 }, (_, i) => 2.5 * i));
  // Pack of 350 V at rest and 60 mΩ (see `bareStudy`): V·I in kW at a factor of the 400 A.
  const powerKw = (factor: number) => (400 * factor * (350 + 0.06 * 400 * factor)) / 1000;
  for (const { socPercent, percentiles, count } of bands.slice(1)) {
    expect(count, `at ${socPercent} %`).toBe(RUNS);
    expectWithinSlices(percentiles, (p) => powerKw(0.9 + 0.2 * p));
  }
});

test('soc that a run does not cover has no part in its band', () => {
  const plan = planOf(constantCurrent, {
    spread: { inputs: [{ path: 'session.startSoc', distribution: 'uniform', from: 0.2, to: 0.3 }], runs: 20 },
  });
  const bands = curveBands(resultOf(plan));
  expect(bands.find(({ socPercent }) => socPercent === 10)).toMatchObject({
    count: 0,
    percentiles: [null, null, null, null, null],
  });
  expect(bands.find(({ socPercent }) => socPercent === 25)?.count).toBe(10);
  expect(bands.find(({ socPercent }) => socPercent === 50)?.count).toBe(20);
});
