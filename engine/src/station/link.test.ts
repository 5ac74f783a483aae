import { describe, expect, test } from 'vitest';
import {
  boostInputCurrent,
  currentForPower,
  packCurrentFor,
  packCurrentForStationPower,
  packCurrentForStationVoltage,
} from './link.ts';

// A rest voltage [V], B pack resistance [Ω], aux auxiliaries [W], ri inlet [Ω].
const links = [
  { A: 350, B: 0.06, aux: 0, ri: 0 },
  { A: 350, B: 0.06, aux: 3000, ri: 0.00025 },
  { A: 780, B: 0.11, aux: 8000, ri: 0.004 },
  { A: 320, B: 0.4, aux: 300, ri: 0.02 },
];

/** Station current that goes with a pack current, straight from V·(I_d − I) = P_aux. */
const stationCurrent = (A: number, B: number, aux: number, I: number) => I + aux / (A + B * I);

describe('currentForPower', () => {
  test('constant power: 350 V, 60 mΩ, 150 kW take 401.00487 A at 374.06029 V and lose 9648.294 W (computed)', () => {
    const I = currentForPower(350, 0.06, 150_000);
    expect(I).toBeCloseTo(401.00487, 5);
    expect(350 + 0.06 * I).toBeCloseTo(374.06029, 5);
    expect(I * I * 0.06).toBeCloseTo(9648.294, 3);
  });

  test('takes the root of smaller size for a pack that gives, and 0 for no power', () => {
    // V·I = −20 kW: I = (−A + √(A² − 4·B·20000))/(2·B) (quadratic formula).
    const expected = (-350 + Math.sqrt(350 * 350 - 4 * 0.06 * 20_000)) / 0.12;
    expect(currentForPower(350, 0.06, -20_000)).toBeCloseTo(expected, 10);
    expect(currentForPower(350, 0.06, 0)).toBe(0);
  });
});

describe.each(links)('link of $A V, $B Ω, $aux W, inlet $ri Ω', ({ A, B, aux, ri }) => {
  test.each([0, 1, 120, 480])('packCurrentFor undoes the station current of %s A', (Id) => {
    const I = packCurrentFor(A, B, aux, Id);
    expect(stationCurrent(A, B, aux, I)).toBeCloseTo(Id, 9);
    if (Id === 0) expect(I).toBeLessThanOrEqual(0);
  });

  test.each([8000, 60_000, 200_000])('packCurrentForStationPower has the station give %s W', (watts) => {
    const I = packCurrentForStationPower(A, B, aux, ri, watts);
    const Id = stationCurrent(A, B, aux, I);
    expect(Id).toBeGreaterThan(0);
    // Relative to the power: Newton stops at 1e-10 of the current.
    expect(((A + B * I + ri * Id) * Id) / watts - 1).toBeCloseTo(0, 9);
  });

  test.each([1.02, 1.1])('packCurrentForStationVoltage stands the inlet at %s of the rest voltage', (share) => {
    const volts = A * share;
    const I = packCurrentForStationVoltage(A, B, aux, ri, volts);
    expect(A + B * I + ri * stationCurrent(A, B, aux, I)).toBeCloseTo(volts, 9);
  });

  test('packCurrentForStationVoltage leaves what the pack gives itself where the station stands below it', () => {
    const I = packCurrentForStationVoltage(A, B, aux, ri, 0.9 * A);
    expect(I).toBeCloseTo(packCurrentFor(A, B, aux, 0), 12);
    expect(stationCurrent(A, B, aux, I)).toBeCloseTo(0, 9);
  });
});

describe('boostInputCurrent', () => {
  test.each([0, 0.001, 0.02])('behind %s Ω the converter takes the power asked for', (ri) => {
    const Id = boostInputCurrent(500, ri, 180_000);
    expect((500 - Id * ri) * Id).toBeCloseTo(180_000, 6);
  });

  test('power balance: station = inlet + converter’s loss + pack + auxiliaries', () => {
    const [volts, ri, efficiency, aux] = [500, 0.003, 0.97, 4000];
    const battery = 800 * 180;
    const Id = boostInputCurrent(volts, ri, (battery + aux) / efficiency);
    const input = (volts - Id * ri) * Id;
    expect(volts * Id).toBeCloseTo(Id * Id * ri + (1 - efficiency) * input + battery + aux, 6);
  });
});
