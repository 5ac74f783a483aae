import { chmodSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { findAnchor } from './anchor.ts';

let directory: string;

beforeEach(() => {
  directory = mkdtempSync(path.join(tmpdir(), 'anchor-'));
});

afterEach(() => {
  vi.unstubAllEnvs();
  rmSync(directory, { recursive: true });
});

function program(name: string, says: string): void {
  const file = path.join(directory, name);
  writeFileSync(file, `#!/bin/sh\necho "${says}"\n`);
  chmodSync(file, 0o755);
}

test('findAnchor says why the comparison is skipped: no directory named, or a program missing', () => {
  vi.stubEnv('VOLTIPLANO_ANCHOR_DIR', undefined);
  expect(findAnchor()).toEqual({ skipped: expect.stringContaining('VOLTIPLANO_ANCHOR_DIR') });
  vi.stubEnv('VOLTIPLANO_ANCHOR_DIR', directory);
  program('cvode_m1', '');
  expect(findAnchor()).toEqual({ skipped: expect.stringContaining('cvode_m12') });
});

test('findAnchor reads the median that the program prints, and refuses one that prints none', () => {
  vi.stubEnv('VOLTIPLANO_ANCHOR_DIR', directory);
  program('cvode_m1', '$1 $2 $3 $4  median 3.6298 ms (min 3.4133)');
  program('cvode_m12', 'no time');
  const anchor = findAnchor();
  if (!('time' in anchor)) throw new Error(anchor.skipped);
  expect(anchor.time('b1')).toBe(3.6298);
  expect(() => anchor.time('b12')).toThrow(/did not print its median/);
});
