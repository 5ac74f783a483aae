import fc from 'fast-check';
import { afterEach, describe, expect, test, vi } from 'vitest';
import { parseSessionStudy, simulateSession, StudyError, type SessionStudy } from '../src/index.ts';
import { Stepper, type Derivative } from '../src/integrate/stepper.ts';
import { PackSystem } from '../src/pack/pack-system.ts';
import { anyStudy } from './random-studies.ts';
import { exampleStudies, largePack, referenceStudies, run } from './studies.ts';

afterEach(() => vi.restoreAllMocks());

/** y' = v, v' = −y: a circle, y = cos t; and e' = −e/5. Exact at any t (any textbook). */
const circle: Derivative = (_, y, dy) => {
  dy[0] = y[1];
  dy[1] = -y[0];
  dy[2] = -y[2] / 5;
};
const exact = (t: number) => [Math.cos(t), -Math.sin(t), Math.exp(-t / 5)];

/** Integrates the circle; worst error at step ends and between them, and the evaluations it and the caller count. */
function roundTheCircle(rtol: number, maxStepS = 10) {
  let counted = 0;
  const derivative: Derivative = (t, y, dy) => {
    counted++;
    circle(t, y, dy);
  };
  const stepper = new Stepper(derivative, {
    relativeTolerance: rtol,
    absoluteTolerance: [rtol, rtol, rtol],
    maxStepS,
    firstStepS: 0.1,
    maxEvaluations: 1e6,
    diagnose: () => '',
  });
  let atEnds = 0;
  let between = 0;
  const off = (value: (i: number) => number, t: number) => Math.max(...exact(t).map((y, i) => Math.abs(value(i) - y)));
  for (const { t0, t1, y, dense } of stepper.from(0, [1, 0, 1], 20)) {
    atEnds = Math.max(
      atEnds,
      off((i) => y[i], t1),
    );
    for (let k = 0; k <= 20; k++) {
      const t = t0 + ((t1 - t0) * k) / 20;
      between = Math.max(
        between,
        off((i) => dense(i, t), t),
      );
    }
  }
  return { atEnds, between, counted, evaluations: stepper.evaluations, steps: stepper.steps };
}

describe('integrator on a problem of known solution', () => {
  const tolerances = [1e-3, 1e-4, 1e-5, 1e-6, 1e-7, 1e-8, 1e-9, 1e-10, 1e-11];
  const errors = tolerances.map((rtol) => roundTheCircle(rtol));

  test('the error follows the tolerance: a decade for a decade', () => {
    // Least squares of log error on log tolerance: 1 is proportional; a method of lost order would show 0.5 or less.
    const x = tolerances.map(Math.log10);
    const y = errors.map(({ atEnds }) => Math.log10(atEnds));
    const mean = (values: number[]) => values.reduce((a, b) => a + b) / values.length;
    const [mx, my] = [mean(x), mean(y)];
    const slope = mean(x.map((v, i) => (v - mx) * (y[i] - my))) / mean(x.map((v) => (v - mx) ** 2));
    expect(slope).toBeGreaterThan(0.85);
    expect(slope).toBeLessThan(1.15);
  });

  test('stays near the tolerance at steps’ ends and between them', () => {
    // 20 s are three turns: the local error adds up to some tens of the tolerance, between steps as at their ends.
    errors.forEach(({ atEnds, between }, i) => {
      expect(atEnds).toBeLessThan(30 * tolerances[i] + 1e-13);
      expect(between).toBeLessThan(30 * tolerances[i] + 1e-13);
    });
  });

  test('is of high order: a decade of accuracy costs less than a third more, where a method of order 4 pays 78 %', () => {
    const [at3, at9] = [errors[0], errors[6]].map(({ evaluations }) => evaluations);
    expect((at9 / at3) ** (1 / 6)).toBeLessThan(1.33);
  });

  test('counts its evaluations as the derivative does', () => {
    for (const { counted, evaluations } of errors) expect(evaluations).toBe(counted);
  });
});

test.each(referenceStudies())('evaluations of a session are those of its derivative: $name', ({ study }) => {
  const rates = vi.spyOn(PackSystem.prototype, 'rates');
  const { statistics } = run(study);
  expect(statistics.evaluations).toBe(rates.mock.calls.length);
});

const TEMPERATURES = [
  'hottestCoreC',
  'hottestSurfaceC',
  'coldestSurfaceC',
  'coolantInC',
  'coolantOutC',
  'loopC',
  'inletC',
] as const;

/** Worst distance of one run from another: minutes to each 10 % [share], temperatures at rows on the grid [K]. */
function distance(study: SessionStudy, rtol: number | undefined, exactly: ReturnType<typeof run>['result']) {
  const { metrics, series } = run(study, { everyS: 5, rtol }).result;
  let share = 0;
  for (const [soc, minutes] of Object.entries(exactly.metrics.minutesToSoc)) {
    const mine = metrics.minutesToSoc[soc as '10'];
    expect(mine === null).toBe(minutes === null);
    // 0.05 s of the contract beside 0.05 %: early marks are held to the first.
    if (minutes) share = Math.max(share, Math.abs(mine! - minutes) / Math.max(minutes, 0.05 / 60 / 5e-4));
  }
  let kelvin = 0;
  const rows = new Map(exactly.series.tS.map((t, row) => [t, row]));
  series.tS.forEach((t, row) => {
    const other = rows.get(t);
    if (other === undefined || t % 5 !== 0) return;
    for (const name of TEMPERATURES)
      kelvin = Math.max(kelvin, Math.abs(series[name][row] - exactly.series[name][other]));
  });
  return { share, kelvin };
}

const anchors: { name: string; study: SessionStudy }[] = [
  { name: 'large 400-V-class pack', study: largePack() },
  { name: 'large 400-V-class pack in twelve segments', study: inTwelve(largePack()) },
];

function inTwelve(study: SessionStudy): SessionStudy {
  study.pack.segments = 12;
  return study;
}

describe.each([...referenceStudies(), ...exampleStudies(), ...anchors])('accuracy of $name', ({ study }) => {
  const exactly = run(study, { everyS: 5, rtol: 1e-10 }).result;

  test('at the default: minutes to each 10 % within 0.05 %, temperatures within 0.05 K, between steps too', () => {
    const { share, kelvin } = distance(study, undefined, exactly);
    expect(share).toBeLessThan(5e-4);
    expect(kelvin).toBeLessThan(0.05);
  });

  test('converges: at 1e-9 minutes within 1e-6 and temperatures within 0.2 mK', () => {
    // What is left are the kinks of tables and controllers' bands, which steps cross; some 1e-7 and 0.03 mK are seen.
    const { share, kelvin } = distance(study, 1e-9, exactly);
    expect(share).toBeLessThan(1e-6);
    expect(kelvin).toBeLessThan(2e-4);
  });
});

// Seeded: of 1,000 such studies none passed 0.05 K and one in 700 passed the minutes, where a narrow band was crossed in one step.
test('the default accuracy holds on studies drawn at random', () => {
  let compared = 0;
  for (const input of fc.sample(anyStudy, { numRuns: 60, seed: 77 })) {
    const study = parseSessionStudy(input);
    if (!starts(study)) continue;
    const { share, kelvin } = distance(study, undefined, run(study, { everyS: 5, rtol: 1e-10 }).result);
    expect(share).toBeLessThan(5e-4);
    expect(kelvin).toBeLessThan(0.05);
    compared++;
  }
  expect(compared).toBeGreaterThan(40);
});

/** Whether a session can start at all: some drawn at random are refused by their station. */
function starts(study: SessionStudy): boolean {
  try {
    run(study);
    return true;
  } catch (error) {
    if (error instanceof StudyError) return false;
    throw error;
  }
}

describe('budget', () => {
  /** A coolant loop of a few millilitres: 0.1 ms against an hour of charging. */
  const stiff = largePack();
  stiff.thermal.coolant.volumeL = 0.00003;

  test('ends a run that cannot get on, and names what is stiff', () => {
    const error = (() => {
      try {
        simulateSession(stiff, { maxEvaluations: 20_000 });
      } catch (caught) {
        return caught;
      }
    })();
    expect(error).toBeInstanceOf(StudyError);
    expect(error).toMatchObject({ code: 'BUDGET', issues: [{ rule: 'budget', value: '20000' }] });
    expect((error as StudyError).message).toMatch(/coolant loop’s volume against its flow \(thermal\.coolant\)/);
  });

  test('is kept to the evaluation', () => {
    const rates = vi.spyOn(PackSystem.prototype, 'rates');
    expect(() => simulateSession(stiff, { maxEvaluations: 777 })).toThrow(StudyError);
    expect(rates.mock.calls.length).toBe(777);
  });
});

test('same input, same bytes, whatever ran in between', () => {
  const bytes = () => referenceStudies().map(({ study }) => JSON.stringify(run(study).result));
  const first = bytes();
  run(largePack());
  expect(bytes()).toEqual(first);
});
