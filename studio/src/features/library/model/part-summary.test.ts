import { describe, expect, test } from 'vitest';
import suri from '../../../../../examples/suri-map-cool-evening.json';
import town from '../../../../../examples/vicuna-town-lfp.json';
import trip from '../../../../../examples/vicuna-one-leg.json';
import shared from '../../../../../examples/vicuna-shared-station.json';
import { unitsOf } from '../../../lib/units.ts';
import { partSummary } from './part-summary.ts';

const metric = unitsOf({ temperature: '°C', distance: 'km' });

describe('partSummary says what a part is, on one line', () => {
  test.each([
    ['pack', trip.pack, '102 in series, 4 parallel, 500 A'],
    ['cell', trip.cell, '72 Ah, NMC811 and graphite, up to 4.2 V'],
    [
      'cell',
      { ...trip.cell, ocv: { x: [0, 1], y: [3, 4] }, anode: undefined },
      '72 Ah, a table over z, up to 4.2 V, no anode',
    ],
    ['thermal', trip.thermal, '14 L/min, chiller 4.2 kW, radiator, heater 5.5 kW'],
    ['inlet', trip.inlet, '0.28 mΩ, 500 A, derates from 75 °C'],
    ['inlet', {}, '0 mΩ, no limit of its own'],
    ['station', suri.station, '350 kW, 500 A, 200 to 1000 V'],
    ['strategy', trip.strategy, 'six ledges, 500 to 130 A, ceiling 4.15 V, margin 28 mV'],
    ['strategy', town.strategy, 'four voltage ledges, 230 to 45 A, ceiling 3.55 V'],
    ['strategy', suri.strategy, 'map of 6 socs by 4 temperatures, 262 to 6 kW, ceiling 4.16 V'],
    ['strategy', { ...suri.strategy, taper: { shape: 'none' } }, 'no taper, ceiling 4.16 V'],
    [
      'strategy',
      { ...suri.strategy, taper: { shape: 'slope', unit: 'C', points: [{ soc: 0, value: 2.5 }] } },
      'one point, 2.5 C, ceiling 4.16 V',
    ],
    ['vehicle', trip.vehicle, '2950 kg, CdA 1.18 m², drive 88 %'],
    ['route', { legs: trip.trip.legs }, 'one leg, 148 km, no station, 620 m climbed'],
  ] as const)('%s %#', (kind, body, words) => {
    expect(partSummary(kind, body, metric)).toBe(words);
  });

  test('a station that gives power away says so', () => {
    expect(partSummary('station', shared.station, metric)).toMatch(/, power shared$/);
  });

  test('temperatures and distances are in the reader’s units', () => {
    const imperial = unitsOf({ temperature: '°F', distance: 'mi' });
    expect(partSummary('inlet', trip.inlet, imperial)).toBe('0.28 mΩ, 500 A, derates from 167 °F');
    expect(partSummary('route', { legs: trip.trip.legs }, imperial)).toBe('one leg, 92 mi, no station, 620 m climbed');
  });
});
