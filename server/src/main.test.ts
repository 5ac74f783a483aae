import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';

const MAIN = path.join(import.meta.dirname, 'main.ts');
const START_PATIENCE_MS = 20_000;

let dir: string;
let running: ChildProcess | undefined;

beforeAll(() => {
  dir = mkdtempSync(path.join(tmpdir(), 'voltiplano-main-'));
  writeFileSync(path.join(dir, 'index.html'), '<!doctype html>');
});

afterEach(() => {
  running?.kill('SIGKILL');
});

afterAll(() => {
  rmSync(dir, { recursive: true });
});

function start(env: Record<string, string>) {
  const child = spawn(process.execPath, ['--import', 'tsx', MAIN], {
    env: { ...process.env, STUDIO_DIR: dir, DATA_DIR: path.join(dir, 'data'), PORT: '0', LOG_LEVEL: 'silent', ...env },
  });
  running = child;
  let stdout = '';
  let stderr = '';
  child.stdout.on('data', (chunk: Buffer) => (stdout += chunk.toString()));
  child.stderr.on('data', (chunk: Buffer) => (stderr += chunk.toString()));
  const address = new Promise<string>((resolve, reject) => {
    child.stdout.on('data', () => {
      const found = /Voltiplano: (http:\S+)\n/.exec(stdout)?.[1];
      if (found) resolve(found);
    });
    child.once('exit', () => {
      reject(new Error(`ended before it listened: ${stderr}`));
    });
  });
  address.catch(() => undefined);
  return { child, address, output: () => ({ stdout, stderr }) };
}

describe('main', () => {
  it.each(['SIGTERM', 'SIGINT'] as const)(
    'prints its address, answers there, and ends well on %s',
    async (signal) => {
      const { child, address, output } = start({});
      const health = await fetch(`${await address}/api/health`);
      expect(await health.json()).toMatchObject({ status: 'ok', version: expect.stringMatching(/^\d+\.\d+\.\d+$/) });
      expect(output().stdout).toContain(`The desk needs no account: ${await address}/try`);
      expect(existsSync(path.join(dir, 'data'))).toBe(true);
      child.kill(signal);
      const [code] = await once(child, 'exit');
      expect(code).toBe(0);
    },
    START_PATIENCE_MS,
  );

  it(
    'says that the port is taken and ends with 1',
    async () => {
      const other = createServer().listen(0);
      await once(other, 'listening');
      const { port } = other.address() as AddressInfo;
      const { child, output } = start({ PORT: String(port) });
      const [code] = await once(child, 'close');
      other.close();
      expect(code).toBe(1);
      expect(output().stderr).toBe(
        `Port ${port} is taken. Stop the program that uses it, or set PORT to another port.\n`,
      );
    },
    START_PATIENCE_MS,
  );

  it(
    'says that the studio is not built and ends with 1',
    async () => {
      const { child, output } = start({ STUDIO_DIR: path.join(dir, 'none') });
      const [code] = await once(child, 'close');
      expect(code).toBe(1);
      expect(output().stderr).toMatch(/^The studio is not built in .*none\. Build it with "npm run build"\.\n$/);
    },
    START_PATIENCE_MS,
  );
});
