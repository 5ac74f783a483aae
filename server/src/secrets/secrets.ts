import { hkdfSync, randomBytes } from 'node:crypto';
import { chmodSync, closeSync, existsSync, fsyncSync, openSync, readFileSync, writeSync } from 'node:fs';
import path from 'node:path';
import { SettingsError } from '../settings.ts';

const FILE = 'secret.key';
const KEY_BYTES = 32;

/** Keys of this server, 256 bits each. Whoever has them can sign in as anybody. */
export type Secrets = {
  /** Signs access tokens and the state of a sign-in at the provider. */
  signing: Uint8Array;
  /** Binds the CSRF token to its session. */
  csrf: Uint8Array;
  /** Seals answers and mails that are kept for a while. */
  sealing: Uint8Array;
};

/**
 * Reads the server's secret from the data directory; makes it at the first start. Only the owner of the file may read it.
 *
 * @throws {SettingsError} if the file is no secret of this program
 */
export function loadSecrets(dataDir: string): Secrets {
  const file = path.join(dataDir, FILE);
  if (!existsSync(file)) writeSecret(file);
  chmodSync(file, 0o600);
  const master = Buffer.from(readFileSync(file, 'utf8').trim(), 'base64url');
  if (master.length !== KEY_BYTES) {
    throw new SettingsError(
      `${file} is damaged: it must hold ${KEY_BYTES} bytes in base64url. Put it back from a copy, or remove it: everybody is then signed out.`,
    );
  }
  return deriveSecrets(master);
}

/** Derives one key for each use from the master secret (HKDF, RFC 5869), so that none gives another away. */
export function deriveSecrets(master: Uint8Array): Secrets {
  const derive = (use: string) => new Uint8Array(hkdfSync('sha256', master, '', `voltiplano ${use}`, KEY_BYTES));
  return { signing: derive('signing'), csrf: derive('csrf'), sealing: derive('sealing') };
}

function writeSecret(file: string): void {
  const handle = openSync(file, 'wx', 0o600);
  writeSync(handle, `${randomBytes(KEY_BYTES).toString('base64url')}\n`);
  fsyncSync(handle);
  closeSync(handle);
}
