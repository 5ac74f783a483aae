import { mkdtempSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import type { SessionResult, TuneResult } from '../src/index.ts';
import { runCommand } from './commands.ts';

const EXAMPLES = fileURLToPath(new URL('../../examples/', import.meta.url));
const WARM = join(EXAMPLES, 'vicuna-warm-arrival.json');

function voltiplano(...args: string[]) {
  let out = '';
  let err = '';
  const code = runCommand(args, { out: (text) => (out += text), err: (text) => (err += text) });
  return { code, out, err };
}

const formatOf = (file: string) =>
  (JSON.parse(readFileSync(join(EXAMPLES, file), 'utf8')) as { format: string }).format;
const jsonFiles = readdirSync(EXAMPLES).filter((file) => file.endsWith('.json'));
const exampleFiles = jsonFiles.filter((file) => formatOf(file) === 'voltiplano/study');
const tuneFiles = jsonFiles.filter((file) => formatOf(file) === 'voltiplano/tune');

describe('run', () => {
  test.each(exampleFiles)('examples/%s runs and its README says what it shows', (file) => {
    expect(readFileSync(join(EXAMPLES, 'README.md'), 'utf8')).toContain(`\`${file}\``);
    const { code, out, err } = voltiplano('run', join(EXAMPLES, file));
    expect(err).toBe('');
    expect(code).toBe(0);
    expect(out).toContain('A simulation is not a test.');
    expect(out.split('\n').length).toBeLessThan(40);
  });

  test('--json - writes exactly the keys of a session result, and nothing else', () => {
    const { code, out } = voltiplano('run', WARM, '--json', '-');
    expect(code).toBe(0);
    const result = JSON.parse(out) as SessionResult;
    const head = ['format', 'version', 'kind', 'title', 'metrics', 'energyLedger', 'thermalLedger', 'events', 'series'];
    expect(Object.keys(result)).toEqual(head);
    const columns = Object.values(result.series).map((column) => column.length);
    expect(new Set(columns)).toEqual(new Set([result.series.tS.length]));
  });

  test('--every sets the grid, --csv writes the same rows that read back to the same numbers', () => {
    const folder = mkdtempSync(join(tmpdir(), 'voltiplano-'));
    const csv = join(folder, 'out.csv');
    const json = join(folder, 'out.json');
    expect(voltiplano('run', WARM, '--every', '120', '--csv', csv, '--json', json).code).toBe(0);
    const { series } = JSON.parse(readFileSync(json, 'utf8')) as SessionResult;
    const [header, ...rows] = readFileSync(csv, 'utf8').trim().split('\n');
    expect(header.split(',')).toEqual(Object.keys(series));
    expect(rows.map((row) => Number(row.split(',')[1]))).toEqual(series.soc);
    expect(series.tS).toContain(120);
    expect(series.tS).not.toContain(10);
  });

  test('--rtol tightens the integration: another last digit, the same minutes within 0.05 %', () => {
    const at = (...args: string[]) =>
      (JSON.parse(voltiplano('run', WARM, '--json', '-', ...args).out) as SessionResult).metrics.endMin;
    const [loose, tight] = [at(), at('--rtol', '1e-9')];
    expect(loose).not.toBe(tight);
    expect(Math.abs(loose / tight - 1)).toBeLessThan(5e-4);
  });

  test('reads standard input as - in its own process, and stays quiet when the reader leaves', () => {
    const main = fileURLToPath(new URL('./main.ts', import.meta.url));
    const input = readFileSync(WARM, 'utf8');
    const run = spawnSync(process.execPath, ['--import', 'tsx', main, 'run', '-'], { input, encoding: 'utf8' });
    expect(run.stderr).toBe('');
    expect(run.status).toBe(0);
    expect(run.stdout).toContain('10–80 %');
  }, 30_000);
});

describe('tune', () => {
  test('there are requests among the examples', () => expect(tuneFiles.length).toBeGreaterThan(0));

  test.each(tuneFiles)(
    'examples/%s finds a taper and its README says what it shows',
    (file) => {
      expect(readFileSync(join(EXAMPLES, 'README.md'), 'utf8')).toContain(`\`${file}\``);
      const json = join(mkdtempSync(join(tmpdir(), 'voltiplano-')), 'out.json');
      const { code, out, err } = voltiplano('tune', join(EXAMPLES, file), '--json', json);
      expect({ code, err }).toEqual({ code: 0, err: '' });
      expect(out).toContain('better than the present one');
      expect(out).toContain('A simulation is not a test.');
      const result = JSON.parse(readFileSync(json, 'utf8')) as TuneResult;
      expect(result.verdict).toBe('tuned');
      expect(result.tradeOff!.points.length).toBeGreaterThanOrEqual(6);
      expect(out).toContain(`${result.goal.tuned!.toFixed(2)} min`);
    },
    120_000,
  );

  test('check reads requests, and schema tune prints the JSON Schema that is kept in engine/schema', () => {
    expect(voltiplano('check', join(EXAMPLES, tuneFiles[0])).out).toMatch(/^Valid: a request to tune, “/);
    const kept = readFileSync(fileURLToPath(new URL('../schema/tune.schema.json', import.meta.url)), 'utf8');
    expect(JSON.parse(voltiplano('schema', 'tune').out)).toEqual(JSON.parse(kept));
  });

  test('a study is no request: exit code 2, and the field', () => {
    expect(voltiplano('tune', WARM)).toEqual({
      code: 2,
      out: '',
      err: 'Not a tuning: format must be "voltiplano/tune", but is "voltiplano/study"\n',
    });
  });
});

describe('errors end with exit code 2 and say what is wrong', () => {
  const study = () => JSON.parse(readFileSync(WARM, 'utf8')) as Record<string, Record<string, unknown>>;
  const written = (text: string) => {
    const file = join(mkdtempSync(join(tmpdir(), 'voltiplano-')), 'study.json');
    writeFileSync(file, text);
    return file;
  };

  test('a field out of range: path, rule and value', () => {
    const bad = study();
    bad.station.powerMaxKw = -5;
    const { code, out, err } = voltiplano('check', written(JSON.stringify(bad)));
    expect({ code, out, err }).toEqual({ code: 2, out: '', err: 'station.powerMaxKw must be above 0, but is -5\n' });
  });

  test('a station below the pack’s voltage refuses the session', () => {
    const bad = study();
    Object.assign(bad.station, { voltageMinV: 100, voltageMaxV: 250 });
    const { code, err } = voltiplano('run', written(JSON.stringify(bad)));
    expect(code).toBe(2);
    expect(err).toMatch(/^Cannot start: the pack rests at \d+ V, above this station’s 250 V\. Add a boost converter/);
  });

  test.each([
    ['no such file', ['run', 'nowhere.json'], /nowhere\.json/],
    ['not JSON', ['check', written('{')], /as JSON/],
    ['unknown command', ['fly', WARM], /Unknown command "fly"/],
    ['unknown option', ['run', WARM, '--fast'], /--fast/],
    ['a grid that is no number', ['run', WARM, '--every', 'x'], /--every must be a number from 0\.01/],
    ['two outputs on one stream', ['run', WARM, '--json', '-', '--csv', '-'], /cannot both/],
  ])('%s', (_, args, message) => {
    const { code, out, err } = voltiplano(...args);
    expect(code).toBe(2);
    expect(out).toBe('');
    expect(err).toMatch(message);
  });
});

test('schema prints the JSON Schema that is kept in engine/schema', () => {
  const kept = readFileSync(fileURLToPath(new URL('../schema/study.schema.json', import.meta.url)), 'utf8');
  expect(JSON.parse(voltiplano('schema').out)).toEqual(JSON.parse(kept));
});
