import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { existsSync, mkdtempSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import Sqlite from 'better-sqlite3';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';

const MAIN = path.join(import.meta.dirname, 'main.ts');
const START_PATIENCE_MS = 20_000;
/** The demo team takes some fifty runs of the engine. */
const DEMO_PATIENCE_MS = 120_000;

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
    env: {
      ...process.env,
      STUDIO_DIR: dir,
      DATA_DIR: path.join(dir, 'data'),
      DEMO: 'off',
      PORT: '0',
      LOG_LEVEL: 'silent',
      ...env,
    },
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

  it(
    'keeps its database and secrets in DATA_DIR, is ready, and offers the local mailbox',
    async () => {
      const { address, output } = start({});
      const ready = await fetch(`${await address}/api/ready`);
      expect(await ready.json()).toEqual({ status: 'ready' });
      expect(existsSync(path.join(dir, 'data/voltiplano.db'))).toBe(true);
      expect(statSync(path.join(dir, 'data/secret.key')).mode & 0o777).toBe(0o600);
      expect(output().stdout).toContain(`${await address}/api/v1/dev/mailbox`);
      expect((await fetch(`${await address}/api/v1/dev/mailbox`)).status).toBe(200);
    },
    START_PATIENCE_MS,
  );

  it(
    'has neither mailbox nor local provider in production',
    async () => {
      const { address, output } = start({
        NODE_ENV: 'production',
        PUBLIC_URL: 'https://volt.example',
        SMTP_URL: 'smtp://127.0.0.1:9',
      });
      const options = await fetch(`${await address}/api/v1/auth/options`);
      expect(await options.json()).toEqual({ provider: null, mailboxUrl: null });
      for (const gone of ['dev/mailbox', 'auth/oidc/start', 'auth/oidc/callback']) {
        expect((await fetch(`${await address}/api/v1/${gone}`)).status).toBe(404);
      }
      expect(output().stdout).not.toContain('mailbox');
    },
    START_PATIENCE_MS,
  );

  it(
    'gives cookies to https only where its public address is https',
    async () => {
      const { address } = start({ PUBLIC_URL: 'https://volt.example' });
      const response = await fetch(`${await address}/api/v1/auth/sign-up`, {
        method: 'POST',
        headers: { 'Content-Type': 'application/json', Origin: 'https://volt.example' },
        body: JSON.stringify({ email: 'a@b.example', name: 'A', password: 'a windy plateau', workspaceName: 'A' }),
      });
      expect(response.status).toBe(201);
      const cookies = response.headers.getSetCookie();
      expect(cookies).toHaveLength(3);
      for (const cookie of cookies) expect(cookie).toMatch(/; Secure/);
    },
    START_PATIENCE_MS,
  );

  it(
    'says which setting production lacks and ends with 1',
    async () => {
      const { child, output } = start({ NODE_ENV: 'production' });
      const [code] = await once(child, 'close');
      expect(code).toBe(1);
      expect(output().stderr).toBe('PUBLIC_URL is missing: set it to the address that people open.\n');
    },
    START_PATIENCE_MS,
  );

  it(
    'fills an empty directory with the demo team and prints its accounts, at each start',
    async () => {
      const DATA_DIR = path.join(dir, 'demo');
      const first = start({ DATA_DIR, DEMO: '' });
      await first.address;
      await expect.poll(() => first.output().stdout).toMatch(/\n {2}ines@puna\.example +Inés Quispe +owner\n/);
      const filled = countIn(DATA_DIR);
      expect(filled).toMatchObject({ people: 4, workspaces: 1, studies: 14 });
      await ended(first.child, 'SIGTERM');
      const second = start({ DATA_DIR, DEMO: 'off' });
      await second.address;
      await expect.poll(() => second.output().stdout).toMatch(/\n {2}tomas@puna\.example +Tomás Apaza +viewer\n/);
      expect(countIn(DATA_DIR)).toEqual(filled);
    },
    DEMO_PATIENCE_MS,
  );

  it(
    'is killed in the middle of that, finds nothing half at the next start, and fills it then',
    async () => {
      const DATA_DIR = path.join(dir, 'killed');
      const first = start({ DATA_DIR, DEMO: 'on', LOG_LEVEL: 'info' });
      await expect.poll(() => first.output().stdout, { timeout: START_PATIENCE_MS }).toContain('seeding the demo team');
      await new Promise((resolve) => setTimeout(resolve, 500));
      await ended(first.child, 'SIGKILL');
      expect(first.output().stdout).not.toContain('demo team seeded');
      expect(countIn(DATA_DIR)).toEqual({ people: 0, workspaces: 0, libraryItems: 0, studies: 0, activity: 0 });
      await start({ DATA_DIR, DEMO: 'on' }).address;
      expect(countIn(DATA_DIR)).toMatchObject({ people: 4, workspaces: 1, studies: 14 });
    },
    DEMO_PATIENCE_MS,
  );

  it.each([
    ['development with DEMO=off', { DEMO: 'off' }],
    [
      'production',
      { DEMO: '', NODE_ENV: 'production', PUBLIC_URL: 'https://volt.example', SMTP_URL: 'smtp://127.0.0.1:9' },
    ],
  ])(
    'starts empty in %s',
    async (_where, env) => {
      const DATA_DIR = mkdtempSync(path.join(dir, 'empty-'));
      const { address, output } = start({ ...env, DATA_DIR });
      await address;
      expect(countIn(DATA_DIR)).toEqual({ people: 0, workspaces: 0, libraryItems: 0, studies: 0, activity: 0 });
      expect(output().stdout).not.toContain('puna');
    },
    START_PATIENCE_MS,
  );
});

async function ended(child: ChildProcess, signal: NodeJS.Signals): Promise<void> {
  const exit = once(child, 'exit');
  child.kill(signal);
  await exit;
}

/** Rows of some tables in the database of a data directory. */
function countIn(dataDir: string): Record<string, number> {
  const db = new Sqlite(path.join(dataDir, 'voltiplano.db'), { readonly: true });
  try {
    const tables = ['people', 'workspaces', 'libraryItems', 'studies', 'activity'];
    const count = (table: string) => db.prepare<[], number>(`SELECT count(*) FROM ${table}`).pluck().get() ?? -1;
    return Object.fromEntries(tables.map((table) => [table, count(table)]));
  } finally {
    db.close();
  }
}
