import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  limitCodes,
  parseSessionStudy,
  simulateSession,
  StudyError,
  type SessionResult,
  type SessionStudyInput,
} from '../src/index.ts';
import { anyStudy } from './random-studies.ts';
import { bareStudy, constant, exampleStudies, readJson, run } from './studies.ts';
import { wildStudy } from './wild-studies.ts';

const EVALUATIONS = 20_000;
/** A run within the budget above takes some 0.1 s; this is what a hang would pass on any machine. */
const HANGING_MS = 10_000;
const SEEDED = { seed: 7, unbiased: true, endOnFailure: true };

/** Runs a study from its file's form: a result, or the study error that says what is wrong with it. */
function attempt(input: unknown): SessionResult | StudyError {
  const started = performance.now();
  try {
    return simulateSession(parseSessionStudy(input), { maxEvaluations: EVALUATIONS }).result;
  } catch (error) {
    if (error instanceof StudyError) return error;
    throw error;
  } finally {
    expect(performance.now() - started).toBeLessThan(HANGING_MS);
  }
}

function expectClear(error: StudyError): void {
  expect(error.issues.length).toBeGreaterThan(0);
  for (const { path, rule, message } of error.issues) {
    expect(rule).toMatch(/^[a-z-_]+$/);
    expect(message.length).toBeGreaterThan(10);
    expect(message).not.toMatch(/undefined|\[object|NaN/);
    // A run that had to stop names a moment; whatever else is wrong has a place in the file.
    if (error.code === 'BUDGET' || rule === 'finite') expect(message).toMatch(/^Stopped at [\d.]+ min/);
    else expect(path).not.toBe('');
  }
}

function expectRight(result: SessionResult): void {
  const { series, metrics, energyLedger: energy, thermalLedger: heat } = result;
  const rows = series.tS.length;
  const numbers: number[] = [];
  const collect = (value: unknown): void => {
    if (typeof value === 'number') numbers.push(value);
    else if (typeof value === 'object' && value !== null) Object.values(value).forEach(collect);
  };
  collect(result);
  expect(numbers.every(Number.isFinite)).toBe(true);
  for (const column of Object.values(series)) expect(column).toHaveLength(rows);
  series.tS.forEach((t, i) => expect(t).toBeGreaterThanOrEqual(series.tS[i - 1] ?? 0));
  const held = limitCodes.reduce((sum, code) => sum + metrics.limitMinutes[code], 0);
  expect(Math.abs(held - metrics.endMin)).toBeLessThan(1e-6 * (1 + metrics.endMin));
  // The contract's 0.1 % of each ledger's total; a session of a few joules has no total to speak of.
  const spent = Math.abs(energy.stationKwh) + energy.auxiliariesKwh + Math.abs(energy.storedKwh);
  expect(Math.abs(energy.remainderKwh)).toBeLessThan(1e-3 * spent + 1e-7);
  const warmed = Math.abs(heat.cellsKj) + heat.busbarKj + heat.heaterKj + Math.abs(heat.coresKj);
  expect(Math.abs(heat.remainderKj)).toBeLessThan(1e-3 * warmed + 1e-6);
}

describe('a clear error or a right answer', () => {
  const seen = { right: 0, INVALID_STUDY: 0, REFUSED: 0, BUDGET: 0 };

  test('usual studies with numbers anywhere in what the schema takes', () => {
    fc.assert(
      fc.property(wildStudy, (input) => {
        const outcome = attempt(input);
        if (outcome instanceof StudyError) expectClear(outcome);
        else expectRight(outcome);
        seen[outcome instanceof StudyError ? (outcome.code as 'BUDGET') : 'right']++;
      }),
      { ...SEEDED, numRuns: 500 },
    );
    // All ways out were taken.
    expect(Math.min(seen.right, seen.INVALID_STUDY, seen.REFUSED, seen.BUDGET)).toBeGreaterThan(0);
    expect(seen.right).toBeGreaterThan(100);
  });

  test('usual studies run to their end, all of them', () => {
    fc.assert(
      fc.property(anyStudy, (input) => {
        const outcome = attempt(input);
        if (outcome instanceof StudyError) throw outcome;
        expectRight(outcome);
      }),
      { ...SEEDED, numRuns: 300 },
    );
  });
});

/** The winter example in its file's form, to be spoilt. */
const spoilt = (change: (study: SessionStudyInput) => void) => {
  const input = readJson('../../examples/vicuna-cold-morning.json') as SessionStudyInput;
  change(input);
  return attempt(input);
};
const issueOf = (outcome: SessionResult | StudyError) => {
  expect(outcome).toBeInstanceOf(StudyError);
  return (outcome as StudyError).issues[0];
};

describe('named cases', () => {
  test('zero flow is no cooling, and a right answer', () => {
    const outcome = spoilt((s) => (s.thermal.coolant.flowLPerMin = 0)) as SessionResult;
    expectRight(outcome);
    const { series, thermalLedger } = outcome;
    expect(thermalLedger).toMatchObject({ loopKj: 0, chillerKj: 0, radiatorKj: 0, heaterKj: 0 });
    expect(new Set([...series.loopC, ...series.coolantInC, ...series.coolantOutC]).size).toBe(1);
  });

  test('zero resistance is refused by its field', () => {
    expect(issueOf(spoilt((s) => (s.cell.r0Milliohm = 0)))).toMatchObject({
      path: 'cell.r0Milliohm',
      rule: 'range',
      value: '0',
      message: 'cell.r0Milliohm must be above 0, but is 0',
    });
    expectRight(spoilt((s) => ((s.pack.busbarMilliohm = 0), (s.inlet!.resistanceMilliohm = 0))) as SessionResult);
  });

  test('1 and 400 segments run and agree where segments do not matter; 0, 401 and 1.5 are refused', () => {
    // No coolant: all segments are alike, so that the number of them changes nothing.
    const [one, many] = [1, 400].map((segments) => {
      const outcome = spoilt(
        (s) => ((s.pack.segments = segments), (s.thermal.coolant.flowLPerMin = 0)),
      ) as SessionResult;
      expectRight(outcome);
      return outcome.metrics;
    });
    expect(many.endMin / one.endMin).toBeCloseTo(1, 5);
    expect(many.hottestCoreC).toBeCloseTo(one.hottestCoreC, 3);
    expectRight(spoilt((s) => (s.pack.segments = 400)) as SessionResult);
    for (const segments of [0, 401, 1.5])
      expect(issueOf(spoilt((s) => (s.pack.segments = segments)))).toMatchObject({
        path: 'pack.segments',
        value: String(segments),
      });
  });

  test('a target below the start is refused; equal, it ends at once', () => {
    expect(issueOf(spoilt((s) => ((s.session.startSoc = 0.6), (s.session.targetSoc = 0.5))))).toMatchObject({
      path: 'session.targetSoc',
      rule: 'target-below-start',
      value: '0.5',
    });
    const equal = spoilt((s) => ((s.session.startSoc = 0.6), (s.session.targetSoc = 0.6))) as SessionResult;
    expect(equal.series.tS).toEqual([0]);
  });

  test('a station below or above the pack’s voltage is refused with both voltages; with a boost it runs', () => {
    expect(issueOf(spoilt((s) => ((s.station.voltageMaxV = 300), (s.station.voltageMinV = 200))))).toMatchObject({
      path: 'station.voltageMaxV',
      rule: 'pack-above-station',
      value: '300',
      message: expect.stringMatching(/pack rests at 3\d\d V, above this station’s 300 V/) as string,
    });
    expect(issueOf(spoilt((s) => (s.station.voltageMinV = 600)))).toMatchObject({
      path: 'station.voltageMinV',
      rule: 'pack-below-station',
    });
    const boosted = spoilt((s) => ((s.station.voltageMaxV = 300), (s.boost = { powerMaxKw: 50 }))) as SessionResult;
    expectRight(boosted);
    expect(boosted.events[0]).toEqual({ tS: 0, event: 'boost' });
  });

  test('a ceiling above the cell’s own voltage, a start outside the temperature window, a margin without an anode', () => {
    expect(issueOf(spoilt((s) => (s.strategy.cellVoltageCeilingV = 4.3)))).toMatchObject({
      path: 'strategy.cellVoltageCeilingV',
      rule: 'ceiling-above-cell',
      value: '4.3',
    });
    expect(issueOf(spoilt((s) => (s.session.startTempC = 95)))).toMatchObject({
      path: 'session.startTempC',
      rule: 'range',
      value: '95',
    });
    expect(issueOf(spoilt((s) => delete s.cell.anode))).toMatchObject({
      path: 'strategy.anodeMarginMv',
      rule: 'needs-anode',
    });
  });

  test('auxiliaries that a station of no power leaves to an empty pack: the run stops and says so', () => {
    const outcome = spoilt((s) => {
      s.session.startSoc = 0.005;
      s.session.hotelW = 9000;
      s.station.powerMaxKw = 0.5;
      s.pack.socWindow = [0, 1];
    });
    expect(issueOf(outcome)).toMatchObject({ path: 'session.hotelW', rule: 'auxiliaries-above-pack' });
    expect((outcome as StudyError).message).toMatch(/the pack, at −\d %, can give the rest no longer/);
  });

  test('an inlet without heat capacity to speak of is named as what is stiff', () => {
    const outcome = spoilt((s) => (s.inlet = { ...s.inlet, heatCapacityJPerK: 1e-6 }));
    expect((outcome as StudyError).code).toBe('BUDGET');
    expect((outcome as StudyError).message).toMatch(/inlet\.heatCapacityJPerK/);
  });

  test('a pack drained below its window keeps its ledger, in the formula’s range and in a table’s held end', () => {
    for (const ocv of [{ electrodes: 'nmc811-graphite' as const }, { x: [0.1, 1], y: [3.2, 4.1] }]) {
      const study = bareStudy((s) => {
        s.cell.ocv = ocv;
        s.cell.capacityAh = 100;
        s.session.startSoc = 0;
        s.session.hotelW = 30_000;
        s.session.maxMin = 1.1;
        s.strategy.taper = constant(1);
        s.station.currentMaxA = 1e-6;
      });
      const { metrics, energyLedger } = run(study, { rtol: 1e-9 }).result;
      // The formula is tabulated down to −0.02; the table holds its end below 0.1.
      expect(metrics.endSoc).toBeLessThan('electrodes' in ocv ? -0.02 : 0);
      expect(Math.abs(energyLedger.remainderKwh)).toBeLessThan(1e-7);
    }
  });

  test('every example survives each of its optional fields being left out', () => {
    for (const { study } of exampleStudies()) {
      for (const part of ['inlet', 'boost', 'title'] as const) {
        const copy = structuredClone(study) as SessionStudyInput;
        delete copy[part];
        const outcome = attempt(copy);
        if (outcome instanceof StudyError) expectClear(outcome);
        else expectRight(outcome);
      }
    }
  });
});
