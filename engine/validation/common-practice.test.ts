import { describe, expect, test } from 'vitest';
import { PackSystem } from '../src/pack/pack-system.ts';
import type { SessionStudy } from '../src/index.ts';
import { integral, largePack, run } from './studies.ts';

/**
 * Common practice, no published source: a large 400-V-class pack, 105 kWh usable of 111 installed, full near 427 V under
 * charge, on a 500 A station at 27 °C, from empty with a warm pack.
 *
 * Its free parameters, in `large-400-v-pack.json`, were chosen on: the two energies and the full voltage (cells in
 * series, capacity, window, ceiling); 366 V near 0 %, 195 kW between 28 and 37 %, near 400 V at 50 % and near 410 V
 * between 55 and 75 % (voltage table and resistances); the ledges' edge at 37 %, 400 A at 40 %, 144 kW at 50 %, 82 kW at
 * 80 % and 28 kW at 98 %, with steps between them that keep the pack near 410 V (taper). Those are tests of the
 * parameters.
 *
 * Kept as the check, and following from the model: the soc at 6 and 10 min, the current that stays at 500 A, every
 * minute to a soc from 50 % on, the energies at 500 and 250 A, the pack of twice the voltage, and that cells of the
 * resistance this takes are common cells.
 */
const study = largePack();
const { series, metrics, energyLedger } = run(study, { everyS: 1 }).result;

const rowAtSoc = (soc: number) => series.soc.findIndex((value) => value >= soc);
const rowAtMin = (minute: number) => series.tS.findLastIndex((t) => t <= minute * 60 + 1e-9);
const minutesTo = (soc: number) => series.tS[rowAtSoc(soc)] / 60;
const near = (value: number, expected: number, within: number) =>
  expect(Math.abs(value - expected), `${value} against ${expected} ± ${within}`).toBeLessThanOrEqual(within);

describe('chosen on', () => {
  test('105 kWh usable of 111 installed, as given back in three hours at 25 °C', () => {
    const pack = new PackSystem({ ...study, inlet: study.inlet! });
    const amperes = pack.capacityAh / 3;
    const { segments } = pack.layout;
    const kwh = (from: number, to: number) => {
      const lost = (z: number) =>
        amperes *
        (pack.busbarOhm + segments * pack.curves.shape.value(z) * (pack.ohmic25 + pack.rc25[0] + pack.rc25[1]));
      const z = Array.from({ length: 501 }, (_, i) => from + ((to - from) * i) / 500);
      return pack.storedJ(from, to) / 3.6e6 - (integral(z, z.map(lost)) * pack.capacityAh) / 1000;
    };
    near(kwh(...study.pack.socWindow), 105, 1);
    near(kwh(0, 1), 111, 1.2);
  });

  test('full near 427 V under charge', () => {
    near(Math.max(...series.packVoltageV), 427, 1);
  });

  test('366 ± 6 V at about 500 A near 0 %', () => {
    const row = series.stationCurrentA.findIndex((current) => current > 499);
    expect(series.soc[row]).toBeLessThan(0.02);
    near(series.packVoltageV[row], 366, 6);
    near(series.packCurrentA[row], 500, 15);
  });

  test('195 kW first reached between 28 and 37 %', () => {
    const row = series.stationPowerKw.findIndex((kw) => kw >= 195);
    expect(series.soc[row]).toBeGreaterThan(0.28);
    expect(series.soc[row]).toBeLessThan(0.37);
  });

  test('ledges: 400 A at 40 %, about 144 kW at 50 % near 400 V, 82 kW at 80 %, 28 kW at 98 %', () => {
    near(series.packCurrentA[rowAtSoc(0.4)], 400, 5);
    near(series.stationPowerKw[rowAtSoc(0.5)], 144, 4);
    near(series.packVoltageV[rowAtSoc(0.5)], 400, 5);
    near(series.stationPowerKw[rowAtSoc(0.8)], 82, 4);
    near(series.stationPowerKw[rowAtSoc(0.98)], 28, 2);
  });

  test('held near 410 V between 55 and 75 %', () => {
    for (let row = rowAtSoc(0.55); row <= rowAtSoc(0.75); row++) near(series.packVoltageV[row], 410, 8);
  });
});

describe('check', () => {
  test('the station’s current stays at 500 A until 37 %', () => {
    const [from, to] = [rowAtSoc(0.02), rowAtSoc(0.3699)];
    for (let row = from; row < to; row++) near(series.stationCurrentA[row], 500, 0.01);
    expect(series.limit[to + 40]).toBe('taper');
  });

  test('16 ± 1 % at 6 min, 28.5 ± 1 % at 10 min', () => {
    near(100 * series.soc[rowAtMin(6)], 16, 1);
    near(100 * series.soc[rowAtMin(10)], 28.5, 1);
  });

  test('50 % in 19 to 20 min', () => {
    expect(minutesTo(0.5)).toBeGreaterThanOrEqual(19);
    expect(minutesTo(0.5)).toBeLessThanOrEqual(20);
  });

  test.each([
    [75, 35, 2],
    [80, 38.5, 2.5],
    [95, 54, 3],
    [100, 72, 6],
  ])('%i %% in %f ± %f min', (soc, minutes, within) => {
    near(soc === 100 ? metrics.endMin : minutesTo(soc / 100), minutes, within);
    expect(metrics.endSoc).toBeGreaterThan(0.995);
  });

  test('energy from the station is well above the stored energy, and more so at 500 A than at 250 A', () => {
    const slow = structuredClone(study);
    slow.station.currentMaxA = 250;
    const { energyLedger: at250 } = run(slow).result;
    const excess = (ledger: typeof energyLedger) => ledger.stationKwh / ledger.storedKwh - 1;
    expect(excess(energyLedger)).toBeGreaterThan(0.05);
    expect(excess(at250)).toBeGreaterThan(0.03);
    expect(excess(energyLedger)).toBeGreaterThan(1.2 * excess(at250));
    near(at250.storedKwh, energyLedger.storedKwh, 0.5);
  });

  test('a pack of twice the voltage and the same energy on the same 500 A reaches 50 % in about half the time', () => {
    const twice = run(ofTwiceTheVoltage(study)).result;
    near(twice.series.packVoltageV[0] / series.packVoltageV[0], 2, 0.01);
    near(twice.energyLedger.storedKwh, energyLedger.storedKwh, 1);
    near(twice.metrics.minutes0To50! / metrics.minutes0To50!, 0.5, 0.05);
  });

  test('its cells are common ones: 10 s resistance × capacity between 60 and 200 mΩ·Ah (memory)', () => {
    const { r0Milliohm, rcPairs, capacityAh } = study.cell;
    const after10S = rcPairs.reduce((sum, { rMilliohm, tauS }) => sum - rMilliohm * Math.expm1(-10 / tauS), r0Milliohm);
    expect(after10S * capacityAh).toBeGreaterThan(60);
    expect(after10S * capacityAh).toBeLessThan(200);
  });
});

/**
 * As many cells again in series, each of half the capacity, and power cells (half the resistance × capacity, as packs
 * of that class are built for twice the C-rate); station of 400 kW and 1000 V.
 */
function ofTwiceTheVoltage(original: SessionStudy): SessionStudy {
  const twin = structuredClone(original);
  twin.pack.series *= 2;
  twin.cell.capacityAh /= 2;
  twin.cell.massKg /= 2;
  twin.station = { ...twin.station, powerMaxKw: 450, voltageMaxV: 1000 };
  return twin;
}
