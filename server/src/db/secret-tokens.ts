import { createHash, randomBytes } from 'node:crypto';

const ALPHABET = '0123456789abcdefghjkmnpqrstvwxyz';
const ID_BITS = 128;
const ID_LENGTH = Math.ceil(ID_BITS / 5);

/** An identifier nobody can guess: 128 random bits in 26 characters of Crockford's base 32, safe in an address. */
export function newId(): string {
  let bits = BigInt(`0x${randomBytes(ID_BITS / 8).toString('hex')}`);
  let id = '';
  for (let i = 0; i < ID_LENGTH; i += 1) {
    id = ALPHABET.charAt(Number(bits & 31n)) + id;
    bits >>= 5n;
  }
  return id;
}

/** A secret for a link, cookie or API token: 256 random bits in base64url. Only its hash is stored. */
export function newSecret(): string {
  return randomBytes(32).toString('base64url');
}

/** SHA-256 in base64url. Enough for secrets of 256 random bits; passwords go through Argon2. */
export function hashSecret(secret: string): string {
  return createHash('sha256').update(secret).digest('base64url');
}
