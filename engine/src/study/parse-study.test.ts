import fc from 'fast-check';
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { parseSessionStudy, parseStudy, parseStudyText } from './parse-study.ts';
import { quantities } from './quantities.ts';
import { StudyError, type StudyIssue } from './study-error.ts';

type Json = Record<string, unknown>;

/** Every part and nearly every field: ledges, RC pairs, tables, chiller, radiator, heater, inlet, power steps, cold limit. */
const text = readFileSync(new URL('../../../examples/vicuna-shared-station.json', import.meta.url), 'utf8');
const fresh = () => JSON.parse(text) as Json;

function errorOf(read: () => unknown): StudyError {
  try {
    read();
  } catch (error) {
    if (error instanceof StudyError) return error;
    throw error;
  }
  throw new Error('was read without an error');
}
const issuesOf = (json: unknown): StudyIssue[] => errorOf(() => parseSessionStudy(json)).issues;

type Place = { holder: Json; key: string; path: string };

/** Every key of a study, objects and rows too, as a path that a person would write. */
function places(holder: Json, path = ''): Place[] {
  return Object.entries(holder).flatMap(([key, value]) => {
    const here = Array.isArray(holder) ? `${path}[${key}]` : path ? `${path}.${key}` : key;
    const inside = typeof value === 'object' && value !== null ? places(value as Json, here) : [];
    return [{ holder, key, path: here }, ...inside];
  });
}
const paths = places(fresh()).map(({ path }) => path);
const at = (json: Json, path: string) => places(json).find((place) => place.path === path)!;

describe('parseStudyText', () => {
  test('a file cut anywhere is no JSON, and says where', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: text.trimEnd().length - 1 }), (length) => {
        const error = errorOf(() => parseStudyText(text.slice(0, length)));
        expect(error).toMatchObject({ code: 'NOT_JSON', issues: [{ rule: 'json' }] });
        expect(error.message).toMatch(/^Cannot read this file as JSON: /);
      }),
      { numRuns: 60, seed: 1 },
    );
  });

  test('any text at all is a study or a study error', () => {
    fc.assert(
      fc.property(fc.oneof(fc.string(), fc.json()), (any) => {
        expect(['NOT_JSON', 'NOT_A_STUDY']).toContain(errorOf(() => parseStudyText(any)).code);
      }),
      { seed: 2 },
    );
  });
});

describe('parseStudy', () => {
  test('any value under a study’s head is refused by its fields', () => {
    fc.assert(
      fc.property(
        fc.dictionary(fc.string(), fc.jsonValue()),
        fc.constantFrom('session', 'trip', 'sweep', 4),
        (parts, kind) => {
          const { code, issues } = errorOf(() =>
            parseStudy({ ...parts, format: 'voltiplano/study', version: 1, kind }),
          );
          expect(code).toBe('INVALID_STUDY');
          for (const { path, message } of issues) expect(message).toContain(path || 'study');
        },
      ),
      { seed: 3 },
    );
  });

  test('an unknown key anywhere is named by its path', () => {
    const objects = ['', ...paths].filter((path) => {
      const value = path === '' ? fresh() : at(fresh(), path).holder[at(fresh(), path).key];
      return typeof value === 'object' && value !== null && !Array.isArray(value);
    });
    expect(objects.length).toBeGreaterThan(20);
    for (const path of objects) {
      const json = fresh();
      const place = path === '' ? null : at(json, path);
      (place === null ? json : (place.holder[place.key] as Json)).sideways = 1;
      const expected = path ? `${path}.sideways` : 'sideways';
      expect(issuesOf(json)).toContainEqual({
        path: expected,
        rule: 'unknown-key',
        message: `${expected} is not a field of a study`,
      });
    }
  });

  test('a value of the wrong kind anywhere is named by its path, with the rule and the value', () => {
    const wrong = fc.constantFrom<unknown>(
      Number.NaN,
      Infinity,
      -Infinity,
      'seven',
      true,
      null,
      [],
      {},
      [[1]],
      1e300,
      -1e300,
    );
    fc.assert(
      fc.property(fc.constantFrom(...paths.filter((path) => path !== 'format')), wrong, (path, value) => {
        const json = fresh();
        const place = at(json, path);
        // A name may be any text.
        if (typeof place.holder[place.key] === 'string' && typeof value === 'string') return;
        place.holder[place.key] = value;
        const issues = issuesOf(json);
        // The field itself, its rows, or the rule of the table it stands in.
        const near = issues.filter((issue) => issue.path.startsWith(path) || path.startsWith(issue.path));
        expect(near.length).toBeGreaterThan(0);
        for (const issue of near) {
          expect(issue.rule).toMatch(/^[a-z-_]+$/);
          expect(issue.message).toContain(issue.path);
        }
        const own = issues.find((issue) => issue.path === path && issue.rule === 'type');
        if (own && typeof value !== 'object')
          expect(own.message).toContain(typeof value === 'string' ? `"${value}"` : String(value as number | boolean));
      }),
      { numRuns: 600, seed: 4 },
    );
  });

  test('a field left out is missing, by its path, or has a default', () => {
    const optional = new Set<string>();
    for (const path of paths.filter((path) => !/\[\d+\]$/.test(path) && path !== 'format')) {
      const json = fresh();
      const place = at(json, path);
      delete place.holder[place.key];
      try {
        parseSessionStudy(json);
        optional.add(path);
      } catch (error) {
        const { issues } = error as StudyError;
        // The anode is missed by the margin that needs it.
        expect(issues.map((issue) => issue.path)).toContain(path === 'cell.anode' ? 'strategy.anodeMarginMv' : path);
      }
    }
    for (const path of ['inlet', 'station.rampAPerS', 'cell.rcPairs', 'thermal.chiller', 'session.hotelW'])
      expect(optional).toContain(path);
    for (const path of ['cell', 'cell.r0Milliohm', 'thermal.plateWPerK', 'station.powerMaxKw', 'session.startSoc'])
      expect(optional).not.toContain(path);
  });

  test('every quantity is held to its range, and the message gives bound and value', () => {
    for (const path of paths) {
      const general = path.replace(/\[\d+\]/g, '[]');
      if (!(general in quantities)) continue;
      const { min, max, above } = quantities[general as keyof typeof quantities] as {
        min: number;
        max: number;
        above?: true;
      };
      for (const [value, bound] of [
        [above ? min : min - 1, above ? `above ${min}` : `at least ${min}`],
        [max * 2 + 1, `at most ${max}`],
      ] as const) {
        const json = fresh();
        const place = at(json, path);
        place.holder[place.key] = value;
        const issue = issuesOf(json).find((one) => one.path === path)!;
        expect(issue).toMatchObject({
          rule: 'range',
          value: String(value),
          message: `${path} must be ${bound}, but is ${value}`,
        });
      }
    }
  });

  test('reversed tables are refused at the row that falls back', () => {
    const tables = ['cell.entropicMvPerK.x', 'cell.resistanceShape.x', 'strategy.coldLimit.tempC'];
    for (const path of tables) {
      const json = fresh();
      const { holder, key } = at(json, path);
      (holder[key] as number[]).reverse();
      expect(issuesOf(json)).toContainEqual(expect.objectContaining({ path: `${path}[1]`, rule: 'must-rise' }));
    }
    for (const path of ['strategy.taper.steps', 'station.powerSteps']) {
      const json = fresh();
      const { holder, key } = at(json, path);
      (holder[key] as Json[]).reverse();
      const [issue] = issuesOf(json);
      expect(issue).toMatchObject({
        rule: 'must-rise',
        path: expect.stringMatching(/\[1\]\.(fromSoc|atMin)$/) as string,
      });
      expect(issue.message).toMatch(/must rise from row to row, but is [\d.]+ after [\d.]+$/);
    }
  });

  test('tables of unlike columns, and of one row', () => {
    const json = fresh();
    (json.cell as { entropicMvPerK: { y: number[] } }).entropicMvPerK.y.pop();
    expect(issuesOf(json)).toContainEqual(expect.objectContaining({ path: 'cell.entropicMvPerK.y', rule: 'shape' }));
    const short = fresh();
    (short.cell as Json).resistanceShape = { x: [0.5], y: [1] };
    expect(issuesOf(short).map(({ path }) => path)).toContain('cell.resistanceShape.x');
  });

  test('bands and windows the wrong way round name both ends', () => {
    const cases: [string, string, number][] = [
      ['thermal.chiller', 'fullC', -20],
      ['thermal.radiator', 'fullC', -20],
      ['thermal.heater', 'offC', -50],
      ['inlet', 'derateToC', -10],
      ['strategy.hotDerate', 'toC', -30],
      ['station', 'voltageMaxV', 2],
      ['cell', 'vMinV', 9],
    ];
    for (const [part, key, value] of cases) {
      const json = fresh();
      const place = at(json, part);
      (place.holder[place.key] as Json)[key] = value;
      const issue = issuesOf(json).find(({ rule }) => rule === 'must-lie-above')!;
      expect(issue.path.startsWith(part) || part === 'cell').toBe(true);
      expect(issue.message).toMatch(/must lie above .+ \(-?[\d.]+\), but is -?[\d.]+/);
    }
    const json = fresh();
    (json.pack as Json).socWindow = [0.9, 0.1];
    expect(issuesOf(json)).toContainEqual(
      expect.objectContaining({ path: 'pack.socWindow[1]', rule: 'must-lie-above' }),
    );
  });

  test('reads a study without changing what it was given', () => {
    const json = fresh();
    parseSessionStudy(json);
    expect(json).toEqual(fresh());
  });
});
