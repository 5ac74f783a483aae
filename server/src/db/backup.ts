import { closeSync, existsSync, fsyncSync, openSync, renameSync, rmSync, copyFileSync } from 'node:fs';
import path from 'node:path';
import Sqlite, { SqliteError } from 'better-sqlite3';
import { SettingsError } from '../settings.ts';
import { migrations } from './migration-list.ts';

/**
 * Copies the database into one file while the server works (SQLite's online backup), and checks the copy.
 *
 * @throws {SettingsError} if there is nothing to copy, the target exists, or the copy is damaged
 */
export async function backUpDatabase(databaseFile: string, target: string): Promise<void> {
  if (!existsSync(databaseFile)) throw new SettingsError(`There is no database at ${databaseFile}. Check DATA_DIR.`);
  if (existsSync(target)) throw new SettingsError(`${target} exists already. Choose another name.`);
  const unfinished = `${target}.unfinished`;
  rmSync(unfinished, { force: true });
  const source = new Sqlite(databaseFile, { readonly: true, fileMustExist: true });
  try {
    await source.backup(unfinished);
  } finally {
    source.close();
  }
  // One file alone: a copy in WAL mode would want two more beside it.
  const copy = new Sqlite(unfinished);
  copy.pragma('journal_mode = DELETE');
  copy.close();
  checkBackup(unfinished);
  moveIntoPlace(unfinished, target);
}

/**
 * Puts a backup in the place of the database. The one before is kept beside it.
 *
 * @returns  where the database before lies now, null if there was none
 * @throws {SettingsError} if the backup cannot be used or a server has the database open; nothing is changed then
 */
export function restoreDatabase(backup: string, databaseFile: string, now: Date): string | null {
  if (!existsSync(backup)) throw new SettingsError(`There is no backup at ${backup}.`);
  checkBackup(backup);
  const arriving = `${databaseFile}.arriving`;
  copyFileSync(backup, arriving);
  const before = setAside(databaseFile, now);
  moveIntoPlace(arriving, databaseFile);
  return before;
}

/** @throws {SettingsError} if the file is damaged or not of this program */
function checkBackup(file: string): void {
  let names: string[];
  try {
    const copy = new Sqlite(file, { readonly: true, fileMustExist: true });
    try {
      const integrity = copy.pragma('integrity_check', { simple: true });
      const orphans = copy.pragma('foreign_key_check') as unknown[];
      if (integrity !== 'ok' || orphans.length > 0)
        throw new SettingsError(`${file} is damaged: ${String(integrity)}.`);
      names = copy
        .prepare<[], { name: string }>('SELECT name FROM kysely_migration')
        .all()
        .map(({ name }) => name);
    } finally {
      copy.close();
    }
  } catch (cause) {
    if (cause instanceof SettingsError) throw cause;
    throw new SettingsError(`${file} is no backup of this program: ${String(cause)}.`, { cause });
  }
  const unknown = names.filter((name) => !(name in migrations));
  if (unknown.length > 0) throw new SettingsError(`${file} comes from a newer version: it has ${unknown.join(', ')}.`);
}

/** Moves the database away, after bringing its write-ahead log home. */
function setAside(databaseFile: string, now: Date): string | null {
  if (!existsSync(databaseFile)) return null;
  bringLogHome(databaseFile);
  const before = `${databaseFile}.before-${now.toISOString().replaceAll(':', '-')}`;
  renameSync(databaseFile, before);
  for (const suffix of ['-wal', '-shm']) rmSync(databaseFile + suffix, { force: true });
  return before;
}

function bringLogHome(databaseFile: string): void {
  const present = new Sqlite(databaseFile, { timeout: 0 });
  try {
    // Only the one process that has the file open may leave WAL mode: this finds a running server.
    present.pragma('journal_mode = DELETE');
  } catch (cause) {
    if (cause instanceof SqliteError && cause.code.startsWith('SQLITE_BUSY')) {
      throw new SettingsError('A server is using the database. Stop it first.', { cause });
    }
    throw cause;
  } finally {
    present.close();
  }
}

/** A name appears only once all bytes of the file are on the disk. */
function moveIntoPlace(from: string, to: string): void {
  sync(from);
  renameSync(from, to);
  sync(path.dirname(to));
}

function sync(file: string): void {
  const handle = openSync(file, 'r');
  fsyncSync(handle);
  closeSync(handle);
}
