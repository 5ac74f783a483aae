import {
  type Kysely,
  type Migration as KyselyMigration,
  type MigrationProvider,
  Migrator,
  NO_MIGRATIONS,
  sql,
} from 'kysely';
import type { Db } from './database.ts';
import type { Migration } from './migration.ts';
import { migrations } from './migration-list.ts';

/** Takes the schema forward to the newest migration; all of the missing ones, or none. */
export async function migrateToLatest(db: Db): Promise<void> {
  const { error } = await migratorOf(db).migrateToLatest();
  if (error) throw asError(error);
}

/** Takes the schema back to an empty file. Everything that it held is lost. */
export async function migrateDownToNothing(db: Db): Promise<void> {
  const { error } = await migratorOf(db).migrateTo(NO_MIGRATIONS);
  if (error) throw asError(error);
}

/** Whether every migration of this program is applied. */
export async function isMigrated(db: Db): Promise<boolean> {
  const known = await migratorOf(db).getMigrations();
  return known.every(({ executedAt }) => executedAt !== undefined);
}

function migratorOf(db: Db): Migrator {
  return new Migrator({ db, provider });
}

const provider: MigrationProvider = {
  getMigrations: () =>
    Promise.resolve(Object.fromEntries(Object.entries(migrations).map(([name, steps]) => [name, asKysely(steps)]))),
};

function asKysely({ up, down }: Migration): KyselyMigration {
  return { up: (db: Kysely<unknown>) => runAll(db, up), down: (db: Kysely<unknown>) => runAll(db, down) };
}

async function runAll(db: Kysely<unknown>, statements: readonly string[]): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db);
}

function asError(error: unknown): Error {
  return error instanceof Error ? error : new Error(String(error));
}
