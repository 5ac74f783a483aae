import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { partIssues, type PartName } from './part-issues.ts';

type Json = Record<string, unknown>;

const read = (name: string) =>
  JSON.parse(readFileSync(new URL(`../../../examples/${name}.json`, import.meta.url), 'utf8')) as Json;
const session = read('vicuna-shared-station');
const trip = read('vicuna-one-leg');
const parts: Record<string, unknown> = {
  ...session,
  ...trip,
  inlet: session.inlet,
  route: { legs: (trip.trip as Json).legs },
};
const cell = () => structuredClone(parts.cell) as Json;

describe('partIssues', () => {
  test.each(['cell', 'pack', 'thermal', 'inlet', 'station', 'strategy', 'vehicle', 'route'] as const)(
    'finds nothing against the %s of a study',
    (part) => {
      expect(parts[part]).toBeTypeOf('object');
      expect(partIssues(part, parts[part])).toEqual([]);
    },
  );

  test('names the field within the part, the rule and the value', () => {
    const rcPairs = [{ rMilliohm: 1, tauS: 0 }];
    expect(partIssues('cell', { ...cell(), rcPairs, capacityAh: 'much', massKg: undefined })).toEqual([
      { path: 'capacityAh', rule: 'type', value: '"much"', message: 'capacityAh must be a number, but is "much"' },
      { path: 'massKg', rule: 'missing', message: 'massKg is missing' },
      expect.objectContaining({ path: 'rcPairs[0].tauS', rule: 'range', value: '0' }),
    ]);
  });

  test('names the part where the whole of it is wrong, and in what an unknown field does not belong', () => {
    const messageOf = (part: PartName, json: unknown) => partIssues(part, json).map(({ message }) => message);
    expect(messageOf('cell', 7)).toEqual(['cell must be an object, but is 7']);
    expect(messageOf('thermal', undefined)).toEqual(['thermal system is missing']);
    expect(messageOf('inlet', { name: 'CCS' })).toEqual(['name is not a field of an inlet']);
    expect(messageOf('thermal', { ...(parts.thermal as Json), name: 'x' })).toEqual([
      'name is not a field of a thermal system',
    ]);
  });

  test('a route has 1 to 500 legs, each judged as in a trip', () => {
    const [leg] = (parts.route as { legs: Json[] }).legs;
    expect(partIssues('route', { legs: [] })).toMatchObject([{ path: 'legs', rule: 'range' }]);
    expect(partIssues('route', { legs: Array.from({ length: 501 }, () => leg) })).toMatchObject([{ path: 'legs' }]);
    expect(partIssues('route', { legs: [leg, { ...leg, kmPerH: -1 }] })).toMatchObject([
      { path: 'legs[1].kmPerH', rule: 'range', value: '-1' },
    ]);
  });

  test('leaves rules between parts to the study', () => {
    expect(partIssues('strategy', { ...(parts.strategy as Json), cellVoltageCeilingV: 9 })).toEqual([]);
  });
});
