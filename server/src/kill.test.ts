import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import Sqlite from 'better-sqlite3';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { accountEndpoints as account } from './contract/account.ts';
import { workspaceEndpoints as workspaces } from './contract/workspace.ts';
import { TestBrowser } from './testing/test-browser.ts';

const PATIENCE_MS = 60_000;
const WRITERS = 4;

let dir: string;
let running: ChildProcess | undefined;

beforeEach(() => {
  dir = mkdtempSync(path.join(tmpdir(), 'voltiplano-kill-'));
  writeFileSync(path.join(dir, 'index.html'), '<!doctype html>');
});
afterEach(() => {
  running?.kill('SIGKILL');
  rmSync(dir, { recursive: true });
});

async function start(): Promise<{ child: ChildProcess; address: string }> {
  const child = spawn(process.execPath, ['--import', 'tsx', path.join(import.meta.dirname, 'main.ts')], {
    env: { ...process.env, NODE_ENV: 'test', STUDIO_DIR: dir, DATA_DIR: dir, PORT: '0', LOG_LEVEL: 'silent' },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  running = child;
  let stdout = '';
  const address = await new Promise<string>((resolve, reject) => {
    child.stdout.on('data', (chunk: Buffer) => {
      stdout += chunk.toString();
      const found = /Voltiplano: (http:\S+)\n/.exec(stdout)?.[1];
      if (found) resolve(found);
    });
    child.once('exit', () => {
      reject(new Error(`The server did not start: ${stdout}`));
    });
  });
  return { child, address };
}

/** Makes one workspace after another until the server is gone. Answers the ids that were acknowledged. */
async function writeUntilKilled(browser: TestBrowser, acknowledged: string[]): Promise<void> {
  for (;;) {
    try {
      const { status, body } = await browser.call(workspaces.createWorkspace, { body: { name: 'Written' } });
      if (status === 201) acknowledged.push(body.id as string);
    } catch (error) {
      // fetch rejects with a TypeError when the connection breaks; anything else is a fault of the test.
      if (error instanceof TypeError) return;
      throw error;
    }
  }
}

describe('kill -9 in the middle of writes', () => {
  it.each([40, 400])(
    'keeps every write that was acknowledged, after %i of them, and the file whole',
    async (count) => {
      const { child, address } = await start();
      const browser = new TestBrowser(address);
      const person = { email: 'ines@puna.example', name: 'Ines', password: 'a windy plateau', workspaceName: 'First' };
      expect((await browser.call(account.signUp, { body: person })).status).toBe(201);
      const acknowledged: string[] = [];
      const writers = Array.from({ length: WRITERS }, () => writeUntilKilled(browser, acknowledged));
      while (acknowledged.length < count) await new Promise((resolve) => setTimeout(resolve, 1));
      child.kill('SIGKILL');
      await Promise.all([once(child, 'exit'), ...writers]);

      const database = new Sqlite(path.join(dir, 'voltiplano.db'));
      expect(database.pragma('integrity_check', { simple: true })).toBe('ok');
      expect(database.pragma('foreign_key_check')).toEqual([]);
      const kept = new Set(database.prepare<[], string>('SELECT id FROM workspaces').pluck().all());
      const owned = database.prepare("SELECT count(*) FROM members WHERE role = 'owner'").pluck().get();
      database.close();
      expect(acknowledged.filter((id) => !kept.has(id))).toEqual([]);
      // A workspace and its owner are one write: both or neither.
      expect(owned).toBe(kept.size);

      const again = await start();
      const back = new TestBrowser(again.address);
      const signIn = await back.call(account.signIn, { body: { email: person.email, password: person.password } });
      expect(signIn.body.workspaces).toHaveLength(kept.size);
    },
    PATIENCE_MS,
  );
});
