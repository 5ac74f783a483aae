import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { parseSessionStudy, parseStudy, runStudy, simulateSession } from '@voltiplano/engine';
import { describe, expect, it } from 'vitest';
import { headlineSchema } from '../contract/study.ts';
import { exampleStudy, exampleTrip } from '../testing/example-study.ts';
import { computeHeadline } from './compute-headline.ts';

const EXAMPLES = path.join(import.meta.dirname, '../../../examples');
const read = (name: string) => JSON.parse(readFileSync(path.join(EXAMPLES, name), 'utf8')) as { kind: string };
/** Study files; requests to tune a taper lie beside them. */
const examples = readdirSync(EXAMPLES).filter(
  (name) => name.endsWith('.json') && ['session', 'trip'].includes(read(name).kind),
);

describe('computeHeadline', () => {
  it('has examples of both kinds to run', () => {
    expect(new Set(examples.map((name) => read(name).kind))).toEqual(new Set(['session', 'trip']));
  });

  it.each(examples)('of %s is of its schema, and the same each time', (name) => {
    const headline = computeHeadline(read(name), '0.1.0');
    expect(headlineSchema.parse(headline)).toEqual(headline);
    expect(headline).toMatchObject({ engineVersion: '0.1.0', failure: null });
    expect(JSON.stringify(computeHeadline(read(name), '0.1.0'))).toBe(JSON.stringify(headline));
  });

  it('draws a session with 96 points at most, its peak, and limits that meet from 0 to the end', () => {
    for (const name of examples) {
      const { numbers, section } = computeHeadline(read(name), '0.1.0');
      if (!section) continue;
      expect(section.points.length).toBeLessThanOrEqual(96);
      expect(Math.max(...section.points.map(([, kw]) => kw))).toBeCloseTo(numbers?.peakStationPowerKw ?? NaN, 3);
      expect(section.points.map(([min]) => min)).toEqual([...section.points.map(([min]) => min)].sort((a, b) => a - b));
      expect(section.limits[0]?.fromMin).toBe(0);
      expect(section.limits.at(-1)?.toMin).toBeCloseTo(section.endMin, 4);
      for (const [i, { toMin }] of section.limits.slice(0, -1).entries()) {
        expect(section.limits[i + 1]?.fromMin).toBe(toMin);
      }
    }
  });

  it('draws the step of a station that gives power away as two points of one moment', () => {
    const study = exampleStudy('vicuna-shared-station');
    const { events } = simulateSession(parseSessionStudy(study)).result;
    const steps = events.filter(({ event }) => event.startsWith('power:'));
    expect(steps.length).toBeGreaterThan(0);
    const points = computeHeadline(study, '0.1.0').section?.points ?? [];
    for (const { tS } of steps) {
      const here = points.filter(([min]) => Math.abs(min - tS / 60) < 1e-3);
      expect(here).toHaveLength(2);
      expect(Math.abs(here[0]![1] - here[1]![1])).toBeGreaterThan(1);
    }
  });

  it('has of a trip what a trip has', () => {
    const study = exampleTrip();
    const result = runStudy(parseStudy(study));
    if (result.kind !== 'trip') throw new Error('The example is no trip.');
    const { numbers, section } = computeHeadline(study, '0.1.0');
    expect(section).toBeNull();
    expect(numbers).toMatchObject({
      endMin: result.totalMin,
      endSoc: result.legs[0]?.endSoc,
      hottestCoreC: result.legs[0]?.hottestCoreC,
      minutes10To80: null,
      peakStationPowerKw: null,
      stationKwh: null,
      kmIn10Min: null,
    });
  });

  it('says in the engine’s words why there are no numbers', () => {
    const trip = exampleTrip();
    const leg = trip.trip.legs[0]!;
    const twice = { ...trip, trip: { ...trip.trip, legs: [leg, leg] } };
    expect(computeHeadline(twice, '0.1.0')).toEqual({
      engineVersion: '0.1.0',
      failure: 'Cannot drive this trip: a trip of one leg can be driven, but this has 2.',
      numbers: null,
      section: null,
    });
    const far = { ...trip, trip: { ...trip.trip, startSoc: 0.02 } };
    expect(computeHeadline(far, '0.1.0')).toMatchObject({ failure: /the pack is empty|lowest cell/, numbers: null });
    const study = exampleStudy();
    const weak = { ...study, station: { ...study.station, voltageMaxV: 201 } };
    expect(computeHeadline(weak, '0.1.0')).toMatchObject({ failure: /cannot start/i, numbers: null, section: null });
    expect(computeHeadline({}, '0.1.0').failure).toContain('Not a study');
  });
});
