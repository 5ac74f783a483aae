import { describe, expect, test } from 'vitest';
import type { SessionStudyInput } from '../src/index.ts';
import {
  bareStudy,
  constant,
  exampleStudies,
  integral,
  referenceStudies,
  rowAt,
  run as runAt,
  steadyCoolant,
} from './studies.ts';

/**
 * Every number here follows from the formula on its line (any textbook), and the engine gets there by running a study.
 * Equations are checked here, so the integration is exact to 1e-9; its default accuracy has its own checks.
 */
const run: typeof runAt = (study, options = {}) => runAt(study, { rtol: 1e-9, ...options });

/** Relative difference, and the tolerance of most checks: what the station's 4 ms ramp and the sources' last digit leave. */
const off = (value: number, expected: number) => Math.abs(value / expected - 1);
const TIGHT = 2e-5;

/** 12 kW of heat at a constant 400 A: 75 mΩ in the cells, or on the busbar. */
const heat12Kw = (study: SessionStudyInput, where: 'cells' | 'busbar' = 'cells') => {
  study.strategy.taper = constant(400);
  study.cell.r0Milliohm = where === 'cells' ? 0.75 : 1e-9;
  study.pack.busbarMilliohm = where === 'cells' ? 0 : 75;
};

describe('one node: C = 5e5 J/K, G = 800 W/K, 12 kW, sink and start at 20 °C', () => {
  const RISE = 14.157978557; // T(1800 s) = 34.157978557 °C
  const atHalfHour = (change: (study: SessionStudyInput) => void) => {
    const study = bareStudy((s) => {
      s.session.startTempC = 20;
      s.session.ambientC = 20;
      heat12Kw(s);
      change(s);
    });
    const { series } = run(study).result;
    return series.hottestCoreC[rowAt(series, 1800)] - 20;
  };

  test('sink is the air', () => {
    expect(
      off(
        atHalfHour((s) => (s.thermal.ambientWPerK = 800)),
        RISE,
      ),
    ).toBeLessThan(TIGHT);
  });

  test('sink is coolant that always enters at 20 °C', () => {
    expect(
      off(
        atHalfHour((s) => steadyCoolant(s, 20, 800)),
        RISE,
      ),
    ).toBeLessThan(TIGHT);
  });

  test('half of the sink each, heat from the busbar, a tenth of C in the structure, five segments in the air', () => {
    const rise = atHalfHour((s) => {
      heat12Kw(s, 'busbar');
      s.cell.massKg = 4.5;
      s.pack.structureJPerK = 5e4;
      s.thermal.ambientWPerK = 400;
      steadyCoolant(s, 20, 400);
    });
    expect(off(rise, RISE)).toBeLessThan(TIGHT);
    const segmented = atHalfHour((s) => {
      s.pack.segments = 5;
      s.thermal.ambientWPerK = 800;
    });
    expect(off(segmented, RISE)).toBeLessThan(TIGHT);
  });
});

describe('two nodes: C1 = 4e5, C2 = 5e4, G12 = 1500, G = 900, 12 kW into node 1, sink 20 °C, start 25/25 °C', () => {
  const EXPECTED = [
    [60, 26.40572, 23.841152],
    [300, 30.514211, 26.37734],
    [600, 34.093363, 28.678502],
    [1800, 39.881503, 32.3999],
  ];
  const twoNodes = (change: (study: SessionStudyInput) => void) =>
    run(
      bareStudy((s) => {
        heat12Kw(s);
        s.cell.massKg = 4;
        s.pack.structureJPerK = 5e4;
        s.thermal.surfaceShare = 0;
        s.thermal.coreToSurfaceWPerK = 1500;
        s.session.ambientC = 20;
        change(s);
      }),
    ).result.series;

  test.each([
    ['sink is the air', (s: SessionStudyInput) => void (s.thermal.ambientWPerK = 900)],
    ['sink is the coolant', (s: SessionStudyInput) => steadyCoolant(s, 20, 900)],
    [
      'four segments, node 2 partly of cell mass',
      (s: SessionStudyInput) => {
        s.pack.segments = 4;
        s.thermal.ambientWPerK = 900;
        s.thermal.surfaceShare = 0.05;
        s.cell.massKg = 4 / 0.95;
        s.pack.structureJPerK = 5e4 - (4e5 / 0.95) * 0.05;
      },
    ],
  ])('%s', (_, change) => {
    const series = twoNodes(change);
    for (const [tS, core, surface] of EXPECTED) {
      const row = rowAt(series, tS);
      expect(off(series.hottestCoreC[row] - 20, core - 20)).toBeLessThan(TIGHT);
      expect(off(series.hottestSurfaceC[row] - 20, surface - 20)).toBeLessThan(TIGHT);
    }
  });
});

test('RC step: R0 = 20 mΩ, R1 = 10 mΩ, τ = 20 s, 5 A', () => {
  const study = bareStudy((s) => {
    s.cell.r0Milliohm = 20;
    s.cell.rcPairs = [{ rMilliohm: 10, tauS: 20 }];
    s.pack.parallel = 2;
    s.pack.segments = 4;
    s.strategy.taper = constant(10);
    s.session.maxMin = 2;
  });
  const { series, energyLedger: ledger } = run(study, { everyS: 5 }).result;
  const overvoltage = (row: number) => series.highestCellV[row] - 3.5;
  // The second row is the end of the ramp after 0.1 ms.
  const values = [
    [series.tS[1], 0.1],
    [10, 0.119673467],
    [20, 0.131606028],
    [60, 0.147510647],
  ] as const;
  for (const [tS, volts] of values) expect(off(overvoltage(rowAt(series, tS)), volts)).toBeLessThan(TIGHT);
  const packVolts = series.packVoltageV[rowAt(series, 60)];
  expect(off(packVolts - 350, 100 * 0.147510647)).toBeLessThan(TIGHT);
  // Heat of the pairs over t = 120 s: ∫v²/R dt with v = I·R·(1 − exp(−t/τ)); what they hold at the end is τ·v²/2R.
  const left = Math.exp(-120 / 20);
  const [watts, held] = [200 * 25 * 10e-3, 20 / 2];
  const heat = watts * (120 - 2 * 20 * (1 - left) + held * (1 - left ** 2));
  expect(off(ledger.polarisationKwh, heat / 3.6e6)).toBeLessThan(TIGHT);
  expect(off(ledger.rcPairsKwh, (watts * held * (1 - left) ** 2) / 3.6e6)).toBeLessThan(TIGHT);
  expect(off(ledger.ohmicKwh, (2 * watts * 120) / 3.6e6)).toBeLessThan(TIGHT);
});

test('CV phase on U = a + b·z: I = I0·exp(−t/τ), τ = R·Q/b', () => {
  // R = 50 mΩ, Q = 10800 C, a = 3.4 V, b = 0.8 V, 3 A, ceiling 4.2 V: the switch at z = 0.8125; 3 → 0.15 A takes
  // 2022.12 s (τ = 675 s) and moves Δz = 0.178125.
  const study = bareStudy((s) => {
    s.cell.capacityAh = 3;
    s.cell.ocv = { x: [0, 1], y: [3.4, 4.2] };
    s.cell.r0Milliohm = 50;
    s.strategy.cellVoltageCeilingV = 4.2;
    s.strategy.taper = constant(3);
    s.strategy.cutoffA = 0.15;
    s.session.startSoc = 0.5;
    s.session.maxMin = 200;
  });
  const { metrics, series, events } = run(study).result;
  const from = events.find(({ event }) => event === 'limit:cell-voltage')!.tS;
  expect(metrics.endReason).toBe('cutoff');
  expect(off(series.soc[rowAt(series, from)], 0.8125)).toBeLessThan(1e-7);
  expect(off(metrics.endMin * 60 - from, 2022.12)).toBeLessThan(TIGHT);
  expect(off(metrics.endSoc - 0.8125, 0.178125)).toBeLessThan(TIGHT);
  for (const row of series.tS.keys()) {
    if (series.tS[row] < from) continue;
    const current = 3 * Math.exp(-(series.tS[row] - from) / 675);
    expect(off(series.packCurrentA[row], current)).toBeLessThan(TIGHT);
    expect(series.highestCellV[row]).toBeCloseTo(4.2, 9);
  }
});

describe('constant power: U = 350 V, R = 60 mΩ, 150 kW: 401.00487 A, 374.06029 V, 9648.294 W lost', () => {
  const check = (study: ReturnType<typeof bareStudy>, auxiliaryW: number) => {
    const { series, energyLedger } = run(study).result;
    const row = rowAt(series, 600);
    expect(off(series.packCurrentA[row], 401.00487)).toBeLessThan(1e-8);
    expect(off(series.packVoltageV[row], 374.06029)).toBeLessThan(1e-8);
    expect(off(series.stationPowerKw[row], 150 + auxiliaryW / 1000)).toBeLessThan(1e-9);
    expect(off(series.stationCurrentA[row], 401.00487 + auxiliaryW / 374.06029)).toBeLessThan(1e-8);
    expect(off(energyLedger.ohmicKwh, 9.648294 / 2)).toBeLessThan(TIGHT);
    expect(off(energyLedger.gridKwh, (150 + auxiliaryW / 1000) / 2 / 0.95)).toBeLessThan(TIGHT);
  };

  test('as a taper in kW, auxiliaries on top', () => {
    const study = bareStudy((s) => {
      s.strategy.taper = constant(150, 'kW');
      s.session.hotelW = 700;
      s.thermal.pumpW = 300;
    });
    check(study, 1000);
  });

  test('as the station’s power, auxiliaries out of it', () => {
    const study = bareStudy((s) => {
      s.station.powerMaxKw = 152.5;
      s.session.hotelW = 2500;
    });
    check(study, 2500);
  });

  test('as the station’s power behind an inlet of 1 mΩ', () => {
    const inlet = 401.00487 ** 2 * 1e-3;
    const study = bareStudy((s) => {
      s.inlet = { resistanceMilliohm: 1 };
      s.station.powerMaxKw = 150 + inlet / 1000;
    });
    const { series, energyLedger } = run(study).result;
    expect(off(series.packCurrentA[rowAt(series, 600)], 401.00487)).toBeLessThan(1e-8);
    expect(off(energyLedger.inletKwh, inlet / 2000)).toBeLessThan(TIGHT);
  });

  test('as the boost converter’s power: 500 V station, 97 %', () => {
    const study = bareStudy((s) => {
      s.pack.series = 200;
      s.cell.r0Milliohm = 0.3;
      s.station.voltageMaxV = 500;
      s.boost = { powerMaxKw: 300, efficiency: 0.97 };
      s.strategy.taper = constant(150 * 2, 'kW');
    });
    // Twice the voltage on the same resistance: A = 700 V, R = 60 mΩ, 300 kW: I from the same quadratic.
    const current = (-700 + Math.sqrt(700 ** 2 + 4 * 0.06 * 300e3)) / (2 * 0.06);
    const { series, energyLedger } = run(study).result;
    const row = rowAt(series, 600);
    expect(off(series.packCurrentA[row], current)).toBeLessThan(1e-9);
    expect(series.stationVoltageV[row]).toBe(500);
    expect(off(series.stationCurrentA[row], 300e3 / 0.97 / 500)).toBeLessThan(1e-9);
    expect(off(energyLedger.boostLossKwh, 150 * (1 / 0.97 - 1))).toBeLessThan(TIGHT);
  });
});

describe('slab: half thickness 13.5 mm, k = 0.8 W/m/K, 5e4 W/m³ (Incropera eq. 3.47)', () => {
  // A lumped core stands for one temperature of the slab. With core-to-surface 3·k·A/L it stands for the mean
  // (Tmean − Tsurf = q·L²/3k = 3.797 K), with 2·k·A/L for the middle (Tmax − Tsurf = q·L²/2k = 5.695 K). What is
  // checked is that the engine's core then stands that far above its surface once settled; the slab's own
  // transient is beyond two nodes.
  const L = 0.0135;
  const area = 12_000 / (5e4 * L);
  test.each([
    ['mean', 3, 3.797],
    ['middle', 2, 5.695],
  ])('%s', (_, factor, kelvin) => {
    const study = bareStudy((s) => {
      heat12Kw(s);
      s.cell.massKg = 0.5;
      s.thermal.coreToSurfaceWPerK = (factor * 0.8 * area) / L;
      s.thermal.ambientWPerK = 900;
    });
    const { series } = run(study).result;
    const across = series.hottestCoreC.at(-1)! - series.hottestSurfaceC.at(-1)!;
    // Three decimals are given.
    expect(Math.abs(across - kelvin)).toBeLessThan(6e-4);
  });
});

describe('conservation', () => {
  // Rows every second and the trapezoid rule, whose own error (h²/12 of the change of slope) is up to 3e-5 of these sums.
  const RULE = 5e-5;
  const studies = [...referenceStudies(), ...exampleStudies()];

  test.each(studies)('$name: charge, and the heat that the coolant carries', ({ study }) => {
    const { series, metrics, thermalLedger: heat } = runAt(study, { everyS: 1 }).result;
    // 3600·Q·Δz = ∫I dt.
    const [low, high] = study.pack.socWindow;
    const dz = (high - low) * (metrics.endSoc - study.session.startSoc);
    const coulomb = 3600 * study.pack.parallel * study.cell.capacityAh * dz;
    expect(off(integral(series.tS, series.packCurrentA), coulomb)).toBeLessThan(RULE);
    // ∫W·(out − in) dt is what the walls gave, and what loop, chiller, radiator and heater account for.
    const { flowLPerMin, densityKgPerM3, specificHeatJPerKgK } = study.thermal.coolant;
    const W = (flowLPerMin / 60_000) * densityKgPerM3 * specificHeatJPerKgK;
    const watts = series.coolantOutC.map((out, i) => W * (out - series.coolantInC[i]));
    const carried = integral(series.tS, watts) / 1000;
    const walls = heat.cellsKj + heat.busbarKj - heat.coresKj - heat.surfacesKj - heat.ambientKj;
    const moved = heat.loopKj + heat.chillerKj + heat.radiatorKj - heat.heaterKj;
    const scale = Math.abs(heat.cellsKj) + heat.busbarKj + heat.heaterKj;
    expect(Math.abs(carried - walls)).toBeLessThan(RULE * scale);
    expect(Math.abs(carried - moved)).toBeLessThan(RULE * scale);
  });
});
