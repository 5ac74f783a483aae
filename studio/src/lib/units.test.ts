import { describe, expect, it } from 'vitest';
import { unitsOf } from './units.ts';

const us = unitsOf({ temperature: '°F', distance: 'mi' });
const metric = unitsOf({ temperature: '°C', distance: 'km' });

describe('unitsOf', () => {
  it('meets the fixed points of water and the crossing of both scales', () => {
    expect(us.temperature(0)).toBe(32);
    expect(us.temperature(100)).toBe(212);
    expect(us.temperature(-40)).toBe(-40);
  });
  it('scales a difference without the offset', () => expect(us.temperatureDifference(10)).toBe(18));
  it('comes back to where it started', () => {
    expect(us.toCelsius(us.temperature(34.6))).toBeCloseTo(34.6, 12);
    expect(us.toKm(us.distance(208))).toBeCloseTo(208, 10);
  });
  it('knows the international mile', () => expect(us.toKm(1)).toBe(1.609344));
  it('leaves metric values alone', () => {
    expect(metric.temperature(21.4)).toBe(21.4);
    expect(metric.distance(57)).toBe(57);
  });
});
