import type { ApiToken } from '../contract/api-token.ts';
import { type Role, roleMay } from '../contract/roles.ts';
import type { Core } from '../core.ts';
import { hashSecret, newId } from '../db/secret-tokens.ts';
import type { TokenActor } from '../http/actor.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';

/** Written down at most so often: every read would otherwise be a write [ms]. */
const LAST_USED_STEP_MS = 60_000;

/** The actor behind a token's secret, null if it is unknown, expired or revoked. */
export async function findApiToken({ db, now }: Core, secret: string): Promise<TokenActor | null> {
  const found = await db
    .selectFrom('apiTokens')
    .selectAll()
    .where('tokenHash', '=', hashSecret(secret))
    .where('revokedAt', 'is', null)
    .where('expiresAt', '>', now())
    .executeTakeFirst();
  if (!found) return null;
  const { id, personId, workspaceId, role, lastUsedAt } = found;
  if (lastUsedAt === null || lastUsedAt < now() - LAST_USED_STEP_MS) {
    await db.updateTable('apiTokens').set({ lastUsedAt: now() }).where('id', '=', id).execute();
  }
  return { kind: 'api-token', tokenId: id, personId, workspaceId, role };
}

type NewToken = { name: string; role: Role; secret: string; expiresAt: number };

export async function insertApiToken({ db, now }: Core, access: WorkspaceAccess, token: NewToken): Promise<string> {
  const id = newId();
  const { name, role, secret, expiresAt } = token;
  await db
    .insertInto('apiTokens')
    .values({
      id,
      workspaceId: access.workspaceId,
      personId: access.requirePerson(),
      name,
      role,
      tokenHash: hashSecret(secret),
      createdAt: now(),
      expiresAt,
      lastUsedAt: null,
      revokedAt: null,
    })
    .execute();
  return id;
}

/** Tokens that the caller may see: own ones, or as owner those of every member. Newest first. */
export async function listApiTokens({ db }: Core, access: WorkspaceAccess): Promise<ApiToken[]> {
  const personId = access.requirePerson();
  let query = db
    .selectFrom('apiTokens')
    .innerJoin('people', 'people.id', 'apiTokens.personId')
    .selectAll('apiTokens')
    .select('people.name as personName')
    .where('workspaceId', '=', access.workspaceId)
    .where('revokedAt', 'is', null)
    .orderBy('apiTokens.createdAt', 'desc');
  if (!roleMay(access.role, 'manage')) query = query.where('personId', '=', personId);
  const rows = await query.execute();
  return rows.map((row) => ({
    id: row.id,
    name: row.name,
    role: row.role,
    personId: row.personId,
    personName: row.personName,
    createdAt: new Date(row.createdAt).toISOString(),
    expiresAt: new Date(row.expiresAt).toISOString(),
    lastUsedAt: row.lastUsedAt === null ? null : new Date(row.lastUsedAt).toISOString(),
  }));
}

/** Revokes a token of the workspace. */
export async function setRevoked({ db, now }: Core, access: WorkspaceAccess, id: string): Promise<void> {
  access.requirePerson();
  await db
    .updateTable('apiTokens')
    .set({ revokedAt: now() })
    .where('id', '=', id)
    .where('workspaceId', '=', access.workspaceId)
    .execute();
}
