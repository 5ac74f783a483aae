import type { ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import Sqlite from 'better-sqlite3';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { accountEndpoints as account } from '../contract/account.ts';
import { libraryEndpoints as library } from '../contract/library.ts';
import { exampleStudy } from '../testing/example-study.ts';
import { startServerProcess, untilKilled } from '../testing/server-process.ts';
import { StudyCalls } from '../testing/study-calls.ts';
import { TestBrowser } from '../testing/test-browser.ts';

const PATIENCE_MS = 90_000;
const WRITERS = 3;
/** Autosaves from one revision to the next. */
const WRITES_PER_REVISION = 5;

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

/** What one writer was told is kept: the version of the working copy, and how many revisions. */
type Acknowledged = { studyId: string; version: number; revision: number };

const warm = exampleStudy();
const titleAt = (version: number) => `Taper of version ${version}`;

/** Writes a study's working copy, and now and then a revision, until the server is gone. */
async function writeStudy(calls: StudyCalls, itemId: string, acknowledged: Acknowledged[]): Promise<void> {
  const { body } = await calls.create({ inputs: { ...warm, title: titleAt(1) } });
  const own: Acknowledged = { studyId: body.id as string, version: 1, revision: 1 };
  acknowledged.push(own);
  await untilKilled(async () => {
    const next = own.version + 1;
    // Versions of an even number refer to the library, so that a torn write would show.
    const parts = next % 2 === 0 ? [{ part: 'thermal', itemId, revision: 1 } as const] : [];
    const written = await calls.write(own.studyId, own.version, { inputs: { ...warm, title: titleAt(next) }, parts });
    expect(written.body.version).toBe(next);
    own.version = next;
    if (next % WRITES_PER_REVISION > 0) return;
    const saved = await calls.save(own.studyId, next, `Saved at ${next}`);
    expect(saved.status).toBe(201);
    own.revision = saved.body.revision as number;
  });
}

async function signUp(address: string): Promise<StudyCalls> {
  const browser = new TestBrowser(address);
  const person = { email: 'ines@puna.example', name: 'Ines', password: 'a windy plateau', workspaceName: 'First' };
  expect((await browser.call(account.signUp, { body: person })).status).toBe(201);
  const { body } = await browser.call(account.readMe);
  return new StudyCalls(browser, (body.workspaces as { workspaceId: string }[])[0]!.workspaceId);
}

type StudyRow = { id: string; number: number; workingVersion: number; newestRevision: number; workingInputs: string };
type RevisionRow = { studyId: string; revision: number; message: string; inputs: string };

describe('kill -9 while studies are written', () => {
  it.each([30, 150])(
    'keeps every version and revision that was acknowledged, after %i versions, each whole',
    async (count) => {
      const { child, address } = await startServerProcess(dir);
      running = child;
      const calls = await signUp(address);
      const item = await calls.browser.call(library.createLibraryItem, {
        params: { workspaceId: calls.workspaceId },
        body: { kind: 'thermal', name: 'Two plates', body: warm.thermal },
      });
      const acknowledged: Acknowledged[] = [];
      const writers = Array.from({ length: WRITERS }, () => writeStudy(calls, item.body.id as string, acknowledged));
      const versions = () => acknowledged.reduce((sum, { version }) => sum + version, 0);
      while (versions() < count || acknowledged.length < WRITERS)
        await new Promise((resolve) => setTimeout(resolve, 1));
      child.kill('SIGKILL');
      await Promise.all([once(child, 'exit'), ...writers]);
      expect(Math.max(...acknowledged.map(({ revision }) => revision))).toBeGreaterThan(1);
      judge(acknowledged);
    },
    PATIENCE_MS,
  );
});

function judge(acknowledged: readonly Acknowledged[]): void {
  const database = new Sqlite(path.join(dir, 'voltiplano.db'));
  expect(database.pragma('integrity_check', { simple: true })).toBe('ok');
  expect(database.pragma('foreign_key_check')).toEqual([]);
  database.exec("INSERT INTO studySearch (studySearch) VALUES ('integrity-check')");
  const studies = database.prepare<[], StudyRow>('SELECT * FROM studies ORDER BY number').all();
  expect(studies.map(({ number }) => number)).toEqual(studies.map((_one, i) => i + 1));
  for (const { studyId, version, revision } of acknowledged) {
    const stored = studies.find(({ id }) => id === studyId)!;
    // One write may have been kept whose answer did not arrive.
    expect([version, version + 1]).toContain(stored.workingVersion);
    expect([revision, revision + 1]).toContain(stored.newestRevision);
    // Row, references and index are one write: all or none.
    const title = titleAt(stored.workingVersion);
    expect(JSON.parse(stored.workingInputs)).toEqual({ ...warm, title });
    const parts = database.prepare('SELECT count(*) FROM studyParts WHERE studyId = ?').pluck().get(studyId);
    expect(parts).toBe(stored.workingVersion % 2 === 0 ? 1 : 0);
    const found = database
      .prepare(
        'SELECT studies.id FROM studySearch JOIN studies ON studies.seq = studySearch.rowid WHERE studySearch = ?',
      )
      .pluck()
      .all(`title : "version ${stored.workingVersion}"`);
    expect(found).toContain(studyId);
    const revisions = database
      .prepare<[string], RevisionRow>('SELECT * FROM studyRevisions WHERE studyId = ? ORDER BY revision')
      .all(studyId);
    expect(revisions.map((row) => row.revision)).toEqual(
      Array.from({ length: stored.newestRevision }, (_n, i) => i + 1),
    );
    for (const { revision: number, message, inputs } of revisions.slice(1)) {
      const at = (number - 1) * WRITES_PER_REVISION;
      expect(message).toBe(`Saved at ${at}`);
      expect(JSON.parse(inputs)).toEqual({ ...warm, title: titleAt(at) });
    }
    const deeds = database.prepare('SELECT count(*) FROM activity WHERE subjectId = ?').pluck().get(studyId);
    expect(deeds).toBe(stored.newestRevision);
  }
  database.close();
}
