import { readFileSync } from 'node:fs';
import path from 'node:path';
import type { Logger } from 'pino';
import { closeGracefully } from './close-gracefully.ts';
import type { Core } from './core.ts';
import { type Db, openDatabase } from './db/database.ts';
import { migrateToLatest } from './db/migrate.ts';
import { type DemoAccount, listDemoAccounts } from './demo/demo-accounts.ts';
import { seedDemo } from './demo/seed-demo.ts';
import { createApp } from './http/app.ts';
import { defaultRateLimits } from './http/rate-limits.ts';
import { listen } from './listen.ts';
import { type LocalMailServer, startLocalMailServer } from './mail/local-mail-server.ts';
import { openPost } from './mail/post.ts';
import { smtpDelivery } from './mail/smtp.ts';
import { type LocalProvider, startLocalProvider } from './oidc/local-provider.ts';
import { providerClient } from './oidc/provider-client.ts';
import { HeadlineRuns } from './runs/headline-runs.ts';
import { loadSecrets } from './secrets/secrets.ts';
import { databaseFileIn, prepareDataDir, type Settings } from './settings.ts';

export type RunningServer = {
  /** Where to open it. */
  address: string;
  /** Accounts that everybody knows the password of. */
  demoAccounts: DemoAccount[];
  /** Stops taking requests, waits for those under way, and closes everything. Answers whether all were answered. */
  close: (patienceMs: number) => Promise<boolean>;
};

/**
 * Starts everything that the settings ask for, and listens.
 *
 * @throws {SettingsError} if a setting cannot be used
 */
export async function startServer(settings: Settings, logger: Logger): Promise<RunningServer> {
  prepareDataDir(settings.dataDir);
  const db = openDatabase(databaseFileIn(settings.dataDir));
  const stop: (() => Promise<unknown>)[] = [() => db.destroy()];
  try {
    return await startOn(db, settings, logger, stop);
  } catch (error) {
    await stopAll(stop);
    throw error;
  }
}

async function startOn(
  db: Db,
  settings: Settings,
  logger: Logger,
  stop: (() => Promise<unknown>)[],
): Promise<RunningServer> {
  await migrateToLatest(db);
  const mailServer = settings.smtpUrl === null ? await startLocalMailServer(Date.now) : null;
  if (mailServer) stop.push(mailServer.close);
  let address = '';
  const publicUrl = () => settings.publicUrl ?? address;
  const core = openCore(db, settings, logger, mailServer, publicUrl);
  stop.push(core.post.close, () => core.runs.close());
  if (settings.demo) await seedDemo(core);
  const app = createApp({
    studioDir: settings.studioDir,
    version: ownVersion(),
    core,
    nowMs: () => performance.now(),
    site: { publicUrl, isSet: settings.publicUrl !== null },
    rateLimits: defaultRateLimits,
    trustedProxies: settings.trustedProxies,
    mailServer,
    provider: chooseProvider(settings, publicUrl, stop),
  });
  const { server, port } = await listen(app, settings.port);
  address = `http://localhost:${port}`;
  return {
    address,
    demoAccounts: await listDemoAccounts(db),
    close: async (patienceMs) => {
      const answeredAll = await closeGracefully(server, patienceMs);
      await stopAll(stop);
      return answeredAll;
    },
  };
}

function openCore(
  db: Db,
  { dataDir, smtpUrl, mailFrom }: Settings,
  logger: Logger,
  mailServer: LocalMailServer | null,
  publicUrl: () => string,
): Core {
  const secrets = loadSecrets(dataDir);
  const deliver = smtpDelivery(smtpUrl ?? mailServer?.url ?? '', mailFrom);
  const post = openPost({ db, sealingKey: secrets.sealing, deliver, logger, now: Date.now });
  return { db, secrets, post, runs: new HeadlineRuns(), logger, now: Date.now, publicUrl };
}

/** The configured provider; in development a local one, which starts when somebody first uses it. */
function chooseProvider(
  { provider, isProduction }: Settings,
  publicUrl: () => string,
  stop: (() => Promise<unknown>)[],
) {
  if (provider) return providerClient(provider.name, () => Promise.resolve(provider));
  if (isProduction) return null;
  return providerClient('local test provider', async () => {
    const local: LocalProvider = await startLocalProvider(`${publicUrl()}/api/v1/auth/oidc/callback`);
    stop.push(local.close);
    return local.settings;
  });
}

/** In the opposite order of starting: the database closes last. */
async function stopAll(stop: (() => Promise<unknown>)[]): Promise<void> {
  for (const one of [...stop].reverse()) await one();
}

function ownVersion(): string {
  const file = path.join(import.meta.dirname, '../package.json');
  return (JSON.parse(readFileSync(file, 'utf8')) as { version: string }).version;
}
