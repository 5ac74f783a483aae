import { accessSync, constants, mkdirSync } from 'node:fs';
import path from 'node:path';

const ROOT = path.resolve(import.meta.dirname, '../..');
const DEFAULT_PORT = 4380;
const LOG_LEVELS = ['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent'];

/** What the environment sets. Paths are absolute. */
export type Settings = { port: number; dataDir: string; studioDir: string; logLevel: string };

/** A setting that the server cannot start with; the message says which, what is wrong and how to mend it. */
export class SettingsError extends Error {
  override name = 'SettingsError';
}

/**
 * Reads PORT, DATA_DIR, STUDIO_DIR and LOG_LEVEL.
 *
 * @param env  the process environment; an empty value counts as absent
 * @throws {SettingsError} if PORT is no port number or LOG_LEVEL no level
 */
export function readSettings(env: NodeJS.ProcessEnv): Settings {
  return {
    port: readPort(env.PORT),
    dataDir: path.resolve(env.DATA_DIR || path.join(ROOT, 'data')),
    studioDir: path.resolve(env.STUDIO_DIR || path.join(ROOT, 'studio/dist')),
    logLevel: readLogLevel(env.LOG_LEVEL),
  };
}

/**
 * Makes the data directory where it is missing and checks that the server may write there.
 *
 * @throws {SettingsError} if it cannot be made or written
 */
export function prepareDataDir(dataDir: string): void {
  try {
    mkdirSync(dataDir, { recursive: true });
    accessSync(dataDir, constants.W_OK);
  } catch (cause) {
    const reason = cause instanceof Error ? cause.message : String(cause);
    throw new SettingsError(
      `Cannot keep data in ${dataDir}: ${reason}. Set DATA_DIR to a directory that can be written.`,
      {
        cause,
      },
    );
  }
}

function readPort(text: string | undefined): number {
  if (!text) return DEFAULT_PORT;
  const port = Number(text);
  if (!/^\d+$/.test(text) || port > 65_535) {
    throw new SettingsError(`PORT must be a whole number from 0 (any free port) to 65535, but it is "${text}".`);
  }
  return port;
}

function readLogLevel(text: string | undefined): string {
  if (!text) return 'info';
  if (!LOG_LEVELS.includes(text)) {
    throw new SettingsError(`LOG_LEVEL must be one of ${LOG_LEVELS.join(', ')}, but it is "${text}".`);
  }
  return text;
}
