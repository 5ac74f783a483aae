import Sqlite from 'better-sqlite3';
import { Kysely, SqliteAdapter, SqliteDialect } from 'kysely';
import type { Tables } from './tables.ts';

export type Db = Kysely<Tables>;

/** How long a statement waits for another process, such as a backup, to let go of the file [ms]. */
const BUSY_TIMEOUT_MS = 5000;

/** SQLite rolls a change of schema back like any other change, so a migration that fails leaves nothing behind. */
class TransactionalAdapter extends SqliteAdapter {
  override get supportsTransactionalDdl(): boolean {
    return true;
  }
}

class TransactionalDialect extends SqliteDialect {
  override createAdapter(): SqliteAdapter {
    return new TransactionalAdapter();
  }
}

/**
 * Opens the database file, which is made where it is missing. An answered write is on the disk: `synchronous=FULL`
 * makes each commit of the write-ahead log wait for it.
 *
 * @param file  absolute path
 */
export function openDatabase(file: string): Db {
  const sqlite = new Sqlite(file);
  sqlite.pragma(`busy_timeout = ${BUSY_TIMEOUT_MS}`);
  sqlite.pragma('journal_mode = WAL');
  sqlite.pragma('synchronous = FULL');
  sqlite.pragma('foreign_keys = ON');
  return new Kysely<Tables>({ dialect: new TransactionalDialect({ database: sqlite }) });
}

/**
 * Runs the work in one transaction: the one that is open already, or a new one.
 *
 * Kysely has no transactions inside transactions, and a service must not need to know whether its caller opened one.
 */
export function inTransaction<T>(db: Db, work: (transaction: Db) => Promise<T>): Promise<T> {
  return db.isTransaction ? work(db) : db.transaction().execute(work);
}
