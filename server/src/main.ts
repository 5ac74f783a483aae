import { existsSync } from 'node:fs';
import path from 'node:path';
import { type Logger, pino } from 'pino';
import { demoAccountsText } from './demo/demo-accounts.ts';
import { readSettings, SettingsError } from './settings.ts';
import { type RunningServer, startServer } from './start-server.ts';

const SHUTDOWN_PATIENCE_MS = 10_000;

async function main(): Promise<void> {
  const settings = readSettings(process.env);
  if (!existsSync(path.join(settings.studioDir, 'index.html'))) {
    throw new SettingsError(`The studio is not built in ${settings.studioDir}. Build it with "npm run build".`);
  }
  const logger = pino({ level: settings.logLevel });
  const running = await startServer(settings, logger);
  const { address, demoAccounts } = running;
  process.stdout.write(`\nVoltiplano: ${address}\nThe desk needs no account: ${address}/try\n`);
  if (settings.smtpUrl === null) process.stdout.write(`Mails go nowhere; read them: ${address}/api/v1/dev/mailbox\n`);
  process.stdout.write(`\n${demoAccountsText(demoAccounts)}`);
  closeOnSignal(running, logger);
}

function closeOnSignal(running: RunningServer, logger: Logger): void {
  const close = (signal: NodeJS.Signals) => {
    // A second signal ends the process at once.
    process.removeListener('SIGTERM', close).removeListener('SIGINT', close);
    logger.info({ signal }, 'closing');
    void running.close(SHUTDOWN_PATIENCE_MS).then((answeredAll) => {
      logger.info({ answeredAll }, 'closed');
    });
  };
  process.on('SIGTERM', close).on('SIGINT', close);
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof SettingsError ? error.message : String(error)}\n`);
  process.exitCode = 1;
});
