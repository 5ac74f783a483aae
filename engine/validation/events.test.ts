import { describe, expect, test } from 'vitest';
import type { SessionStudyInput } from '../src/index.ts';
import { bareStudy, constant, exampleStudies, largePack, referenceStudies, run, steadyCoolant } from './studies.ts';

/** Each event stops exactly there: soc and voltage to what 1e-7 s of the session moves, minutes to the last digit. */

const rowsOf = (series: { tS: number[] }, tS: number) => [...series.tS.keys()].filter((row) => series.tS[row] === tS);
const studies = [...referenceStudies(), ...exampleStudies(), { name: 'large 400-V-class pack', study: largePack() }];

test.each(studies)('ledges, power steps, voltage-ledges and the end of $name', ({ study }) => {
  const { events, series, metrics } = run(study).result;
  const { taper } = study.strategy;
  for (const { tS, event } of events) {
    const [kind, what] = event.split(':');
    const before: number | undefined = rowsOf(series, tS)[0];
    if (kind === 'power') expect(study.station.powerSteps!.map(({ atMin }) => atMin * 60)).toContain(tS);
    if (kind === 'ledge' && taper.shape === 'ledges') {
      const { fromSoc } = taper.steps[Number(what) - 1];
      // A ledge that does not bind moves no current and has no row of its own: its neighbours stand on either side.
      const after = series.tS.findIndex((t) => t > tS);
      const within = (series.soc[after] - series.soc[after - 1]) * (before === undefined ? 1 : 0) + 1e-9;
      expect(Math.abs(series.soc[before ?? after - 1] - fromSoc)).toBeLessThan(within);
    }
    // A move may chain at once, past voltages that the new current's drop has passed already.
    if (kind === 'ledge' && taper.shape === 'voltage-ledges' && before !== undefined)
      expect(series.highestCellV[before] - taper.steps[Number(what) - 2].untilCellV!).toBeGreaterThan(-1.1e-9);
    if (kind === 'end' && what === 'maxMin') expect(tS).toBe(study.session.maxMin * 60);
    if (kind === 'end' && what === 'target')
      expect(Math.abs(series.soc.at(-1)! - study.session.targetSoc)).toBeLessThan(1e-9);
    if (kind === 'end' && what === 'cutoff')
      expect(Math.abs(series.packCurrentA.at(-1)! - study.strategy.cutoffA)).toBeLessThan(1e-6);
  }
  expect(events.at(-1)!.tS).toBe(series.tS.at(-1));
  expect(metrics.endMin * 60).toBeCloseTo(series.tS.at(-1)!, 9);
});

/** 100 Ah at constant currents: every moment has a closed form (any textbook: t = Q·Δz/I). */
const plain = (change: (study: SessionStudyInput) => void) =>
  bareStudy((s) => {
    s.cell.capacityAh = 100;
    s.session.maxMin = 200;
    change(s);
  });
/** The ramp of 100 kA/s delays a charge by half the time it takes to the first current. */
const RAMP_S = (amperes: number) => amperes / 100_000 / 2;

test('ledges: 200, 100 and 50 A from 0, 30 and 60 %', () => {
  const study = plain((s) => {
    s.strategy.taper = {
      shape: 'ledges',
      unit: 'A',
      steps: [
        { fromSoc: 0, value: 200 },
        { fromSoc: 0.3, value: 100 },
        { fromSoc: 0.6, value: 50 },
      ],
    };
  });
  const { events, series, metrics } = run(study).result;
  const at = (name: string) => events.find(({ event }) => event === name)!.tS;
  expect(at('ledge:2')).toBeCloseTo(540 + RAMP_S(200), 6);
  expect(at('ledge:3')).toBeCloseTo(540 + 1080 + RAMP_S(200), 6);
  expect(metrics.endMin * 60).toBeCloseTo(540 + 1080 + 2880 + RAMP_S(200), 6);
  expect(metrics.minutesToSoc['50']! * 60).toBeCloseTo(540 + 720 + RAMP_S(200), 6);
  // Both sides of the jump stand there, and the rows of the 10 s grid before and after.
  const rows = rowsOf(series, at('ledge:2'));
  expect(rows.map((row) => series.packCurrentA[row])).toEqual([expect.closeTo(200, 9), expect.closeTo(100, 9)]);
  expect([series.tS[rows[0] - 1], series.tS[rows[1] + 1]]).toEqual([540, 550]);
});

test('a start on a ledge’s edge stands on that ledge, without an event', () => {
  const study = plain((s) => {
    s.strategy.taper = {
      shape: 'ledges',
      unit: 'A',
      steps: [
        { fromSoc: 0, value: 200 },
        { fromSoc: 0.3, value: 100 },
      ],
    };
    s.session.startSoc = 0.3;
    s.session.targetSoc = 0.4;
  });
  const { events, metrics } = run(study).result;
  expect(events.map(({ event }) => event)).toEqual(['limit:station-ramp', 'limit:taper', 'end:target']);
  expect(metrics.endMin * 60).toBeCloseTo(360 + RAMP_S(100), 6);
});

test('voltage-ledges chain: a move whose new current still stands above the next voltage goes on at once', () => {
  // 3.4 + 0.8·z + I·1 mΩ: 200 A reaches 3.9 V at z = 0.375; at 190 A the cell then stands at 3.89 V, above 3.85, and at
  // 50 A at 3.75 V, which rises to 3.95 V at z = 0.625.
  const study = plain((s) => {
    s.cell.ocv = { x: [0, 1], y: [3.4, 4.2] };
    s.cell.r0Milliohm = 1;
    s.strategy.taper = {
      shape: 'voltage-ledges',
      unit: 'A',
      steps: [
        { untilCellV: 3.9, value: 200 },
        { untilCellV: 3.85, value: 190 },
        { untilCellV: 3.95, value: 50 },
        { value: 10 },
      ],
    };
  });
  const { events, series } = run(study).result;
  const ledges = events.filter(({ event }) => event.startsWith('ledge:'));
  expect(ledges.map(({ event }) => event)).toEqual(['ledge:2', 'ledge:3', 'ledge:4']);
  const first = 0.375 * 1800 + RAMP_S(200);
  expect(ledges.map(({ tS }) => tS)).toEqual([
    expect.closeTo(first, 5),
    expect.closeTo(first, 5),
    expect.closeTo(first + (0.625 - 0.375) * 7200, 3),
  ]);
  const last = rowsOf(series, ledges[2].tS)[0];
  expect(series.highestCellV[last]).toBeCloseTo(3.95, 8);
});

test('power steps at their minute, on the grid and off it, one row on each side', () => {
  const study = plain((s) => {
    s.strategy.taper = constant(100);
    s.station.powerSteps = [
      { atMin: 2, powerKw: 20 },
      { atMin: 3.123456, powerKw: 10 },
      { atMin: 7, powerKw: 100 },
    ];
    s.session.maxMin = 10.01;
  });
  const { events, series } = run(study).result;
  expect(events.filter(({ event }) => event.startsWith('power:'))).toEqual([
    { tS: 120, event: 'power:20' },
    { tS: 3.123456 * 60, event: 'power:10' },
    { tS: 420, event: 'power:100' },
  ]);
  for (const tS of [120, 3.123456 * 60, 420]) expect(rowsOf(series, tS)).toHaveLength(2);
  expect(series.tS.at(-1)).toBe(10.01 * 60);
  const grid = new Set(series.tS.filter((t) => Number.isInteger(t / 10)));
  expect([...grid]).toEqual(Array.from({ length: 61 }, (_, i) => 10 * i));
});

describe('ends', () => {
  test('target: at its soc, and the moment is Q·Δz/I', () => {
    const study = plain((s) => {
      s.strategy.taper = constant(120);
      s.session.startSoc = 0.2;
      s.session.targetSoc = 0.73;
    });
    const { metrics } = run(study).result;
    expect(metrics).toMatchObject({ endReason: 'target', endSoc: 0.73 });
    expect(metrics.endMin * 60).toBeCloseTo((0.53 * 360_000) / 120 + RAMP_S(120), 6);
  });

  test('cutoff: a taper falling from 200 to 0 A over all soc meets 20 A at 90 %', () => {
    // I = 200·(1 − z): t = −(Q/200)·ln(0.1).
    const study = plain((s) => {
      s.strategy.cutoffA = 20;
      s.strategy.taper = {
        shape: 'slope',
        unit: 'A',
        points: [
          { soc: 0, value: 200 },
          { soc: 1, value: 0 },
        ],
      };
    });
    const { metrics } = run(study, { rtol: 1e-9 }).result;
    expect(metrics.endReason).toBe('cutoff');
    expect(metrics.endSoc).toBeCloseTo(0.9, 8);
    expect(metrics.endMin * 60).toBeCloseTo(1800 * Math.log(10) + RAMP_S(200), 3);
  });

  test('maxMin at its minute; target at the start ends at once, with one row', () => {
    const late = run(plain((s) => ((s.session.maxMin = 12.3456), (s.strategy.taper = constant(1))))).result;
    expect(late.metrics).toMatchObject({ endReason: 'maxMin', endMin: 12.3456 });
    const full = run(plain((s) => ((s.session.startSoc = 0.8), (s.session.targetSoc = 0.8)))).result;
    expect(full.metrics).toMatchObject({ endReason: 'target', endMin: 0 });
    expect(full.series.tS).toEqual([0]);
  });
});

describe('a derating takes over, or hands back, where its band begins, though before it equals the limit in force', () => {
  const when = (study: ReturnType<typeof plain>, event: string) =>
    run(study, { rtol: 1e-9 }).result.events.find((one) => one.event === event)!.tS;

  test('hot from pack-current: 12 kW into 5e5 J/K are 24 mK/s, 5 K after 208.3 s', () => {
    const study = plain((s) => {
      s.pack.chargeCurrentMaxA = 400;
      s.cell.r0Milliohm = 0.75;
      s.strategy.hotDerate = { fromC: 30, toC: 40 };
    });
    expect(when(study, 'limit:hot')).toBeCloseTo(5 / 0.024, 1);
    // To the moment: the ramp's 4 ms deliver a third of the heat of their time.
    expect(when(study, 'limit:hot')).toBeCloseTo(5 / 0.024 + 0.004 * (2 / 3), 4);
  });

  test('pack-current from hot: 60 °C on coolant of 20 °C pass 50 °C after τ·ln(40/30)', () => {
    const study = bareStudy((s) => {
      s.pack.chargeCurrentMaxA = 400;
      s.cell.r0Milliohm = 1e-9;
      s.session.startTempC = 60;
      steadyCoolant(s, 20, 800);
      s.strategy.hotDerate = { fromC: 50, toC: 70 };
    });
    expect(when(study, 'limit:pack-current')).toBeCloseTo((5e5 / 800) * Math.log(40 / 30), 4);
  });

  test('inlet from station-current, both of 400 A: 160 W on 4 W/K and 500 J/K pass 20 K after τ·ln(2)', () => {
    const study = bareStudy((s) => {
      s.station.currentMaxA = 400;
      s.inlet = { resistanceMilliohm: 1, currentMaxA: 400, derateFromC: 45, derateToC: 65 };
    });
    expect(when(study, 'limit:inlet')).toBeCloseTo(125 * Math.log(2) + 0.004 * (2 / 3), 4);
  });
});
