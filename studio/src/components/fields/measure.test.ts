import { expect, test } from 'vitest';
import { measureOf, numberText, quantityPathOf, readNumber, storedText, toShown, toStored } from './measure.ts';

test('quantityPathOf finds the entry of rows and of every taper column', () => {
  expect(quantityPathOf('pack.socWindow[1]')).toBe('pack.socWindow[]');
  expect(quantityPathOf('strategy.taper.steps[4].fromSoc')).toBe('strategy.taper.soc');
  expect(quantityPathOf('strategy.taper.values[0][2]')).toBe('strategy.taper.value');
  expect(quantityPathOf('strategy.name')).toBeUndefined();
});

test('measureOf takes its step from the usual range', () => {
  expect(measureOf('station.currentMaxA')).toEqual({ unit: 'A', scale: 'plain', decimals: 0, step: 5 });
  expect(measureOf('strategy.hotDerate.fromC')).toEqual({ unit: '°C', scale: 'temperature', decimals: 1, step: 0.2 });
  expect(measureOf('pack.series').step).toBe(1);
  expect(measureOf('strategy.cellVoltageCeilingV').decimals).toBe(3);
});

test('storedText shows soc in % and temperatures in the chosen unit', () => {
  expect(storedText(0.07, measureOf('session.startSoc'), '°C')).toBe('7');
  expect(storedText(36, measureOf('strategy.hotDerate.fromC'), '°C')).toBe('36.0');
  expect(storedText(36, measureOf('strategy.hotDerate.fromC'), '°F')).toBe('96.8');
  expect(storedText(-10, measureOf('session.startTempC'), '°C')).toBe('−10.0');
});

test('toStored undoes toShown to the last digit that is written', () => {
  const temperature = measureOf('session.ambientC');
  for (const stored of [-40, 0, 21.7, 34.6])
    expect(toStored(toShown(stored, temperature, '°F'), temperature, '°F')).toBeCloseTo(stored, 10);
  expect(toStored(36, measureOf('session.startSoc'), '°C')).toBe(0.36);
});

test('numberText keeps digits beyond the least decimals', () => {
  expect(numberText(4.15, 3)).toBe('4.150');
  expect(numberText(4.1525, 3)).toBe('4.1525');
  expect(numberText(1 / 3, 1)).toBe('0.333333');
  expect(numberText(2e-9, 1)).toBe('2e-9'.replace('-', '−'));
});

test('readNumber takes comma, minus and power, and refuses the rest', () => {
  expect(readNumber(' 4,15 ')).toBe(4.15);
  expect(readNumber('−10.5')).toBe(-10.5);
  expect(readNumber('1,200.5')).toBe(1200.5);
  expect(readNumber('1e-3')).toBe(0.001);
  for (const text of ['', '12a', '1.2.3', '--1', 'Infinity', 'NaN']) expect(readNumber(text)).toBeNaN();
});
