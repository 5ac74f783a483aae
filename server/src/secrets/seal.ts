import { createCipheriv, createDecipheriv, hkdfSync, randomBytes } from 'node:crypto';

const NONCE_BYTES = 12;
const TAG_BYTES = 16;

/**
 * Encrypts a text so that it can lie in the database (AES-256-GCM).
 *
 * @param key      the server's sealing key
 * @param context  needed again to open it; may itself be a secret that is not stored
 */
export function seal(key: Uint8Array, context: string, text: string): Buffer {
  const nonce = randomBytes(NONCE_BYTES);
  const cipher = createCipheriv('aes-256-gcm', keyFor(key, context), nonce);
  const sealed = Buffer.concat([cipher.update(text, 'utf8'), cipher.final()]);
  return Buffer.concat([nonce, cipher.getAuthTag(), sealed]);
}

/** Opens what `seal` made. @throws if key or context differ, or a byte was changed */
export function unseal(key: Uint8Array, context: string, sealed: Buffer): string {
  const decipher = createDecipheriv('aes-256-gcm', keyFor(key, context), sealed.subarray(0, NONCE_BYTES));
  decipher.setAuthTag(sealed.subarray(NONCE_BYTES, NONCE_BYTES + TAG_BYTES));
  return decipher.update(sealed.subarray(NONCE_BYTES + TAG_BYTES), undefined, 'utf8') + decipher.final('utf8');
}

function keyFor(key: Uint8Array, context: string): Uint8Array {
  return new Uint8Array(hkdfSync('sha256', key, '', context, 32));
}
