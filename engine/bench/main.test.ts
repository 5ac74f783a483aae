import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { expect, test } from 'vitest';

test('bench --json writes three numbers for each of the two sessions, and skips the C program in one line', () => {
  const directory = mkdtempSync(path.join(tmpdir(), 'bench-'));
  const file = path.join(directory, 'bench.json');
  const main = path.join(import.meta.dirname, 'main.ts');
  const env = { ...process.env, VOLTIPLANO_ANCHOR_DIR: '' };
  try {
    const said = execFileSync(process.execPath, ['--import', 'tsx', main, '--json', file, '--turns', '1'], {
      encoding: 'utf8',
      env,
    });
    expect(said.split('\n').filter((line) => line.includes('skipped'))).toHaveLength(1);
    const numbers = {
      msPerRun: expect.any(Number),
      evaluations: expect.any(Number),
      microsPerEvaluation: expect.any(Number),
    };
    const written = JSON.parse(readFileSync(file, 'utf8'));
    expect(written).toEqual({ b1: numbers, b12: numbers });
    // The same session in one segment and in twelve: a thousand evaluations or two, and no longer than the run they are part of.
    for (const { msPerRun, evaluations, microsPerEvaluation } of Object.values<Record<string, number>>(written)) {
      expect(evaluations).toBeGreaterThan(500);
      expect(evaluations).toBeLessThan(3000);
      expect(microsPerEvaluation).toBeGreaterThan(0);
      expect((evaluations * microsPerEvaluation) / 1000).toBeLessThan(msPerRun);
    }
  } finally {
    rmSync(directory, { recursive: true });
  }
}, 60_000);
