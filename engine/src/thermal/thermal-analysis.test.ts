import { expect, test } from 'vitest';
import { bareStudy, exampleStudies, steadyCoolant } from '../../validation/studies.ts';
import { thermalAnalysis } from './thermal-analysis.ts';

const C1 = 4e5;
const C2 = 5e4;

/** Two nodes of 4e5 and 5e4 J/K behind 1500 W/K, 900 W/K to coolant that enters at 20 °C. */
const twoNodes = (segments = 1) =>
  bareStudy((s) => {
    s.cell.massKg = (C1 + C2) / 1000 / 100;
    s.thermal.surfaceShare = C2 / (C1 + C2);
    s.thermal.coreToSurfaceWPerK = 1500;
    s.pack.segments = segments;
    steadyCoolant(s, 20, 900);
  });

test('thermalAnalysis: two nodes have time constants of 746.83 and 19.837 s, and are soaked after three of the slower (computed)', () => {
  const { timeConstantsS, heatSoakedMin } = thermalAnalysis(twoNodes(), 12_000);
  expect(timeConstantsS[0]).toBeCloseTo(746.83, 2);
  expect(timeConstantsS[1]).toBeCloseTo(19.837, 3);
  expect(heatSoakedMin).toBeCloseTo((3 * timeConstantsS[0]) / 60, 12);
});

test('thermalAnalysis: 12 kW settle two nodes at 41.333 and 33.333 °C on coolant of 20 °C (computed)', () => {
  const { steady, note } = thermalAnalysis(twoNodes(), 12_000);
  expect(steady!.hottestCoreC).toBeCloseTo(41.333333, 4);
  expect(steady!.hottestSurfaceC).toBeCloseTo(33.333333, 4);
  expect(steady!.coolantInC).toBeCloseTo(20, 4);
  // W = 1000 W/K carries 12 kW with a rise of 12 K.
  expect(steady!.coolantOutC).toBeCloseTo(32, 4);
  expect(steady!.chillerW).toBeCloseTo(12_000, 0);
  expect(note).toBeNull();
});

test('thermalAnalysis of five segments has the two time constants of one: coolant couples them downstream only', () => {
  const { timeConstantsS } = thermalAnalysis(twoNodes(5), 12_000);
  // A fifth of everything, and of UA = −1000·ln(0.1) W/K behind W = 1000 W/K; 1/τ are the roots of λ² − (a + b + c)·λ + a·c.
  const wall = 1000 * (1 - 0.1 ** (1 / 5));
  const [a, b, c] = [300 / 8e4, 300 / 1e4, wall / 1e4];
  const root = Math.sqrt((a + b + c) ** 2 - 4 * a * c);
  expect(timeConstantsS).toHaveLength(2);
  expect(timeConstantsS[0]).toBeCloseTo(2 / (a + b + c - root), 6);
  expect(timeConstantsS[1]).toBeCloseTo(2 / (a + b + c + root), 6);
});

test('thermalAnalysis says why a pack with no way out for its heat does not settle', () => {
  const closed = bareStudy();
  expect(thermalAnalysis(closed, 5000)).toMatchObject({ steady: null, loopTimeConstantS: null });
  expect(thermalAnalysis(closed, 5000).note).toMatch(/Nothing carries this heat away/);
});

test.each(exampleStudies())(
  'thermalAnalysis of $name: chiller and radiator carry away what the coolant takes up',
  ({ study }) => {
    const heatW = 4000;
    const { steady } = thermalAnalysis(study, heatW);
    if (steady === null) throw new Error('does not settle');
    // What the coolant takes out of the pack leaves by chiller and radiator; the surfaces stand between its ends and the core.
    const { flowLPerMin, densityKgPerM3, specificHeatJPerKgK } = study.thermal.coolant;
    const W = (flowLPerMin / 60_000) * densityKgPerM3 * specificHeatJPerKgK;
    expect(steady.chillerW + steady.radiatorW).toBeCloseTo(W * (steady.coolantOutC - steady.coolantInC), 1);
    expect(steady.hottestSurfaceC).toBeGreaterThan(steady.coolantOutC);
  },
);
