import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { pino } from 'pino';
import { signAccessToken } from '../account/access-token.ts';
import { openSession } from '../account/session-repository.ts';
import { closeGracefully } from '../close-gracefully.ts';
import type { Mail } from '../contract/mailbox.ts';
import type { Core } from '../core.ts';
import { openDatabase } from '../db/database.ts';
import { migrateToLatest } from '../db/migrate.ts';
import { type AppDeps, createApp } from '../http/app.ts';
import type { RateLimits } from '../http/rate-limits.ts';
import { csrfTokenOf } from '../http/same-site.ts';
import { listen } from '../listen.ts';
import { startLocalMailServer } from '../mail/local-mail-server.ts';
import { openPost } from '../mail/post.ts';
import { smtpDelivery } from '../mail/smtp.ts';
import type { ProviderClient } from '../oidc/provider-client.ts';
import { HeadlineRuns } from '../runs/headline-runs.ts';
import { loadSecrets } from '../secrets/secrets.ts';
import { TestBrowser } from './test-browser.ts';

const MANY = 100_000;
const MAIL_PATIENCE_MS = 10_000;

export type TestServer = {
  address: string;
  core: Core;
  /** To make another application on the same database. */
  appDeps: AppDeps;
  /** What the server takes for now [ms since 1970-01-01T00:00Z]; a test may move it. */
  clock: { now: number };
  /** Lines of the log. */
  logged: string[];
  browser: () => TestBrowser;
  /** A browser in which a person is signed in, without the way through the sign-in. */
  browserOf: (personId: string) => Promise<TestBrowser>;
  /** The newest mail to an address; waits for it. */
  mailTo: (email: string) => Promise<Mail>;
  close: () => Promise<void>;
};

type Wishes = { rateLimits?: Partial<RateLimits>; provider?: (publicUrl: () => string) => ProviderClient };

/** The real application on a migrated database file, with real HTTP and real SMTP on the loopback interface. */
export async function startTestServer(wishes: Wishes = {}): Promise<TestServer> {
  const dir = mkdtempSync(path.join(tmpdir(), 'voltiplano-server-'));
  const db = openDatabase(path.join(dir, 'voltiplano.db'));
  await migrateToLatest(db);
  const clock = { now: Date.parse('2026-03-01T08:00:00Z') };
  const now = () => clock.now;
  const logged: string[] = [];
  const logger = pino({ level: 'info' }, { write: (line: string) => void logged.push(line) });
  const secrets = loadSecrets(dir);
  const mailServer = await startLocalMailServer(now);
  const deliver = smtpDelivery(mailServer.url, 'Voltiplano <voltiplano@localhost>');
  const post = openPost({ db, sealingKey: secrets.sealing, deliver, logger, now });
  let address = '';
  const publicUrl = () => address;
  const runs = new HeadlineRuns();
  const core: Core = { db, secrets, post, runs, logger, now, publicUrl };
  const appDeps: AppDeps = {
    studioDir: dir,
    version: '1.2.3',
    core,
    nowMs: () => clock.now,
    site: { publicUrl, isSet: true },
    rateLimits: { 'sign-in': MANY, 'sign-up': MANY, mail: MANY, 'same e-mail': MANY, ...wishes.rateLimits },
    trustedProxies: 0,
    mailServer,
    provider: wishes.provider?.(publicUrl) ?? null,
  };
  const { server, port } = await listen(createApp(appDeps), 0);
  address = `http://localhost:${port}`;
  return {
    address,
    core,
    appDeps,
    clock,
    logged,
    browser: () => new TestBrowser(address),
    browserOf: (personId) => signedInBrowser(core, personId),
    mailTo: (email) => waitForMail(email, mailServer.mails),
    close: async () => {
      await closeGracefully(server, 1000);
      await runs.close();
      await post.close();
      await mailServer.close();
      await db.destroy();
      rmSync(dir, { recursive: true });
    },
  };
}

async function signedInBrowser(core: Core, personId: string): Promise<TestBrowser> {
  const session = await openSession(core, personId, 'test browser');
  const browser = new TestBrowser(core.publicUrl());
  browser.cookies.set('voltiplano_access', await signAccessToken(core, session));
  browser.cookies.set('voltiplano_refresh', session.refreshToken);
  browser.cookies.set('voltiplano_csrf', csrfTokenOf(core.secrets, session.sessionId));
  return browser;
}

async function waitForMail(email: string, mails: () => readonly Mail[]): Promise<Mail> {
  const until = Date.now() + MAIL_PATIENCE_MS;
  for (;;) {
    const found = mails().find(({ to }) => to === email);
    if (found) return found;
    if (Date.now() > until) throw new Error(`No mail came to ${email}.`);
    await new Promise((resolve) => setTimeout(resolve, 10));
  }
}

/** The token in the link of a mail. */
export function tokenIn({ text }: Mail): string {
  const token = /#(\S+)/.exec(text)?.[1];
  if (!token) throw new Error(`No link in the mail:\n${text}`);
  return token;
}
