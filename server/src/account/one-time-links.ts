import type { Core } from '../core.ts';
import { hashSecret, newSecret } from '../db/secret-tokens.ts';
import { HttpProblem } from '../http/problem.ts';

/** Long enough to find the mail, short enough that an old mailbox opens nothing [ms]. */
const LINK_LIFE_MS = 60 * 60_000;

export type LinkPurpose = { purpose: 'reset-password' } | { purpose: 'change-email'; newEmail: string };

/** Makes a link's token. Earlier links of the person for the same purpose end. */
export async function issueLink({ db, now }: Core, personId: string, link: LinkPurpose): Promise<string> {
  const token = newSecret();
  await db.deleteFrom('oneTimeLinks').where('personId', '=', personId).where('purpose', '=', link.purpose).execute();
  await db
    .insertInto('oneTimeLinks')
    .values({
      tokenHash: hashSecret(token),
      personId,
      purpose: link.purpose,
      newEmail: link.purpose === 'change-email' ? link.newEmail : null,
      createdAt: now(),
      expiresAt: now() + LINK_LIFE_MS,
      usedAt: null,
    })
    .execute();
  return token;
}

/**
 * Uses a link up.
 *
 * @throws {HttpProblem} `LINK_INVALID` if it is unknown, of another purpose, used or expired
 */
export async function useLink({ db, now }: Core, token: string, purpose: LinkPurpose['purpose']) {
  const used = await db
    .updateTable('oneTimeLinks')
    .set({ usedAt: now() })
    .where('tokenHash', '=', hashSecret(token))
    .where('purpose', '=', purpose)
    .where('usedAt', 'is', null)
    .where('expiresAt', '>', now())
    .returning(['personId', 'newEmail'])
    .executeTakeFirst();
  if (!used) throw linkInvalid();
  return used;
}

export function linkInvalid(): HttpProblem {
  return new HttpProblem('LINK_INVALID', 'The link is unknown, was used or has expired. Ask for a new one.');
}
