import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { type Logger, pino } from 'pino';
import { closeGracefully } from './close-gracefully.ts';
import { createApp } from './http/app.ts';
import { listen, type Listening } from './listen.ts';
import { prepareDataDir, readSettings, SettingsError } from './settings.ts';

const SHUTDOWN_PATIENCE_MS = 10_000;

async function main(): Promise<void> {
  const settings = readSettings(process.env);
  if (!existsSync(path.join(settings.studioDir, 'index.html'))) {
    throw new SettingsError(`The studio is not built in ${settings.studioDir}. Build it with "npm run build".`);
  }
  prepareDataDir(settings.dataDir);
  const logger = pino({ level: settings.logLevel });
  const app = createApp({
    studioDir: settings.studioDir,
    version: ownVersion(),
    logger,
    nowMs: () => performance.now(),
  });
  const listening = await listen(app, settings.port);
  const address = `http://localhost:${listening.port}`;
  process.stdout.write(`\nVoltiplano: ${address}\nThe desk needs no account: ${address}/try\n\n`);
  closeOnSignal(listening, logger);
}

function closeOnSignal({ server }: Listening, logger: Logger): void {
  const close = (signal: NodeJS.Signals) => {
    // A second signal ends the process at once.
    process.removeListener('SIGTERM', close).removeListener('SIGINT', close);
    logger.info({ signal }, 'closing');
    void closeGracefully(server, SHUTDOWN_PATIENCE_MS).then((answeredAll) => {
      logger.info({ answeredAll }, 'closed');
    });
  };
  process.on('SIGTERM', close).on('SIGINT', close);
}

function ownVersion(): string {
  const file = path.join(import.meta.dirname, '../package.json');
  return (JSON.parse(readFileSync(file, 'utf8')) as { version: string }).version;
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof SettingsError ? error.message : String(error)}\n`);
  process.exitCode = 1;
});
