import { mkdtempSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import { CELL, decodeSweep, encodeSweep, engineVersion, parseSweepText, runCells, SweepResult } from '../src/index.ts';
import { runCommand } from './commands.ts';
import { sweepCommand } from './sweep-command.ts';

const EXAMPLES = fileURLToPath(new URL('../../examples/sweeps/', import.meta.url));
const exampleFiles = readdirSync(EXAMPLES);
const textOf = (file: string) => readFileSync(join(EXAMPLES, file), 'utf8');
const folder = mkdtempSync(join(tmpdir(), 'voltiplano-sweep-'));

async function sweep(...args: string[]) {
  let out = '';
  let err = '';
  const code = await sweepCommand(args, { out: (text) => (out += text), err: (text) => (err += text) });
  return { code, out, err };
}

/** An example with another question asked of its base. */
function written(name: string, file: string, ask: object): string {
  const path = join(folder, name);
  const study = JSON.parse(textOf(file)) as Record<string, unknown>;
  writeFileSync(path, JSON.stringify({ ...study, sweep: ask }));
  return path;
}
const small = () =>
  written('small.json', 'cold-arrival.json', {
    axes: [
      { path: 'session.startTempC', values: [0, 20] },
      { path: 'station.voltageMaxV', values: [250, 920] },
    ],
  });

test.each(exampleFiles)('examples/sweeps/%s is valid, its README says what it shows, and cells of it run', (file) => {
  expect(readFileSync(join(EXAMPLES, '../README.md'), 'utf8')).toContain(`\`sweeps/${file}\``);
  const plan = parseSweepText(textOf(file));
  expect([...runCells(plan, [0, plan.size >> 1, plan.size - 1]).status]).toEqual([CELL.done, CELL.done, CELL.done]);
  let out = '';
  expect(runCommand(['check', join(EXAMPLES, file)], { out: (text) => (out += text), err: () => {} })).toBe(0);
  expect(out).toBe(`Valid: a sweep of ${plan.size} runs, “${plan.title}”.\n`);
});

describe('sweep', () => {
  test('prints a summary, says what failed and why, and tells progress on the other stream', async () => {
    const { code, out, err } = await sweep(small());
    expect(code).toBe(0);
    expect(out).toContain('Start temperature       2: 0 to 20 °C');
    expect(out).toContain('2 cells failed\n  1 × Cannot start: the pack rests at ');
    expect(out).toContain('A simulation is not a test.');
    expect(err).toContain('4 of 4 cells, 2 failed\n');
  });

  test('--csv has a row per cell: axes, status, metrics that read back to the same numbers, the reason of a failure', async () => {
    const { out } = await sweep(small(), '--csv', '-');
    const [header, ...rows] = out.trimEnd().split('\n');
    const names = header.split(',');
    expect(names.slice(0, 5)).toEqual(['cell', 'session.startTempC', 'station.voltageMaxV', 'status', 'minutes0To50']);
    expect(rows).toHaveLength(4);
    const plan = parseSweepText(readFileSync(small(), 'utf8'));
    const { values } = runCells(plan, [3]);
    const last = rows[3].split(',');
    expect(last.slice(0, 4)).toEqual(['3', '20', '920', 'done']);
    expect(Number(last[names.indexOf('endMin')])).toBe(values[plan.columns.indexOf('endMin')]);
    expect(last[names.indexOf('endReason')]).toBe('target');
    expect(rows[0]).toMatch(/^0,0,250,failed,,+"Cannot start: .*, above this station’s 250 V\..*"$/);
  });

  test('--json holds axes, metrics, columns and failures', async () => {
    const json = join(folder, 'out.json');
    const { out } = await sweep(small(), '--json', json);
    expect(out).toContain('cells failed');
    const result = JSON.parse(readFileSync(json, 'utf8'));
    expect(result).toMatchObject({
      format: 'voltiplano/result',
      version: 1,
      kind: 'sweep',
      cells: 4,
      done: 2,
      failed: 2,
    });
    expect(result.axes[0]).toMatchObject({ label: 'Start temperature', unit: '°C', values: [0, 20] });
    expect(result.columns.minutes10To80).toHaveLength(4);
    expect(result.columns.minutes10To80[0]).toBeNull();
    expect(result.failures).toMatchObject([
      { cell: 0, code: 'REFUSED' },
      { cell: 2, code: 'REFUSED' },
    ]);
  });

  test('a sensitivity prints its inputs by effect, a spread its percentiles; --json holds rows and bands', async () => {
    const moved = written('moved.json', 'what-matters.json', {
      sensitivity: {
        inputs: [
          { path: 'station.powerMaxKw', minus: 0.01, plus: 0 },
          { path: 'strategy.taper.factor', minus: 0.2, plus: 0.1 },
        ],
      },
    });
    const { out } = await sweep(moved);
    expect(out).toMatch(
      /10–80 % \[min\], against [\d.]+ in the base\n {2}Taper, all values +0\.8: \+[\d.]+ +1\.1: −[\d.]+\n {2}Station power, most/,
    );
    const spread = written('spread.json', 'ageing-fleet.json', {
      spread: { runs: 10, inputs: [{ path: 'session.ambientC', distribution: 'uniform', from: 5, to: 30 }] },
    });
    const result = JSON.parse((await sweep(spread, '--json', '-')).out);
    expect(result.spread.inputs[0].samples).toHaveLength(10);
    expect(result.spread.metrics.minutes10To80.percentiles).toHaveLength(5);
    expect(result.spread.curve).toHaveLength(41);
  });

  test('threads give the same bytes as one', async () => {
    const [one, two] = [
      await sweep(small(), '--csv', '-', '--jobs', '1'),
      await sweep(small(), '--csv', '-', '--jobs', '2'),
    ];
    expect(two.out).toBe(one.out);
  }, 30_000);

  test('--keep carries on from what was finished, and refuses results of another sweep', async () => {
    const kept = join(folder, 'kept.vps');
    const plan = parseSweepText(readFileSync(small(), 'utf8'));
    const half = new SweepResult(plan);
    half.merge(runCells(plan, [1, 2]));
    // No run gives this: it can only come from the file.
    half.column('endMin')[1] = 12345;
    writeFileSync(kept, encodeSweep(half, engineVersion));
    const { out, err } = await sweep(small(), '--keep', kept, '--csv', '-');
    expect(err).toMatch(/4 of 4 cells, 2 failed\n$/);
    const [header, ...rows] = out.trimEnd().split('\n');
    const endMin = rows.map((row) => row.split(',')[header.split(',').indexOf('endMin')]);
    expect(endMin[1]).toBe('12345');
    expect(Number(endMin[3])).toBeGreaterThan(10);
    expect(decodeSweep(readFileSync(kept), plan, engineVersion).pending()).toHaveLength(0);
    const other = await sweep(join(EXAMPLES, 'cold-arrival.json'), '--keep', kept);
    expect(other.code).toBe(2);
    expect(other.err).toMatch(/^These results belong to another sweep/);
  });

  test.each([
    ['no file', [], /sweep needs a sweep file/],
    ['no such file', ['nowhere.json'], /nowhere\.json/],
    ['two files', ['a.json', 'b.json'], /takes one sweep file, but was given 2/],
    [
      'jobs that are no number',
      [small(), '--jobs', 'all'],
      /--jobs must be a whole number from 1 to 256, but is "all"/,
    ],
    ['a plain study', [join(EXAMPLES, '../vicuna-warm-arrival.json')], /^Not a sweep: format must be/],
    ['two outputs on one stream', [small(), '--json', '-', '--csv', '-'], /cannot both/],
  ])('%s ends with exit code 2', async (_, args, message) => {
    const { code, out, err } = await sweep(...args);
    expect({ code, out }).toEqual({ code: 2, out: '' });
    expect(err).toMatch(message);
  });

  test('a value out of range: path, input, rule and value', async () => {
    const bad = written('bad.json', 'cold-arrival.json', { axes: [{ path: 'session.ambientC', values: [0, 99] }] });
    expect((await sweep(bad)).err).toBe('sweep.axes[0].values[1] (Ambient) must be at most 70 °C, but is 99\n');
  });

  test('takes a sweep on standard input in its own process', () => {
    const main = fileURLToPath(new URL('./main.ts', import.meta.url));
    const input = readFileSync(small(), 'utf8');
    const args = ['--import', 'tsx', main, 'sweep', '-', '--csv', '-'];
    const run = spawnSync(process.execPath, args, { input, encoding: 'utf8' });
    expect(run.status).toBe(0);
    expect(run.stdout.split('\n')).toHaveLength(6);
  }, 30_000);
});

test('schema sweep prints the JSON Schema that is kept in engine/schema', () => {
  const kept = readFileSync(fileURLToPath(new URL('../schema/sweep.schema.json', import.meta.url)), 'utf8');
  let out = '';
  runCommand(['schema', 'sweep'], { out: (text) => (out += text), err: () => {} });
  expect(JSON.parse(out)).toEqual(JSON.parse(kept));
});
