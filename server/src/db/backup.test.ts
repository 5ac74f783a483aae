import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import Sqlite from 'better-sqlite3';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { backUpDatabase, restoreDatabase } from './backup.ts';
import { type Db, openDatabase } from './database.ts';
import { migrateToLatest } from './migrate.ts';

const NOW = new Date('2026-03-01T08:00:00Z');

let dir: string;
let file: string;
let copy: string;
let db: Db;

beforeEach(async () => {
  dir = mkdtempSync(path.join(tmpdir(), 'voltiplano-backup-'));
  file = path.join(dir, 'voltiplano.db');
  copy = path.join(dir, 'copy.db');
  db = openDatabase(file);
  await migrateToLatest(db);
  await add('first');
});
afterEach(async () => {
  await db.destroy();
  rmSync(dir, { recursive: true });
});

async function add(id: string): Promise<void> {
  await db.insertInto('workspaces').values({ id, name: id, createdAt: 0 }).execute();
}

function idsIn(of: string): unknown[] {
  const opened = new Sqlite(of, { readonly: true });
  const ids = opened.prepare('SELECT id FROM workspaces ORDER BY id').pluck().all();
  opened.close();
  return ids;
}

describe('backUpDatabase', () => {
  it('copies all that is committed while the database is in use, into one file', async () => {
    await backUpDatabase(file, copy);
    await add('second');
    expect(idsIn(copy)).toEqual(['first']);
    expect(readdirSync(dir).filter((name) => name.startsWith('copy'))).toEqual(['copy.db']);
  });

  it('is one moment of the database, however much is written meanwhile', async () => {
    const insert = (n: number) =>
      db.transaction().execute(async (transaction) => {
        for (const half of ['a', 'b']) {
          await transaction
            .insertInto('workspaces')
            .values({ id: `${n}${half}`, name: 'x'.repeat(5000), createdAt: 0 })
            .execute();
        }
      });
    for (let n = 0; n < 100; n += 1) await insert(n);
    const writing = (async () => {
      for (let n = 100; n < 200; n += 1) await insert(n);
    })();
    await backUpDatabase(file, copy);
    await writing;
    const pairs = idsIn(copy).filter((id) => id !== 'first');
    expect(pairs.length).toBeGreaterThanOrEqual(200);
    expect(pairs.filter((id) => String(id).endsWith('a'))).toHaveLength(pairs.length / 2);
  });

  it('overwrites nothing, and says where it looked', async () => {
    writeFileSync(copy, 'precious');
    await expect(backUpDatabase(file, copy)).rejects.toThrow('exists already');
    expect(readFileSync(copy, 'utf8')).toBe('precious');
    await expect(backUpDatabase(path.join(dir, 'none.db'), copy)).rejects.toThrow('Check DATA_DIR');
  });
});

describe('restoreDatabase', () => {
  it('brings the backup back and keeps what was there before', async () => {
    await backUpDatabase(file, copy);
    await add('second');
    await db.destroy();
    const before = restoreDatabase(copy, file, NOW);
    expect(idsIn(file)).toEqual(['first']);
    expect(before).toBe(`${file}.before-2026-03-01T08-00-00.000Z`);
    expect(idsIn(before ?? '')).toEqual(['first', 'second']);
    db = openDatabase(file);
    await migrateToLatest(db);
    await add('third');
    expect(idsIn(file)).toEqual(['first', 'third']);
  });

  it('works where there is no database yet', async () => {
    await backUpDatabase(file, copy);
    const other = path.join(dir, 'other.db');
    expect(restoreDatabase(copy, other, NOW)).toBeNull();
    expect(idsIn(other)).toEqual(['first']);
  });

  it('leaves a database alone that a server has open', async () => {
    await backUpDatabase(file, copy);
    await add('second');
    expect(() => restoreDatabase(copy, file, NOW)).toThrow('A server is using the database');
    expect(idsIn(file)).toEqual(['first', 'second']);
    await add('third');
  });

  it('refuses a damaged file, one of another program and one of a newer version', async () => {
    await backUpDatabase(file, copy);
    await db.destroy();
    const damaged = path.join(dir, 'damaged.db');
    const bytes = readFileSync(copy);
    writeFileSync(damaged, bytes.fill(0x5a, 5000, 60_000));
    const other = path.join(dir, 'other.db');
    writeFileSync(other, 'a text');
    const newer = new Sqlite(copy);
    newer.exec("INSERT INTO kysely_migration VALUES ('9999-later', '')");
    newer.close();
    expect(() => restoreDatabase(damaged, file, NOW)).toThrow(/is (damaged|no backup)/);
    expect(() => restoreDatabase(other, file, NOW)).toThrow('is no backup of this program');
    expect(() => restoreDatabase(copy, file, NOW)).toThrow('newer version: it has 9999-later');
    expect(() => restoreDatabase(path.join(dir, 'none'), file, NOW)).toThrow('There is no backup');
    expect(idsIn(file)).toEqual(['first']);
    expect(readdirSync(dir).filter((name) => name.includes('before') || name.includes('arriving'))).toEqual([]);
  });
});

describe('npm run backup and restore', () => {
  const run = (...args: string[]) =>
    spawnSync(process.execPath, ['--import', 'tsx', path.join(import.meta.dirname, 'backup-main.ts'), ...args], {
      env: { ...process.env, DATA_DIR: dir, INIT_CWD: dir },
      encoding: 'utf8',
    });

  it('work on DATA_DIR, and take names from where the person is', async () => {
    const backedUp = run('backup', 'copy.db');
    expect(backedUp).toMatchObject({ status: 0, stdout: `Backed up to ${copy}, checked.\n`, stderr: '' });
    expect(existsSync(copy)).toBe(true);
    expect(run('restore', 'copy.db')).toMatchObject({
      status: 1,
      stderr: 'A server is using the database. Stop it first.\n',
    });
    await db.destroy();
    expect(run('restore', 'copy.db').stdout).toMatch(/^Restored from .*copy\.db\. The database before is .*\.\n$/);
    expect(run('restore')).toMatchObject({
      status: 1,
      stderr: 'Usage: npm run backup -- FILE, or npm run restore -- FILE\n',
    });
  }, 30_000);
});
