import type { Core } from '../core.ts';
import { findPersonByEmail, insertPerson } from '../account/people-repository.ts';
import { type OpenedSession, openSession } from '../account/session-repository.ts';
import { inTransaction } from '../db/database.ts';
import type { ProvenIdentity } from './provider-client.ts';

/** Why a sign-in at the provider led nowhere; the sign-in page says it in words. */
export type Refusal = 'EMAIL_NOT_VERIFIED' | 'ACCOUNT_NOT_PROVEN';

/**
 * Signs a person in whom the provider vouches for. A new person gets an account without a workspace. An account with
 * the same e-mail is theirs only if it once proved that e-mail: somebody else may have made it in their name.
 */
export function signInByProvider(
  core: Core,
  identity: ProvenIdentity,
  userAgent: string,
): Promise<OpenedSession | Refusal> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const known = await findByIdentity(inner, identity);
    const found = known === null ? await attachIdentity(inner, identity) : { personId: known };
    return typeof found === 'string' ? found : openSession(inner, found.personId, userAgent);
  });
}

async function findByIdentity({ db }: Core, { issuer, subject }: ProvenIdentity): Promise<string | null> {
  const found = await db
    .selectFrom('identities')
    .select('personId')
    .where('issuer', '=', issuer)
    .where('subject', '=', subject)
    .executeTakeFirst();
  return found?.personId ?? null;
}

async function attachIdentity(core: Core, identity: ProvenIdentity): Promise<{ personId: string } | Refusal> {
  const { issuer, subject, email, isEmailVerified, name } = identity;
  if (!email || !isEmailVerified) return 'EMAIL_NOT_VERIFIED';
  const existing = await findPersonByEmail(core.db, email);
  if (existing && existing.emailProvenAt === null) return 'ACCOUNT_NOT_PROVEN';
  const newPerson = { email, name: name?.slice(0, 100) || email, passwordHash: null, isEmailProven: true };
  const personId = existing?.id ?? (await insertPerson(core, newPerson));
  await core.db.insertInto('identities').values({ issuer, subject, personId, createdAt: core.now() }).execute();
  return { personId };
}
