import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { chromium } from '@playwright/test';

const SYSTEM_CHROMIUM = '/usr/bin/chromium';

/**
 * Path of a Chromium to test in; installs one where there is none.
 *
 * @returns {string}
 * @throws {Error} if none is found and none can be installed; the message says how to mend it
 */
export function findChromium() {
  const named = process.env.CHROMIUM_PATH;
  if (named && !existsSync(named)) throw new Error(`CHROMIUM_PATH names ${named}, which is not there.`);
  const installed = named || installedChromium();
  if (installed) return installed;
  install();
  const after = installedChromium();
  if (after) return after;
  throw new Error(
    'No Chromium for the end-to-end tests. Install one with "apt-get install chromium" or "npx playwright install chromium", ' +
      'or set CHROMIUM_PATH to the program.',
  );
}

function installedChromium() {
  return [SYSTEM_CHROMIUM, chromium.executablePath()].find((path) => existsSync(path));
}

function install() {
  const isRoot = process.getuid?.() === 0;
  if (isRoot && run('apt-get', ['update']) && run('apt-get', ['install', '-y', 'chromium'])) return;
  run('npx', ['playwright', 'install', 'chromium']);
}

/**
 * @param {string} command
 * @param {string[]} args
 */
function run(command, args) {
  console.log(`No Chromium yet: ${command} ${args.join(' ')}`);
  return (
    spawnSync(command, args, { stdio: 'inherit', env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' } })
      .status === 0
  );
}
