import { describe, expect, test } from 'vitest';
import { thermalAnalysis, type SessionStudyInput } from '../src/index.ts';
import { bareStudy, constant, NO_CURRENT, run, steadyCoolant } from './studies.ts';

/** C1 = 4e5, C2 = 5e4 J/K, G12 = 1500, G = 900 W/K (computed; any textbook). */
const twoNodes = (change: (study: SessionStudyInput) => void = () => {}) =>
  bareStudy((s) => {
    s.cell.massKg = 4;
    s.pack.structureJPerK = 5e4;
    s.thermal.surfaceShare = 0;
    s.thermal.coreToSurfaceWPerK = 1500;
    s.thermal.ambientWPerK = 900;
    s.session.ambientC = 20;
    change(s);
  });

describe('two nodes', () => {
  const inAir = twoNodes();
  const inCoolant = twoNodes((s) => {
    s.thermal.ambientWPerK = 0;
    steadyCoolant(s, 20, 900);
  });

  test.each([
    ['in air', inAir],
    ['in air, six segments', twoNodes((s) => (s.pack.segments = 6))],
    ['on coolant', inCoolant],
  ])('%s: time constants 746.83 and 19.837 s', (_, study) => {
    const { timeConstantsS, heatSoakedMin } = thermalAnalysis(study, 12_000);
    // Five digits are given.
    expect(Math.abs(timeConstantsS[0] / 746.83 - 1)).toBeLessThan(1e-5);
    expect(Math.abs(timeConstantsS[1] / 19.837 - 1)).toBeLessThan(3e-5);
    expect(heatSoakedMin).toBeCloseTo((3 * 746.83) / 60, 3);
  });

  test.each([
    ['in air', inAir],
    ['on coolant', inCoolant],
  ])('%s: 12 kW settle at 41.333333/33.333333 °C', (_, study) => {
    const { steady } = thermalAnalysis(study, 12_000);
    expect(steady!.hottestCoreC).toBeCloseTo(41.333333, 5);
    expect(steady!.hottestSurfaceC).toBeCloseTo(33.333333, 5);
  });
});

test('one node in air: τ = C/G', () => {
  const study = bareStudy((s) => (s.thermal.ambientWPerK = 800));
  expect(thermalAnalysis(study, 0).timeConstantsS).toEqual([expect.closeTo(5e5 / 800, 9)]);
});

test('a loop of its own: two heat capacities on one conductance share out with 1/τ = G·(1/C + 1/C_L), then with the air', () => {
  // No air and no radiator: the slowest mode goes nowhere. With air of 1 W/K the whole, 5.2e5 J/K, cools through it.
  const closed = bareStudy((s) => {
    s.thermal.coolant = { flowLPerMin: 15, densityKgPerM3: 1000, specificHeatJPerKgK: 4000, volumeL: 5 };
    s.thermal.plateWPerK = 500;
  });
  expect(thermalAnalysis(closed, 1000)).toMatchObject({ loopTimeConstantS: null, steady: null });
  expect(thermalAnalysis(closed, 1000).note).toMatch(/does not settle/);
  const aired = structuredClone(closed);
  aired.thermal.ambientWPerK = 1;
  // Loop and pack differ by G_air/G of their distance to the air: 0.3 %.
  expect(Math.abs(thermalAnalysis(aired, 0).loopTimeConstantS! / 5.2e5 - 1)).toBeLessThan(0.003);
});

/** A pack on a chiller, a radiator and the air, heated by 5 kW for as long as it takes. */
const cooled = (change: (study: SessionStudyInput) => void = () => {}) =>
  bareStudy((s) => {
    s.cell.massKg = 0.5;
    s.pack.segments = 4;
    s.pack.structureJPerK = 2e4;
    s.strategy.taper = constant(Math.sqrt(5000 / 0.06));
    s.thermal = {
      coreToSurfaceWPerK: 700,
      plateWPerK: 800,
      ambientWPerK: 8,
      coolant: { flowLPerMin: 12, volumeL: 6 },
      chiller: { ratedW: 4000, onC: 25, fullC: 40 },
      radiator: { parkedWPerK: 90, onC: 22, fullC: 36 },
    };
    s.session.ambientC = 18;
    s.session.maxMin = 1200;
    s.cell.capacityAh = 5000;
    s.pack.parallel = 2;
    s.cell.r0Milliohm = 1.2;
    change(s);
  });

test.each([
  ['chiller and radiator in their bands', cooled()],
  ['one node', cooled((s) => delete s.thermal.coreToSurfaceWPerK)],
  ['chiller held by its coldest coolant', cooled((s) => (s.thermal.chiller!.minCoolantC = 24))],
  ['hot air, radiator of no use', cooled((s) => (s.session.ambientC = 38))],
  ['no flow, air alone', cooled((s) => ((s.thermal.coolant.flowLPerMin = 0), (s.thermal.ambientWPerK = 150)))],
])('the steady state is where a run of 20 h ends: %s', (_, study) => {
  const { series } = run(study, { everyS: 600, rtol: 1e-9 }).result;
  const { steady } = thermalAnalysis(study, 5000);
  const last = <K extends keyof typeof series>(name: K) => series[name].at(-1) as number;
  // 20 h are over fifty times the slowest time constant; the loop's balance is solved to 1e-6 K.
  expect(Math.abs(last('hottestCoreC') - steady!.hottestCoreC)).toBeLessThan(1e-4);
  expect(Math.abs(last('hottestSurfaceC') - steady!.hottestSurfaceC)).toBeLessThan(1e-4);
  expect(Math.abs(last('coolantInC') - steady!.coolantInC)).toBeLessThan(study.thermal.coolant.flowLPerMin ? 1e-4 : 99);
  expect(Math.abs(last('chillerW') - steady!.chillerW)).toBeLessThan(0.5);
  expect(Math.abs(last('radiatorW') - steady!.radiatorW)).toBeLessThan(0.5);
});

test('time constants are those a run shows: a warm pack on coolant of steady temperature goes 95 % of the way in three of them', () => {
  const study = twoNodes((s) => {
    s.thermal.ambientWPerK = 0;
    steadyCoolant(s, 20, 900);
    s.strategy.hotDerate = NO_CURRENT;
    s.session.startTempC = 60;
    s.session.maxMin = 120;
  });
  const { series } = run(study, { everyS: 60, rtol: 1e-9 }).result;
  const { timeConstantsS } = thermalAnalysis(study, 0);
  const row = series.tS.findIndex((t) => t >= 1800);
  const next = series.tS.findIndex((t) => t >= 2400);
  const fall = Math.log((series.hottestCoreC[row] - 20) / (series.hottestCoreC[next] - 20));
  expect(600 / fall).toBeCloseTo(timeConstantsS[0], 2);
});

describe('ends, whatever the study', () => {
  test('400 segments in air are as fast as one', () => {
    const [one, many] = [1, 400].map((segments) =>
      thermalAnalysis(
        twoNodes((s) => (s.pack.segments = segments)),
        12_000,
      ),
    );
    many.timeConstantsS.forEach((seconds, i) => expect(seconds / one.timeConstantsS[i]).toBeCloseTo(1, 9));
    expect(many.steady!.hottestCoreC).toBeCloseTo(one.steady!.hottestCoreC, 6);
  });

  // The smallest numbers the schema takes: a time constant that rounds to nothing, not an iteration without end.
  test.each([1e-3, 1e-300, 5e-324])('a structure of %f J/K as the only surface', (joulePerKelvin) => {
    const study = twoNodes((s) => (s.pack.structureJPerK = joulePerKelvin));
    const { timeConstantsS } = thermalAnalysis(study, 12_000);
    expect(timeConstantsS.at(-1)).toBeLessThan(1e-5);
    expect(timeConstantsS.every((seconds) => seconds >= 0)).toBe(true);
  });
});
