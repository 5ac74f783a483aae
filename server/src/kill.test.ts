import type { ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import Sqlite from 'better-sqlite3';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { accountEndpoints as account } from './contract/account.ts';
import { libraryEndpoints as library } from './contract/library.ts';
import { workspaceEndpoints as workspaces } from './contract/workspace.ts';
import { examplePart } from './testing/example-parts.ts';
import { type ServerProcess, startServerProcess, untilKilled } from './testing/server-process.ts';
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

async function start(): Promise<ServerProcess> {
  const started = await startServerProcess(dir);
  running = started.child;
  return started;
}

/** What was acknowledged: ids of workspaces, and revisions of cells as `<id> r<revision>`. */
type Acknowledged = { workspaces: string[]; revisions: string[] };

/** Makes one workspace after another until the server is gone. */
function makeWorkspaces(browser: TestBrowser, { workspaces: ids }: Acknowledged): Promise<void> {
  return untilKilled(async () => {
    const { status, body } = await browser.call(workspaces.createWorkspace, { body: { name: 'Written' } });
    if (status === 201) ids.push(body.id as string);
  });
}

/** Makes one revision of a cell after another until the server is gone. */
async function reviseCell(browser: TestBrowser, workspaceId: string, { revisions }: Acknowledged): Promise<void> {
  const said = { name: 'Vicuña cell', notes: '', source: '', body: examplePart('cell') };
  const params = { workspaceId };
  const { body: cell } = await browser.call(library.createLibraryItem, { params, body: { kind: 'cell', ...said } });
  const at = { workspaceId, itemId: cell.id as string };
  let revision = 1;
  await untilKilled(async () => {
    const headers = { 'If-Match': `"r${revision}"` };
    const body = { ...said, notes: `after ${revision}` };
    const answer = await browser.call(library.reviseLibraryItem, { params: at, body, headers });
    expect(answer.status).toBe(201);
    revision = answer.body.revision as number;
    revisions.push(`${at.itemId} r${revision}`);
  });
}

describe('kill -9 in the middle of writes', () => {
  it.each([40, 400])(
    'keeps every write that was acknowledged, after %i of them, and the file whole',
    async (count) => {
      const { child, address } = await start();
      const browser = new TestBrowser(address);
      const person = { email: 'ines@puna.example', name: 'Ines', password: 'a windy plateau', workspaceName: 'First' };
      expect((await browser.call(account.signUp, { body: person })).status).toBe(201);
      const { body: me } = await browser.call(account.readMe);
      const { workspaceId } = me.workspaces[0] as { workspaceId: string };
      const acknowledged: Acknowledged = { workspaces: [], revisions: [] };
      const writers = Array.from({ length: WRITERS }, (_one, i) =>
        i % 2 === 0 ? makeWorkspaces(browser, acknowledged) : reviseCell(browser, workspaceId, acknowledged),
      );
      while (acknowledged.workspaces.length + acknowledged.revisions.length < count)
        await new Promise((resolve) => setTimeout(resolve, 1));
      child.kill('SIGKILL');
      await Promise.all([once(child, 'exit'), ...writers]);

      const database = new Sqlite(path.join(dir, 'voltiplano.db'));
      expect(database.pragma('integrity_check', { simple: true })).toBe('ok');
      expect(database.pragma('foreign_key_check')).toEqual([]);
      const kept = new Set(database.prepare<[], string>('SELECT id FROM workspaces').pluck().all());
      const owned = database.prepare("SELECT count(*) FROM members WHERE role = 'owner'").pluck().get();
      const revised = database
        .prepare<[], string>("SELECT itemId || ' r' || revision FROM libraryRevisions WHERE revision > 1")
        .pluck()
        .all();
      const torn = database
        .prepare(
          `SELECT id FROM libraryItems WHERE revision <> (SELECT count(*) FROM libraryRevisions WHERE itemId = id)
            OR revision <> (SELECT count(*) FROM activity WHERE subjectId = libraryItems.id)`,
        )
        .pluck()
        .all();
      database.exec("INSERT INTO librarySearch (librarySearch) VALUES ('integrity-check')");
      database.close();
      expect(acknowledged.workspaces.length).toBeGreaterThan(0);
      expect(acknowledged.revisions.length).toBeGreaterThan(0);
      expect(acknowledged.workspaces.filter((id) => !kept.has(id))).toEqual([]);
      expect(acknowledged.revisions.filter((one) => !revised.includes(one))).toEqual([]);
      // A revision, the head of its item and the line in the log are one write: all or none.
      expect(torn).toEqual([]);
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
