import path from 'node:path';
import { databaseFileIn, readSettings, SettingsError } from '../settings.ts';
import { backUpDatabase, restoreDatabase } from './backup.ts';

const USAGE = 'Usage: npm run backup -- FILE, or npm run restore -- FILE\n';

/** `backup-main.ts backup FILE` and `backup-main.ts restore FILE`, on the database in DATA_DIR. */
async function main([command, name]: string[]): Promise<void> {
  if (!name || (command !== 'backup' && command !== 'restore')) throw new SettingsError(USAGE.trimEnd());
  // npm changes into the folder of package.json; a relative name is meant from where the person is.
  const file = path.resolve(process.env.INIT_CWD ?? '.', name);
  const database = databaseFileIn(readSettings({ ...process.env, NODE_ENV: '' }).dataDir);
  if (command === 'backup') {
    await backUpDatabase(database, file);
    process.stdout.write(`Backed up to ${file}, checked.\n`);
  } else {
    const before = restoreDatabase(file, database, new Date());
    process.stdout.write(`Restored from ${file}.${before ? ` The database before is ${before}.` : ''}\n`);
  }
}

main(process.argv.slice(2)).catch((error: unknown) => {
  process.stderr.write(`${error instanceof SettingsError ? error.message : String(error)}\n`);
  process.exitCode = 1;
});
