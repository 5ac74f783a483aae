import { describe, expect, test } from 'vitest';
import { partSchemas, type SessionStudyInput } from '../src/index.ts';
import { bareStudy, NO_CURRENT, rowAt, run } from './studies.ts';

/** Heat alone: no current flows, and a session does not end for it. */
const still = (change: (study: SessionStudyInput) => void) =>
  bareStudy((s) => {
    s.strategy.hotDerate = NO_CURRENT;
    change(s);
  });

/** Share of the way to the wall's temperature that coolant comes, with W = 1000 W/K: ε of the engine's first row. */
function effectiveness(ntu: number, segments: number): number {
  const study = still((s) => {
    s.pack.segments = segments;
    s.thermal.coolant = { flowLPerMin: 15, densityKgPerM3: 1000, specificHeatJPerKgK: 4000, volumeL: 5 };
    s.thermal.plateWPerK = 1000 * ntu;
    s.session.startTempC = 60;
    s.session.coolantStartC = 10;
    s.session.maxMin = 0.01;
  });
  const { series } = run(study).result;
  return (series.coolantOutC[0] - series.coolantInC[0]) / (60 - series.coolantInC[0]);
}

// Incropera & DeWitt eq. 11.35a: ε = 1 − exp(−NTU), six decimals. An isothermal wall may be cut into segments at will.
describe('stream along an isothermal wall', () => {
  test.each([
    [0.25, 0.221199],
    [0.5, 0.393469],
    [1, 0.632121],
    [2, 0.864665],
    [3, 0.950213],
  ])('NTU %f', (ntu, expected) => {
    for (const segments of [1, 3, 12]) expect(Math.abs(effectiveness(ntu, segments) - expected)).toBeLessThan(6e-7);
  });
});

test('10 L/min, 1065 kg/m³, 3358 J/kg/K: W = 596.045 W/K; UA 600: ε = 0.634554, effective 378.222 W/K (computed)', () => {
  // A pack of 5e5 J/K at 45 °C on a loop of 20 °C: the first heat into the loop, which warms by W·(out − θ_L)/C_L.
  const study = still((s) => {
    s.thermal.coolant = { flowLPerMin: 10, densityKgPerM3: 1065, specificHeatJPerKgK: 3358, volumeL: 1000 };
    s.thermal.plateWPerK = 600;
    s.session.startTempC = 45;
    s.session.coolantStartC = 20;
    s.session.maxMin = 1;
  });
  const { series, thermalLedger } = run(study, { everyS: 1, rtol: 1e-10 }).result;
  expect(Math.abs((series.coolantOutC[0] - 20) / 25 - 0.634554)).toBeLessThan(6e-7);
  // Two heat capacities on one conductance: ΔT falls with 1/τ = G·(1/C + 1/C_L); G from the fall over a minute.
  const loop = 1065 * 3358;
  const gap = (row: number) => series.hottestCoreC[row] - series.loopC[row];
  const G = Math.log(gap(0) / gap(rowAt(series, 60))) / 60 / (1 / 5e5 + 1 / loop);
  expect(Math.abs(G / 378.222 - 1)).toBeLessThan(3e-6);
  // W from the heat the loop took per kelvin it warmed and the volume's turnover: W·(out − θ_L) = C_L·dθ_L/dt.
  const rise = series.loopC[rowAt(series, 1)] - series.loopC[0];
  const W = (loop * rise) / (0.5 * (gap(0) + gap(rowAt(series, 1))) * 0.634554);
  expect(Math.abs(W / 596.045 - 1)).toBeLessThan(3e-6);
  expect(Math.abs(thermalLedger.loopKj + thermalLedger.coresKj)).toBeLessThan(1e-6);
});

test('Çengel & Ghajar Ex. 8-1 (memory): 0.3 kg/s of water, 15 → 115 °C in 61 m of tube at 120 °C, D 25 mm, h 800', () => {
  // cp 4187 J/kg/K as the book has it (memory). The exchange is linear: all temperatures stand 50 K lower here, inside
  // the study's ranges. The book rounds 61 m to the metre, which leaves 0.2 K at the outlet.
  const study = still((s) => {
    s.thermal.coolant = { flowLPerMin: 18, densityKgPerM3: 1000, specificHeatJPerKgK: 4187, volumeL: 5 };
    s.thermal.plateWPerK = 800 * Math.PI * 0.025 * 61;
    s.pack.segments = 7;
    s.session.startTempC = 70;
    s.session.coolantStartC = -35;
    s.session.maxMin = 0.01;
  });
  expect(Math.abs(run(study).result.series.coolantOutC[0] - 65)).toBeLessThan(0.2);
});

/** Temperature of a small sphere after `seconds` in a gas 80 K warmer, as a share of the gap left. */
function sphereGap(body: { D: number; rho: number; cp: number; h: number }, seconds: number): number {
  const study = still((s) => {
    s.pack.series = 1;
    s.station.voltageMaxV = 100;
    s.cell.massKg = (body.rho * Math.PI * body.D ** 3) / 6;
    s.cell.specificHeatJPerKgK = body.cp;
    s.thermal.ambientWPerK = body.h * Math.PI * body.D ** 2;
    s.session.startTempC = -20;
    s.session.ambientC = 60;
    s.session.maxMin = seconds / 60;
  });
  const { series } = run(study, { rtol: 1e-9 }).result;
  return (60 - series.hottestSurfaceC.at(-1)!) / 80;
}

describe('lumped capacitance', () => {
  test('Incropera & DeWitt Ex. 5.1: junction of 0.706 mm in a 200 °C gas goes from 25 to 199 °C in 5.165 s', () => {
    // 25 → 199 of 200 °C leaves 1/175 of the gap. The diameter's three digits leave 0.1 % of the time: 0.6 % of the gap.
    const left = sphereGap({ D: 0.706e-3, rho: 8500, cp: 400, h: 400 }, 5.165);
    expect(Math.abs(left * 175 - 1)).toBeLessThan(0.006);
  });

  test('Çengel Ex. 4-1: bead of 1 mm reaches 99 % of a step after 9.94 s (book: 10 s)', () => {
    // 9.94 s to three digits: 0.05 % of ln(100)·τ, 0.25 % of the gap.
    const left = sphereGap({ D: 1e-3, rho: 8500, cp: 320, h: 210 }, 9.94);
    expect(Math.abs(left * 100 - 1)).toBeLessThan(0.0025);
  });
});

describe('defaults', () => {
  const part = partSchemas.thermal.parse({ plateWPerK: 1, ambientWPerK: 1, coolant: { flowLPerMin: 1, volumeL: 1 } });

  test.each([
    ['20 °C', 1079 * 3280],
    ['40 °C', 1067 * 3360],
  ])('coolant’s ρ·cp is that of 50/50 glycol–water at %s (ASHRAE Fundamentals, memory)', (_, expected) => {
    // Mass and volume per cent differ by some 3 % of ρ·cp.
    const { densityKgPerM3, specificHeatJPerKgK } = part.coolant;
    expect(Math.abs((densityKgPerM3 * specificHeatJPerKgK) / expected - 1)).toBeLessThan(0.03);
  });

  test('cell’s specific heat lies where the literature has it, 800 to 1100 J/kg/K (Steinhardt et al. 2022)', () => {
    const cell = bareStudy((s) => delete s.cell.specificHeatJPerKgK).cell;
    expect(cell.specificHeatJPerKgK).toBeGreaterThanOrEqual(800);
    expect(cell.specificHeatJPerKgK).toBeLessThanOrEqual(1100);
  });
});
