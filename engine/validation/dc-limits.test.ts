import { describe, expect, test } from 'vitest';
import type { SessionStudyInput } from '../src/index.ts';
import { bareStudy, constant, exampleStudies, readJson, run } from './studies.ts';

type Post = { name: string; kw: number; amperes: number; volts: number };

/**
 * DC supply: CCS 1000 V, 500 A; IEC 62196-1:2022 up to 1500 V, 800 A; SAE J1772 (2017) DC 1000 V, 400 A; CHAdeMO 500 V
 * with 125 A, 1.2: 500 V, 400 A, 2.0: 1000 V, 400 A; MCS (SAE J3271) 1250 V, 3000 A. Power classes (CharIN, memory) to 920 V.
 */
const posts: Post[] = [
  { name: 'class 50 kW', kw: 50, amperes: 125, volts: 500 },
  { name: 'class 150 kW', kw: 150, amperes: 300, volts: 920 },
  { name: 'class 250 kW', kw: 250, amperes: 500, volts: 920 },
  { name: 'class 350 kW', kw: 350, amperes: 500, volts: 920 },
  { name: 'CCS, no power limit', kw: 10_000, amperes: 500, volts: 1000 },
  { name: 'IEC 62196-1:2022', kw: 10_000, amperes: 800, volts: 1500 },
  { name: 'SAE J1772', kw: 10_000, amperes: 400, volts: 1000 },
  { name: 'CHAdeMO', kw: 10_000, amperes: 125, volts: 500 },
  { name: 'CHAdeMO 1.2', kw: 10_000, amperes: 400, volts: 500 },
  { name: 'MCS', kw: 10_000, amperes: 3000, volts: 1250 },
];

const packs = exampleStudies().filter(({ name }) =>
  ['vicuna-warm-arrival', 'vicuna-town-lfp', 'suri-full-power', 'suri-boost-at-500-v'].includes(name),
);

/** The pack, eight times as large and with hardly a limit of its own, so that the post is what binds. */
function on(post: Post, name: string): ReturnType<typeof run>['result'] {
  const input = readJson(`../../examples/${name}.json`) as SessionStudyInput;
  const study = bareStudy((s) => {
    Object.assign(s, input);
    s.inlet = { ...input.inlet, currentMaxA: 5000 };
    s.pack = { ...input.pack, parallel: 8 * input.pack.parallel, chargeCurrentMaxA: 20_000 };
    s.strategy = { ...input.strategy, taper: { shape: 'none' }, coldLimit: undefined, anodeMarginMv: undefined };
    s.station = { name: post.name, powerMaxKw: post.kw, currentMaxA: post.amperes, voltageMaxV: post.volts };
    s.boost = { powerMaxKw: 170 };
  });
  return run(study).result;
}

describe.each(posts)('$name', (post) => {
  let bound = false;

  test.each(packs)('keeps to it at every point: $name', ({ name }) => {
    const { series } = on(post, name);
    for (const row of series.tS.keys()) {
      // Rounding alone.
      expect(series.stationCurrentA[row]).toBeLessThan(post.amperes * (1 + 1e-9));
      expect(series.stationVoltageV[row]).toBeLessThan(post.volts * (1 + 1e-9));
      expect(series.stationVoltageV[row] * series.stationCurrentA[row]).toBeLessThan(1000 * post.kw * (1 + 1e-9));
    }
    bound ||= series.limit.some((code) => code.startsWith('station-') && code !== 'station-ramp');
  });

  test('is what binds', () => {
    expect(bound).toBe(true);
  });
});

describe('power classes (CharIN, memory): current at a voltage', () => {
  test.each([
    [150, 300, 500, 300],
    [150, 300, 920, 163],
    [250, 500, 500, 500],
    [250, 500, 920, 271],
    [350, 500, 700, 500],
    [350, 500, 920, 380],
  ])('%i kW, %i A at %i V: %i A', (kw, amperes, volts, expected) => {
    const study = bareStudy((s) => {
      s.pack.series = volts / 5;
      s.cell.ocv = { x: [0, 1], y: [5, 5 + 1e-12] };
      s.cell.r0Milliohm = 1e-9;
      s.station = { ...s.station, powerMaxKw: kw, currentMaxA: amperes, voltageMaxV: 921 };
    });
    // Given to the ampere, the rest cut off.
    expect(Math.floor(run(study).result.series.stationCurrentA.at(-1)! + 1e-6)).toBe(expected);
  });
});

describe('slew (IEC 61851-23:2014, memory)', () => {
  // At least 20 A/s: the default ramp is that, and the current follows it from plug-in until something else binds.
  test('rises by 20 A/s', () => {
    const study = bareStudy((s) => {
      delete s.station.rampAPerS;
      s.station.currentMaxA = 400;
      s.session.hotelW = 2000;
      s.session.maxMin = 1;
    });
    const { series, events } = run(study, { everyS: 0.1 }).result;
    // The hand-over's moment is found to 1e-7 s.
    series.tS.forEach((t, row) => expect(series.stationCurrentA[row]).toBeCloseTo(Math.min(20 * t, 400), 5));
    expect(events.find(({ event }) => event === 'limit:station-current')!.tS).toBeCloseTo(20, 6);
  });

  // Descending at least 100 A/s: a cut of the station's power takes effect at once.
  test('a power step down takes no time', () => {
    const study = bareStudy((s) => {
      s.strategy.taper = constant(400);
      s.station.powerSteps = [{ atMin: 5, powerKw: 20 }];
    });
    const { series } = run(study).result;
    const rows = [...series.tS.keys()].filter((row) => series.tS[row] === 300);
    expect(rows.map((row) => Math.round(series.packCurrentA[row]))).toEqual([400, 57]);
  });
});

test('23 CFR 680.106 and arithmetic: 10 → 80 % of 75 kWh at 150 kW is 21.0 min', () => {
  // 75 kWh at a constant 350 V: 214.2857 Ah.
  const study = bareStudy((s) => {
    s.cell.capacityAh = 75_000 / 350;
    s.cell.r0Milliohm = 1e-9;
    s.station.powerMaxKw = 150;
  });
  const { metrics } = run(study).result;
  expect(Math.abs(metrics.minutes10To80! - 21)).toBeLessThan(1e-4);
  expect(metrics.meanStationPower10To80Kw).toBeCloseTo(150, 6);
});

test('arithmetic: 10 → 80 % in 10 min is a mean of 4.2 C', () => {
  const study = bareStudy((s) => {
    s.cell.capacityAh = 100;
    s.strategy.taper = constant(4.2, 'C');
  });
  expect(Math.abs(run(study).result.metrics.minutes10To80! - 10)).toBeLessThan(1e-4);
});
