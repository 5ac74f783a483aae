import { describe, expect, test } from 'vitest';
import { parseStudy } from '../study/parse-study.ts';
import type { TripStudy, TripStudyInput } from '../study/schema.ts';
import { StudyError } from '../study/study-error.ts';
import { wheelPower } from '../vehicle/road-load.ts';
import { simulateTrip } from './simulate-trip.ts';

/** A pack of 100 cells of 100 Ah at a constant 3.6 V, so that driving reduces to constant power from a constant source. */
function study(change: (study: TripStudyInput) => void = () => {}): TripStudy {
  const input: TripStudyInput = {
    format: 'voltiplano/study',
    version: 1,
    kind: 'trip',
    cell: {
      name: 'flat',
      capacityAh: 100,
      massKg: 1,
      ocv: { x: [0, 1], y: [3.6, 3.6000001] },
      r0Milliohm: 0.6,
      activationKjPerMol: 0,
      vMaxV: 4.2,
      vMinV: 2.5,
    },
    pack: { name: 'flat', series: 100, parallel: 2, chargeCurrentMaxA: 120, dischargeCurrentMaxA: 600 },
    thermal: { plateWPerK: 0, ambientWPerK: 0, coolant: { flowLPerMin: 0, volumeL: 5 } },
    strategy: { name: 'plain', taper: { shape: 'none' }, cellVoltageCeilingV: 4.1, hotDerate: { fromC: 50, toC: 60 } },
    vehicle: {
      massKg: 1900,
      dragAreaM2: 0.58,
      rollingCoefficient: 0.009,
      driveEfficiency: 0.9,
      regenEfficiency: 0.7,
      hotelW: 400,
    },
    trip: { ambientC: 15, startSoc: 0.9, startTempC: 25, legs: [{ km: 110, kmPerH: 110 }] },
  };
  change(input);
  return parseStudy(input) as TripStudy;
}

const OHM = (0.6e-3 * 100) / 2;
/** Current from a source of 360 V behind OHM that gives `watts` (the root of the quadratic, any textbook). */
const currentGiving = (watts: number) => (360 - Math.sqrt(360 * 360 - 4 * OHM * watts)) / (2 * OHM);

describe('one leg', () => {
  test('takes constant power from a constant source: current, soc, ledger', () => {
    const trip = simulateTrip(study());
    const wheels = wheelPower(study().vehicle, { speedMps: 110 / 3.6, windMps: 0, sinSlope: 0, ambientC: 15 });
    const current = currentGiving(wheels / 0.9 + 400);
    const [leg] = trip.legs;
    expect(trip.completed).toBe(true);
    expect(trip.totalMin).toBeCloseTo(60, 9);
    expect(trip.series.packCurrentA.every((value) => Math.abs(value + current) < 1e-4)).toBe(true);
    expect(leg.endSoc).toBeCloseTo(0.9 - current / 200, 7);
    expect(leg.batteryKwh).toBeCloseTo(-(wheels / 0.9 + 400) / 1000, 7);
    expect(leg.energyLedger.tractionKwh).toBeCloseTo(wheels / 900, 7);
    expect(leg.energyLedger.ohmicKwh).toBeCloseTo((current * current * OHM) / 1000, 7);
    expect(Math.abs(leg.energyLedger.remainderKwh)).toBeLessThan(1e-6 * Math.abs(leg.batteryKwh));
    expect(trip.series.km.at(-1)).toBeCloseTo(110, 9);
    expect(trip.series.stationPowerKw.every((value) => value === null)).toBe(true);
  });

  test('regeneration is held to the pack’s most, and says so', () => {
    const trip = simulateTrip(
      study((s) => {
        s.trip.legs = [{ km: 10, kmPerH: 110, climbM: -1800 }];
      }),
    );
    expect(trip.completed).toBe(true);
    expect(new Set(trip.series.limit)).toEqual(new Set(['pack-current']));
    expect(trip.series.packCurrentA.every((value) => value === 120)).toBe(true);
    expect(trip.events).toContainEqual({ tS: 0, event: 'limit:pack-current' });
  });

  test('an empty pack ends the leg where it is empty', () => {
    const trip = simulateTrip(
      study((s) => {
        s.trip.startSoc = 0.1;
      }),
    );
    const wheels = wheelPower(study().vehicle, { speedMps: 110 / 3.6, windMps: 0, sinSlope: 0, ambientC: 15 });
    const km = (110 * 0.1 * 200) / currentGiving(wheels / 0.9 + 400);
    expect(trip.completed).toBe(false);
    expect(trip.failure?.reason).toBe('soc');
    expect(trip.failure?.km).toBeCloseTo(km, 4);
    expect(trip.legs[0].endSoc).toBeCloseTo(0, 9);
    expect(trip.failure?.message).toMatch(/^At \d+\.\d km the pack is empty/);
  });

  const past: [string, (s: TripStudyInput) => void][] = [
    ['discharge-current', (s) => void (s.pack.dischargeCurrentMaxA = 40)],
    ['cell-voltage', (s) => void (s.cell.vMinV = 3.59)],
    ['power', (s) => void (s.trip.legs = [{ km: 10, kmPerH: 390, climbM: 9000 }])],
  ];
  test.each(past)('a load past %s fails at the start', (reason, change) => {
    const trip = simulateTrip(study(change));
    expect(trip.failure).toMatchObject({ reason, km: 0 });
    expect(trip.legs[0].km).toBe(0);
  });
});

test('more legs than one are refused with the field', () => {
  const two = study((s) => {
    s.trip.legs = [
      { km: 10, kmPerH: 100 },
      { km: 10, kmPerH: 100 },
    ];
  });
  expect(() => simulateTrip(two)).toThrow(StudyError);
});
