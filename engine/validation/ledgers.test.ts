import { describe, expect, test } from 'vitest';
import { exampleStudies, integral, largePack, referenceStudies, run } from './studies.ts';

/**
 * The remainders are the integration's own error, since stored energy is computed from z and heat from the states. The
 * contract is 0.1 % of each ledger's total; at the default accuracy some 1e-8 are seen, so 1e-6 tells a wrong sign or
 * a missing term of a watt.
 */
const REMAINDER = 1e-6;

const studies = [...exampleStudies(), ...referenceStudies(), { name: 'large 400-V-class pack', study: largePack() }];

describe.each(studies)('$name', ({ study }) => {
  const { energyLedger: energy, thermalLedger: heat, series } = run(study, { everyS: 2 }).result;

  test('energy: grid to cells', () => {
    const spent =
      energy.inletKwh +
      energy.boostLossKwh +
      energy.auxiliariesKwh +
      energy.busbarKwh +
      energy.ohmicKwh +
      energy.polarisationKwh +
      energy.reversibleKwh +
      energy.storedKwh +
      energy.rcPairsKwh;
    expect(Math.abs(energy.stationKwh - spent - energy.remainderKwh)).toBeLessThan(1e-12 * energy.stationKwh);
    expect(Math.abs(energy.remainderKwh)).toBeLessThan(REMAINDER * energy.stationKwh);
    expect(energy.gridKwh * study.station.rectifierEfficiency).toBeCloseTo(energy.stationKwh, 9);
    expect(energy.rectifierLossKwh).toBeCloseTo(energy.gridKwh - energy.stationKwh, 9);
  });

  test('heat: made, kept, carried away', () => {
    const kept = heat.coresKj + heat.surfacesKj + heat.loopKj;
    const away = heat.chillerKj + heat.radiatorKj + heat.ambientKj - heat.heaterKj;
    const total = Math.abs(heat.cellsKj) + heat.busbarKj + heat.heaterKj;
    expect(Math.abs(heat.cellsKj + heat.busbarKj - kept - away - heat.remainderKj)).toBeLessThan(1e-12 * total);
    expect(Math.abs(heat.remainderKj)).toBeLessThan(REMAINDER * total);
    // The cells' heat is what the energy ledger loses in them.
    const lost = 3600 * (energy.ohmicKwh + energy.polarisationKwh + energy.reversibleKwh);
    expect(Math.abs(heat.cellsKj - lost)).toBeLessThan(1e-9 * total);
  });

  test('its lines are the integrals of the series', () => {
    // Rows every 2 s and the trapezoid rule, whose own error on the square of a ramp is up to 3e-4 of these.
    const kwh = (column: readonly number[]) => integral(series.tS, column) / 3.6e6;
    const near = (value: number, ledger: number) =>
      expect(Math.abs(value - ledger)).toBeLessThan(5e-4 * Math.max(ledger, 0.1));
    const squared = (amperes: readonly number[], ohm: number) => kwh(amperes.map((current) => current * current * ohm));
    near(kwh(series.stationPowerKw.map((kw) => 1000 * kw)), energy.stationKwh);
    near(kwh(series.auxiliaryW), energy.auxiliariesKwh);
    near(squared(series.stationCurrentA, (study.inlet?.resistanceMilliohm ?? 0) / 1000), energy.inletKwh);
    near(squared(series.packCurrentA, study.pack.busbarMilliohm / 1000), energy.busbarKwh);
    near(kwh(series.chillerW), heat.chillerKj / 3600);
    near(kwh(series.radiatorW), heat.radiatorKj / 3600);
    near(kwh(series.heaterW), heat.heaterKj / 3600);
  });
});
