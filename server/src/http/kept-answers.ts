import { createHash } from 'node:crypto';
import type { Core } from '../core.ts';
import { hashSecret } from '../db/secret-tokens.ts';
import { seal, unseal } from '../secrets/seal.ts';
import { HttpProblem } from './problem.ts';

/** How long a call may be repeated under its key [ms]. */
const KEPT_MS = 24 * 3_600_000;

export type KeptAnswer = { status: number; body: unknown; etag: string | null };

/** A call under an idempotency key: whose it is, its key, and what it asks for. */
export type KeyedCall = { personId: string; key: string; request: string };

/**
 * The answer to an earlier call under the same key, null where there was none.
 *
 * @throws {HttpProblem} `IDEMPOTENCY_MISMATCH` if the earlier call asked for something else
 */
export async function findKeptAnswer({ db, secrets, now }: Core, call: KeyedCall): Promise<KeptAnswer | null> {
  const kept = await db
    .selectFrom('keptAnswers')
    .selectAll()
    .where('keyHash', '=', keyHashOf(call))
    .where('createdAt', '>', now() - KEPT_MS)
    .executeTakeFirst();
  if (!kept) return null;
  if (kept.requestHash !== hashRequest(call)) {
    throw new HttpProblem('IDEMPOTENCY_MISMATCH', 'This Idempotency-Key was used for another request. Take a new one.');
  }
  // The key itself is not stored: only who knows it can read the answer, which may hold a secret shown once.
  return {
    status: kept.status,
    etag: kept.etag,
    body: JSON.parse(unseal(secrets.sealing, contextOf(call), kept.sealedBody)) as unknown,
  };
}

/** Keeps the answer in the transaction of the call, and drops those that are too old to be asked for. */
export async function keepAnswer({ db, secrets, now }: Core, call: KeyedCall, answer: KeptAnswer): Promise<void> {
  await db
    .deleteFrom('keptAnswers')
    .where('createdAt', '<=', now() - KEPT_MS)
    .execute();
  await db
    .insertInto('keptAnswers')
    .values({
      keyHash: keyHashOf(call),
      requestHash: hashRequest(call),
      status: answer.status,
      etag: answer.etag,
      sealedBody: seal(secrets.sealing, contextOf(call), JSON.stringify(answer.body ?? null)),
      createdAt: now(),
    })
    .execute();
}

function contextOf({ personId, key }: KeyedCall): string {
  return `kept answer ${personId} ${key}`;
}

function keyHashOf(call: KeyedCall): string {
  return hashSecret(contextOf(call));
}

function hashRequest({ request }: KeyedCall): string {
  return createHash('sha256').update(request).digest('base64url');
}
