import type { Core } from '../core.ts';
import { inTransaction } from '../db/database.ts';
import { hashSecret, newId, newSecret } from '../db/secret-tokens.ts';

/** A device that is not used for so long is signed out [ms]. */
export const SESSION_LIFE_MS = 30 * 24 * 3_600_000;

export type OpenedSession = { personId: string; sessionId: string; refreshToken: string };

export type Rotation = OpenedSession | 'unknown' | 'ended' | 'reused';

/** Signs a device in: a new family of refresh tokens, with its first one. */
export async function openSession(core: Core, personId: string, userAgent: string): Promise<OpenedSession> {
  const { db, now } = core;
  const sessionId = newId();
  const at = now();
  // Devices long gone are of no use to anybody; their tokens go with them.
  await db
    .deleteFrom('sessions')
    .where('personId', '=', personId)
    .where('expiresAt', '<', at - SESSION_LIFE_MS)
    .execute();
  await db
    .insertInto('sessions')
    .values({
      id: sessionId,
      personId,
      userAgent: userAgent.slice(0, 300),
      createdAt: at,
      lastUsedAt: at,
      expiresAt: at + SESSION_LIFE_MS,
      endedAt: null,
    })
    .execute();
  return { personId, sessionId, refreshToken: await issueRefreshToken(core, sessionId) };
}

/**
 * Exchanges a refresh token for the next of its family. A spent one that comes back was stolen, now or before: the
 * family ends, for the thief and for the owner alike.
 */
export function rotateSession(core: Core, refreshToken: string): Promise<Rotation> {
  return inTransaction(core.db, async (db): Promise<Rotation> => {
    const found = await findRefreshToken(db, refreshToken);
    if (!found) return 'unknown';
    const { sessionId, personId } = found;
    const at = core.now();
    if (found.endedAt !== null || found.expiresAt <= at) return 'ended';
    if (found.spentAt !== null) {
      await db.updateTable('sessions').set({ endedAt: at }).where('id', '=', sessionId).execute();
      return 'reused';
    }
    await db
      .updateTable('refreshTokens')
      .set({ spentAt: at })
      .where('tokenHash', '=', hashSecret(refreshToken))
      .execute();
    // A token spent so long ago is remembered no more: whoever brings it is a stranger, not a thief of this session.
    await db
      .deleteFrom('refreshTokens')
      .where('sessionId', '=', sessionId)
      .where('spentAt', '<', at - SESSION_LIFE_MS)
      .execute();
    const lives = { lastUsedAt: at, expiresAt: at + SESSION_LIFE_MS };
    await db.updateTable('sessions').set(lives).where('id', '=', sessionId).execute();
    return { personId, sessionId, refreshToken: await issueRefreshToken({ ...core, db }, sessionId) };
  });
}

/** Whether a session may still be used. */
export async function isSessionLive({ db, now }: Core, sessionId: string): Promise<boolean> {
  const found = await db
    .selectFrom('sessions')
    .select('id')
    .where('id', '=', sessionId)
    .where('endedAt', 'is', null)
    .where('expiresAt', '>', now())
    .executeTakeFirst();
  return found !== undefined;
}

/** The session of a refresh token, whether spent or not; null where there is none. */
export async function sessionOfRefreshToken({ db }: Core, refreshToken: string): Promise<string | null> {
  const found = await findRefreshToken(db, refreshToken);
  return found?.sessionId ?? null;
}

/** Sessions of a person that are live, last used first. */
export function listLiveSessions({ db, now }: Core, personId: string) {
  return db
    .selectFrom('sessions')
    .select(['id', 'userAgent', 'createdAt', 'lastUsedAt'])
    .where('personId', '=', personId)
    .where('endedAt', 'is', null)
    .where('expiresAt', '>', now())
    .orderBy('lastUsedAt', 'desc')
    .execute();
}

/** Ends sessions of a person: one, all, or all but one. Answers how many were live. */
export async function endSessions(
  { db, now }: Core,
  personId: string,
  which: { only?: string; except?: string },
): Promise<number> {
  let update = db
    .updateTable('sessions')
    .set({ endedAt: now() })
    .where('personId', '=', personId)
    .where('endedAt', 'is', null);
  if (which.only !== undefined) update = update.where('id', '=', which.only);
  if (which.except !== undefined) update = update.where('id', '!=', which.except);
  const { numUpdatedRows } = await update.executeTakeFirst();
  return Number(numUpdatedRows);
}

/** Ends one session, whoever's it is. */
export async function endSession({ db, now }: Core, sessionId: string): Promise<void> {
  const ended = db.updateTable('sessions').set({ endedAt: now() }).where('id', '=', sessionId);
  await ended.where('endedAt', 'is', null).execute();
}

async function issueRefreshToken({ db, now }: Core, sessionId: string): Promise<string> {
  const refreshToken = newSecret();
  const values = { tokenHash: hashSecret(refreshToken), sessionId, createdAt: now(), spentAt: null };
  await db.insertInto('refreshTokens').values(values).execute();
  return refreshToken;
}

function findRefreshToken(db: Core['db'], refreshToken: string) {
  return db
    .selectFrom('refreshTokens')
    .innerJoin('sessions', 'sessions.id', 'refreshTokens.sessionId')
    .select(['sessionId', 'personId', 'spentAt', 'endedAt', 'expiresAt'])
    .where('tokenHash', '=', hashSecret(refreshToken))
    .executeTakeFirst();
}
