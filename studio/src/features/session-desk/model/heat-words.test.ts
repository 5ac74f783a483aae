import { parseSessionStudy, thermalAnalysis } from '@voltiplano/engine';
import { expect, test } from 'vitest';
import { unitsOf } from '../../../lib/units.ts';
import { heatWords } from './heat-words.ts';
import { sampleStudy } from './sample-study.ts';

const units = unitsOf({ temperature: '°C', distance: 'km' });

test('heatWords says how long until heat-soaked and where the pack settles', () => {
  const thermal = thermalAnalysis(parseSessionStudy(sampleStudy), 2000);
  const [soaked, steady] = heatWords(thermal, units);
  expect(soaked).toMatch(/^Heat-soaked in about \d+(\.\d)? min: 95 % .* slowest time constant, \d+\.\d min/);
  expect(steady).toContain('mean heat of 2.00 kW');
  expect(steady).toContain(`${thermal.steady!.hottestCoreC.toFixed(1)} °C`);
});

test('heatWords says so where nothing carries the heat away', () => {
  const closed = { ...sampleStudy.thermal, ambientWPerK: 0, coolant: { flowLPerMin: 0, volumeL: 7 } };
  const words = heatWords(thermalAnalysis(parseSessionStudy({ ...sampleStudy, thermal: closed }), 2000), units).join(
    ' ',
  );
  expect(words).toMatch(/does not settle|never settles/);
});
