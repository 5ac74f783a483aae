import { describe, expect, test } from 'vitest';
import { bareStudy, constant, run, rowAt } from './studies.ts';

/** Bernardi, Pawlikowski & Newman 1985: q = I·(V − U) + I·T·dU/dT; here the second term. */

/** One cell of +0.1 mV/K whose mass holds 25 °C (298.15 K), 1000 s. */
const cellWith = (mvPerK: number) =>
  bareStudy((s) => {
    s.pack.series = 1;
    s.cell.massKg = 200;
    s.cell.specificHeatJPerKgK = 5000;
    s.cell.r0Milliohm = 1e-6;
    s.cell.entropicMvPerK = { x: [0, 1], y: [mvPerK, mvPerK] };
    s.strategy.taper = constant(100);
    s.session.maxMin = 1000 / 60;
  });

describe('100 A, 298.15 K, +0.1 mV/K: ±2.98 W', () => {
  test('released on charge', () => {
    const { energyLedger, thermalLedger, series } = run(cellWith(0.1)).result;
    // 2.9815 W: three digits are given.
    expect(Math.abs(energyLedger.reversibleKwh * 3600 - 2.98)).toBeLessThan(0.005);
    expect(thermalLedger.cellsKj).toBeCloseTo(2.98, 2);
    expect(series.hottestCoreC[rowAt(series, 1000)] - 25).toBeCloseTo(2981.5 / 1e6, 5);
  });

  test('of negative sign, absorbed on charge', () => {
    const { energyLedger, series } = run(cellWith(-0.1)).result;
    expect(Math.abs(energyLedger.reversibleKwh * 3600 + 2.98)).toBeLessThan(0.005);
    expect(series.hottestCoreC.at(-1)).toBeLessThan(25);
  });

  test('absorbed on discharge: a station that gives next to nothing leaves 100 A of auxiliaries to the pack', () => {
    const study = cellWith(0.1);
    study.station.currentMaxA = 1e-6;
    study.session.hotelW = 350;
    study.session.startSoc = 0.5;
    const { energyLedger, series } = run(study).result;
    expect(series.packCurrentA.at(-1)).toBeCloseTo(-100, 3);
    expect(Math.abs(energyLedger.reversibleKwh * 3600 + 2.98)).toBeLessThan(0.005);
    expect(series.hottestCoreC.at(-1)).toBeLessThan(25);
  });
});

test('LCO/graphite: ΔS = −29.78 J/K/mol is −0.3086 mV/K, 8.879 kJ/mol both ways (Huang et al., J. Power Sources 156 (2006) 541)', () => {
  // A mole of electrons is F = 96485.33 C; dU/dT = ΔS/F. Charging it takes up T·|ΔS|, within the last digit of 8.879;
  // the paper's 8.874 kJ/mol on discharge differs by 0.06 %.
  const F = 96485.33;
  const mvPerK = (1000 * -29.78) / F;
  expect(mvPerK).toBeCloseTo(-0.3086, 4);
  const study = bareStudy((s) => {
    s.pack.series = 1;
    s.cell.capacityAh = F / 3600;
    s.cell.massKg = 200;
    s.cell.specificHeatJPerKgK = 5000;
    s.cell.r0Milliohm = 1e-6;
    s.cell.entropicMvPerK = { x: [0, 1], y: [mvPerK, mvPerK] };
    s.strategy.taper = constant(1, 'C');
    s.session.maxMin = 61;
  });
  const { metrics, energyLedger, thermalLedger } = run(study).result;
  expect(metrics.endReason).toBe('target');
  expect(Math.abs(-thermalLedger.cellsKj - 8.879)).toBeLessThan(6e-4);
  expect(Math.abs(-energyLedger.reversibleKwh * 3600 - 8.874)).toBeLessThan(0.001 * 8.874);
  // What the cells take up from their surroundings is stored: U grows by that much in the ledger.
  expect((energyLedger.storedKwh - energyLedger.stationKwh) * 3600).toBeCloseTo(8.879, 2);
});
