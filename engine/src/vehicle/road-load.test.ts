import { expect, test } from 'vitest';
import { cabinPower, tractionPower, wheelPower } from './road-load.ts';

const vehicle = {
  massKg: 1900,
  dragAreaM2: 0.58,
  rollingCoefficient: 0.009,
  driveEfficiency: 0.9,
  regenEfficiency: 0.7,
  hotelW: 300,
  cabinWPerAmbient: { tempC: [-10, 20, 35], watts: [3000, 0, 1500] },
  cabinAtStops: 0,
};
// Air of 1.225 kg/m³ is air of 15 °C at sea level (ISO 2533).
const level = (kmPerH: number) => ({ speedMps: kmPerH / 3.6, windMps: 0, sinSlope: 0, ambientC: 15 });

// Computed from the formula for m 1900 kg, CdA 0.58 m², Crr 0.009, ρ 1.225, level: force [N] and power [kW] at the wheels.
test.each([
  [90, 389.7, 9.74],
  [110, 499.4, 15.26],
  [130, 630.9, 22.78],
])('P_wheel at %i km/h', (kmPerH, newton, kilowatt) => {
  const watts = wheelPower(vehicle, level(kmPerH));
  expect(watts / (kmPerH / 3.6)).toBeCloseTo(newton, 1);
  expect(watts / 1000).toBeCloseTo(kilowatt, 2);
});

// ISO 2533: density at sea level, by temperature.
test.each([
  [-20, 1.3944],
  [0, 1.2923],
  [20, 1.2041],
  [35, 1.1455],
  [40, 1.1272],
])('ρ_air at %i °C', (ambientC, density) => {
  const drag = wheelPower({ ...vehicle, rollingCoefficient: 0 }, { ...level(36), ambientC });
  expect(drag / (0.5 * 0.58 * 10 ** 3)).toBeCloseTo(density, 4);
});

test('a tail wind stronger than the car pushes it', () => {
  const still = { ...vehicle, rollingCoefficient: 0 };
  const road = { speedMps: 10, windMps: -15, sinSlope: 0, ambientC: 15 };
  expect(wheelPower(still, road)).toBeCloseTo(-10 * 0.5 * 1.225 * 0.58 * 25, 9);
});

test('a climb adds m·g·sinα and takes from the rolling resistance', () => {
  const flat = wheelPower(vehicle, level(90));
  const steep = wheelPower(vehicle, { ...level(90), sinSlope: 0.06 });
  const weight = 1900 * 9.80665;
  expect(steep - flat).toBeCloseTo(25 * (weight * 0.06 + 0.009 * weight * (Math.sqrt(1 - 0.0036) - 1)), 6);
});

test('P_load divides by the drive’s efficiency uphill, multiplies by regeneration’s downhill', () => {
  const up = { ...level(90), sinSlope: 0.05 };
  const down = { ...level(90), sinSlope: -0.05 };
  expect(tractionPower(vehicle, up)).toBeCloseTo(wheelPower(vehicle, up) / 0.9, 9);
  expect(wheelPower(vehicle, down)).toBeLessThan(0);
  expect(tractionPower(vehicle, down)).toBeCloseTo(wheelPower(vehicle, down) * 0.7, 9);
});

test('the cabin’s table is linear inside and held outside', () => {
  expect([-30, -10, 5, 20, 30, 50].map((ambient) => cabinPower(vehicle, ambient))).toEqual([
    3000, 3000, 1500, 0, 1000, 1500,
  ]);
  expect(cabinPower({ ...vehicle, cabinWPerAmbient: undefined }, 5)).toBe(0);
});
