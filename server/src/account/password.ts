import { hash, verify } from '@node-rs/argon2';
import { newSecret } from '../db/secret-tokens.ts';

/** Argon2id with the least cost that OWASP's Password Storage Cheat Sheet names: 19 MiB, 2 passes, 1 lane. */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export function hashPassword(password: string): Promise<string> {
  return hash(password, COST);
}

let nobodysHash: Promise<string> | undefined;

/**
 * Whether a password fits. Takes as long where there is no hash, so that time does not tell whether an account exists.
 *
 * @param passwordHash  null where there is no account, or one without a password
 */
export async function passwordFits(passwordHash: string | null, password: string): Promise<boolean> {
  if (passwordHash !== null) return verify(passwordHash, password);
  nobodysHash ??= hashPassword(newSecret());
  await verify(await nobodysHash, password);
  return false;
}
