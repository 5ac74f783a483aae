import { describe, expect, test } from 'vitest';
import type { Thermal } from '../study/schema.ts';
import { CoolantLoop } from './coolant-loop.ts';

const LITRES = 12;
const W = (LITRES / 60_000) * 1065 * 3400;

const thermal = (parts: Partial<Thermal> = {}): Thermal => ({
  surfaceShare: 0.1,
  plateWPerK: 900,
  ambientWPerK: 6,
  coolant: { flowLPerMin: LITRES, densityKgPerM3: 1065, specificHeatJPerKgK: 3400, volumeL: 7 },
  pumpW: 80,
  ...parts,
});
const chiller = {
  ratedW: 5000,
  onC: 27,
  fullC: 33,
  minCoolantC: 10,
  cop35: 2.2,
  copPerK: 0.03,
  deratePerKAbove35: 0.01,
};
const radiator = { parkedWPerK: 60, perMpsWPerK: 9, onC: 24, fullC: 30 };
const heater = { ratedW: 5500, efficiency: 0.95, onC: 8, offC: 16, maxCoolantC: 60 };

type Moment = { hottest?: number; coldest?: number; loop?: number; ambient?: number; speed?: number };
function controlled(
  parts: Partial<Thermal>,
  { hottest = 40, coldest = 20, loop = 25, ambient = 20, speed = 0 }: Moment,
) {
  const coolant = new CoolantLoop(thermal(parts), 4);
  coolant.control({ hottestSurface: hottest, coldestSurface: coldest, loopC: loop, ambientC: ambient, speed });
  return coolant;
}

describe('CoolantLoop', () => {
  test('flow, loop and effectiveness: W = flow·ρ·c_p, C_L = volume·ρ·c_p, ε = 1 − exp(−UA/M/W) per segment', () => {
    const { flowWPerK, loopJPerK, effectiveness, wallConductance } = new CoolantLoop(thermal(), 4);
    expect(flowWPerK).toBeCloseTo(724.2, 9);
    expect(loopJPerK).toBeCloseTo(25_347, 9);
    expect(effectiveness).toBeCloseTo(1 - Math.exp(-225 / 724.2), 12);
    expect(wallConductance).toBeCloseTo(724.2 * effectiveness, 9);
  });

  test('reservoirRate moves the loop towards what leaves the pack', () => {
    expect(new CoolantLoop(thermal(), 1).reservoirRate(30, 25)).toBeCloseTo((724.2 * 5) / 25_347, 12);
  });

  test('without controllers coolant enters as the loop stands, and the pump alone takes power', () => {
    expect(controlled({}, {})).toMatchObject({ inC: 25, chillerW: 0, radiatorW: 0, heaterW: 0, electricalW: 80 });
  });
});

describe('CoolantLoop.control: chiller', () => {
  test.each([
    [26.9, 0],
    [27, 0],
    [28.5, 1250],
    [30, 2500],
    [33, 5000],
    [50, 5000],
  ])('hottest surface at %s °C: %s W', (hottest, watts) => {
    const coolant = controlled({ chiller }, { hottest });
    expect(coolant.chillerW).toBeCloseTo(watts, 9);
    expect(coolant.inC).toBeCloseTo(25 - watts / W, 12);
  });

  test('never cools the coolant below its least: W·(θ_L − minCoolantC)', () => {
    expect(controlled({ chiller }, { loop: 12 }).chillerW).toBeCloseTo(2 * W, 9);
    expect(controlled({ chiller }, { loop: 12 }).inC).toBeCloseTo(10, 12);
    expect(controlled({ chiller }, { loop: 8 }).chillerW).toBe(0);
  });

  test.each([
    [35, 5000],
    [45, 4500],
    [135, 0],
    [160, 0],
  ])('in air of %s °C it gives %s W', (ambient, watts) => {
    expect(controlled({ chiller }, { ambient, loop: 60 }).chillerW).toBeCloseTo(watts, 9);
  });

  test.each([
    [20, 2.65],
    [35, 2.2],
    [45, 1.9],
    [80, 1],
  ])('in air of %s °C its COP is %s', (ambient, cop) => {
    const coolant = controlled({ chiller }, { ambient, loop: 60 });
    expect(coolant.electricalW).toBeCloseTo(80 + coolant.chillerW / cop, 9);
  });
});

describe('CoolantLoop.control: radiator', () => {
  const open = W * (1 - Math.exp(-60 / W));

  test.each([
    [24, 0],
    [27, 0.5],
    [31, 1],
  ])('hottest surface at %s °C opens it to %s', (hottest, u) => {
    expect(controlled({ radiator }, { hottest }).radiatorW).toBeCloseTo(u * open * 5, 9);
  });

  test('grows with the speed, never past cooling the stream to the air', () => {
    const driving = controlled({ radiator }, { speed: 25 });
    expect(driving.radiatorW).toBeCloseTo(5 * W * (1 - Math.exp(-(60 + 9 * 25) / W)), 9);
    expect(controlled({ radiator }, { speed: 1e6 }).inC).toBeCloseTo(20, 9);
  });

  test('never heats: 0 where the loop is no warmer than the air', () => {
    expect(controlled({ radiator }, { ambient: 25 }).radiatorW).toBe(0);
    expect(controlled({ radiator }, { ambient: 40 }).radiatorW).toBe(0);
  });
});

describe('CoolantLoop.control: heater', () => {
  test.each([
    [16, 0],
    [12, 0.5],
    [8, 1],
    [-20, 1],
  ])('coldest surface at %s °C turns it to %s', (coldest, u) => {
    const coolant = controlled({ heater }, { coldest });
    expect(coolant.heaterW).toBeCloseTo(0.95 * 5500 * u, 9);
    expect(coolant.electricalW).toBeCloseTo(80 + 5500 * u, 9);
    expect(coolant.inC).toBeCloseTo(25 + (0.95 * 5500 * u) / W, 12);
  });

  test.each([
    [55, 1],
    [57.5, 0.5],
    [60, 0],
    [70, 0],
  ])('coolant at %s °C leaves it %s, within 5 K of its highest', (loop, u) => {
    expect(controlled({ heater }, { coldest: 0, loop }).heaterW).toBeCloseTo(0.95 * 5500 * u, 9);
  });

  test('runs beside the chiller where one segment is hot and another cold', () => {
    const coolant = controlled({ chiller, heater }, { hottest: 30, coldest: 12 });
    expect(coolant.inC).toBeCloseTo(25 + (0.95 * 2750 - 2500) / W, 12);
    expect(coolant.electricalW).toBeCloseTo(80 + 2750 + 2500 / 2.65, 9);
  });
});

test('CoolantLoop at flow 0: no heat at the wall, controllers still, the loop as it stands, the pump’s power counted', () => {
  const still = { ...thermal().coolant, flowLPerMin: 0 };
  const coolant = controlled({ coolant: still, chiller, radiator, heater }, { coldest: 0, loop: 30 });
  expect(coolant).toMatchObject({ wallConductance: 0, effectiveness: 0, inC: 30, electricalW: 80 });
  expect(coolant).toMatchObject({ chillerW: 0, radiatorW: 0, heaterW: 0 });
  expect(coolant.reservoirRate(30, 30)).toBe(0);
});
