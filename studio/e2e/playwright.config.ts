import { existsSync, mkdtempSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { defineConfig } from '@playwright/test';

const ROOT = path.resolve(import.meta.dirname, '../..');
const SYSTEM_CHROMIUM = '/usr/bin/chromium';

// Each worker process reads this file again: what is chosen once is handed down by the environment.
process.env.E2E_PORT ??= String(await freePort());
process.env.E2E_DATA_DIR ??= mkdtempSync(path.join(tmpdir(), 'voltiplano-e2e-'));
const address = `http://localhost:${process.env.E2E_PORT}`;

/** Whole journeys through the built studio, served by the real server. Build first: `npm run build`. */
export default defineConfig({
  testDir: '.',
  outputDir: path.join(ROOT, 'test-results'),
  workers: 1,
  forbidOnly: Boolean(process.env.CI),
  // Generous, because a small machine draws in software; a journey that hangs still fails.
  timeout: 120_000,
  expect: { timeout: 15_000 },
  reporter: 'list',
  use: {
    baseURL: address,
    locale: 'en-GB',
    trace: 'retain-on-failure',
    launchOptions: {
      executablePath: process.env.CHROMIUM_PATH ?? (existsSync(SYSTEM_CHROMIUM) ? SYSTEM_CHROMIUM : undefined),
      args: [
        '--no-sandbox',
        '--disable-gpu',
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
      ],
    },
  },
  webServer: {
    command: 'node --import tsx server/src/main.ts',
    cwd: ROOT,
    // Journeys begin with nobody there: each makes the people that it needs.
    env: { PORT: process.env.E2E_PORT, DATA_DIR: process.env.E2E_DATA_DIR, LOG_LEVEL: 'warn', DEMO: 'off' },
    url: `${address}/api/health`,
    reuseExistingServer: false,
    gracefulShutdown: { signal: 'SIGTERM', timeout: 5000 },
  },
});

async function freePort(): Promise<number> {
  const probe = createServer();
  await new Promise<void>((resolve) => probe.listen(0, resolve));
  const { port } = probe.address() as AddressInfo;
  await new Promise((resolve) => probe.close(resolve));
  return port;
}
