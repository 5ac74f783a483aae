import { describe, expect, test } from 'vitest';
import { convertTaper, simulateSession, StudyError, type SessionStudy, type Taper } from '../index.ts';
import { exampleStudies } from '../../validation/studies.ts';

const minutes = (study: SessionStudy, taper: Taper) =>
  simulateSession({ ...study, strategy: { ...study.strategy, taper } }).result.metrics.endMin;

describe.each(exampleStudies().map(({ name, study }) => [name, study] as const))('convertTaper of %s', (_, study) => {
  const before = simulateSession(study).result.metrics.endMin;

  test.each(['A', 'C', 'kW'] as const)('to %s keeps the shape, and the minutes within 0.1 %', (unit) => {
    const { taper } = study.strategy;
    const converted = convertTaper(study, unit);
    expect(converted.taper).toMatchObject({ shape: taper.shape, unit });
    expect(Math.abs(minutes(study, converted.taper) / before - 1)).toBeLessThan(converted.exact ? 1e-9 : 1e-3);
    expect(converted.exact).toBe(taper.shape !== 'none' && (taper.unit === 'kW') === (unit === 'kW'));
    expect(converted.convertedMinutes).toBe(minutes(study, converted.taper));
  });
});

test('A and C differ by the capacity alone, and come back to the last digits', () => {
  const { study } = exampleStudies().find(({ name }) => name === 'vicuna-warm-arrival')!;
  const inC = convertTaper(study, 'C').taper;
  if (inC.shape !== 'ledges' || study.strategy.taper.shape !== 'ledges') throw new Error('not ledges');
  const factors = inC.steps.map(({ value }, i) => (study.strategy.taper as typeof inC).steps[i].value / value);
  for (const factor of factors) expect(factor).toBeCloseTo(288, 9);
});

test('without a taper there is nothing to convert, and the error says so', () => {
  const { study } = exampleStudies()[0];
  const bare = { ...study, strategy: { ...study.strategy, taper: { shape: 'none' as const } } };
  expect(() => convertTaper(bare, 'kW')).toThrow(StudyError);
  expect(() => convertTaper(bare, 'kW')).toThrow('its shape is "none"');
});
