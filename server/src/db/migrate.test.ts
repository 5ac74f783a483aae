import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { sql } from 'kysely';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { makeWorld } from '../testing/test-world.ts';
import { type Db, inTransaction, openDatabase } from './database.ts';
import { isMigrated, migrateDownToNothing, migrateToLatest } from './migrate.ts';
import { hashSecret, newId, newSecret } from './secret-tokens.ts';

let dir: string;
let db: Db;

beforeEach(() => {
  dir = mkdtempSync(path.join(tmpdir(), 'voltiplano-migrate-'));
  db = openDatabase(path.join(dir, 'voltiplano.db'));
});
afterEach(async () => {
  await db.destroy();
  rmSync(dir, { recursive: true });
});

type SchemaRow = { type: string; name: string; sql: string | null };

/** Tables and indexes as SQLite holds them, without Kysely's own. */
async function schemaOf(of: Db): Promise<SchemaRow[]> {
  const { rows } = await sql<SchemaRow>`SELECT type, name, sql FROM sqlite_schema
    WHERE name NOT LIKE 'kysely%' AND tbl_name NOT LIKE 'kysely%' AND name NOT LIKE 'sqlite%' ORDER BY name`.execute(
    of,
  );
  return rows;
}

describe('migrations', () => {
  it('go up, down and up again on a filled database, and end where they began', async () => {
    const server: TestServer = await startTestServer();
    try {
      await makeWorld(server);
      const filled = server.core.db;
      const before = await schemaOf(filled);
      expect(before.length).toBeGreaterThan(20);
      await migrateDownToNothing(filled);
      expect(await schemaOf(filled)).toEqual([]);
      expect(await isMigrated(filled)).toBe(false);
      await migrateToLatest(filled);
      expect(await schemaOf(filled)).toEqual(before);
      expect(await isMigrated(filled)).toBe(true);
      await makeWorld(server);
    } finally {
      await server.close();
    }
  });

  it('change nothing the second time', async () => {
    await migrateToLatest(db);
    const before = await schemaOf(db);
    await migrateToLatest(db);
    expect(await schemaOf(db)).toEqual(before);
  });

  it('leave nothing behind when one of them fails', async () => {
    await sql`CREATE TABLE invitations (id TEXT) STRICT`.execute(db);
    await expect(migrateToLatest(db)).rejects.toThrow('already exists');
    expect((await schemaOf(db)).map(({ name }) => name)).toEqual(['invitations']);
  });

  it('make strict tables only', async () => {
    await migrateToLatest(db);
    // Full-text tables and what they keep their words in (virtual, shadow) cannot be strict.
    const { rows } = await sql<{ name: string; strict: 0 | 1 }>`SELECT name, strict FROM pragma_table_list
      WHERE schema = 'main' AND type = 'table' AND name NOT LIKE 'kysely%' AND name NOT LIKE 'sqlite%'`.execute(db);
    expect(rows.length).toBeGreaterThan(10);
    for (const { name, strict } of rows) expect(strict, name).toBe(1);
  });
});

describe('openDatabase', () => {
  it('waits for the disk at each commit, keeps foreign keys, and lets readers by', async () => {
    const pragma = async (name: string) => {
      const { rows } = await sql.raw<Record<string, unknown>>(`PRAGMA ${name}`).execute(db);
      return Object.values(rows[0] ?? {})[0];
    };
    expect(await pragma('journal_mode')).toBe('wal');
    // 2 is FULL: https://www.sqlite.org/pragma.html#pragma_synchronous
    expect(await pragma('synchronous')).toBe(2);
    expect(await pragma('foreign_keys')).toBe(1);
    expect(await pragma('busy_timeout')).toBe(5000);
  });

  it('refuses a row whose parent is missing, and a value of the wrong type', async () => {
    await migrateToLatest(db);
    const member = { workspaceId: 'none', personId: 'none', role: 'viewer', joinedAt: 0 } as const;
    await expect(db.insertInto('members').values(member).execute()).rejects.toThrow('FOREIGN KEY');
    const workspace = { id: 'w', name: 'W', createdAt: 'today' as unknown as number };
    await expect(db.insertInto('workspaces').values(workspace).execute()).rejects.toThrow('cannot store TEXT value');
  });
});

describe('inTransaction', () => {
  it('joins the transaction that is open, and undoes all of it on an error', async () => {
    await migrateToLatest(db);
    const insert = (of: Db, id: string) => of.insertInto('workspaces').values({ id, name: id, createdAt: 0 }).execute();
    await expect(
      inTransaction(db, async (outer) => {
        await insert(outer, 'a');
        await inTransaction(outer, (inner) => insert(inner, 'b'));
        throw new Error('undo');
      }),
    ).rejects.toThrow('undo');
    expect(await db.selectFrom('workspaces').selectAll().execute()).toEqual([]);
  });
});

describe('newId', () => {
  it('makes 26 characters of 128 bits, all of them used and none twice', () => {
    const ids = Array.from({ length: 2000 }, newId);
    for (const id of ids) expect(id).toMatch(/^[0-7][0-9a-hjkmnp-tv-z]{25}$/);
    expect(new Set(ids).size).toBe(ids.length);
    for (let place = 1; place < 26; place += 1) expect(new Set(ids.map((id) => id[place])).size).toBe(32);
  });
});

describe('hashSecret', () => {
  it('is SHA-256 in base64url', () => {
    // "abc", FIPS 180-2, appendix B.1
    const expected = 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad';
    expect(Buffer.from(hashSecret('abc'), 'base64url').toString('hex')).toBe(expected);
    expect(Buffer.from(newSecret(), 'base64url')).toHaveLength(32);
  });
});
