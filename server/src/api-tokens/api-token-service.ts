import type { ApiToken } from '../contract/api-token.ts';
import { lesserRole, type Role } from '../contract/roles.ts';
import type { Core } from '../core.ts';
import { type Deed, recordDeed } from '../activity/activity-repository.ts';
import { inTransaction } from '../db/database.ts';
import { newSecret } from '../db/secret-tokens.ts';
import { HttpProblem } from '../http/problem.ts';
import type { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { insertApiToken, listApiTokens, setRevoked } from './api-token-repository.ts';

const DAY_MS = 24 * 3_600_000;
/** Tells people and secret scanners what they look at. */
const PREFIX = 'voltiplano_';

type Wanted = { name: string; role: Role; days: number };

/** @throws {HttpProblem} `FORBIDDEN` if the role is above the caller's, `SESSION_REQUIRED` */
export function createApiToken(
  core: Core,
  access: WorkspaceAccess,
  { name, role, days }: Wanted,
): Promise<{ token: string; apiToken: ApiToken }> {
  if (lesserRole(role, access.role) !== role) {
    throw new HttpProblem('FORBIDDEN', `A token may not do more than you: ${role} is above ${access.role}.`);
  }
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const token = `${PREFIX}${newSecret()}`;
    const id = await insertApiToken(inner, access, {
      name,
      role,
      secret: token,
      expiresAt: core.now() + days * DAY_MS,
    });
    const apiToken = await getVisible(inner, access, id);
    await record(inner, access, 'apiToken.created', apiToken);
    return { token, apiToken };
  });
}

/** @throws {HttpProblem} `NOT_FOUND` if there is none that the caller may see, `SESSION_REQUIRED` */
export function revokeApiToken(core: Core, access: WorkspaceAccess, id: string): Promise<void> {
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const apiToken = await getVisible(inner, access, id);
    await setRevoked(inner, access, id);
    await record(inner, access, 'apiToken.revoked', apiToken);
  });
}

async function getVisible(core: Core, access: WorkspaceAccess, id: string): Promise<ApiToken> {
  const found = (await listApiTokens(core, access)).find((token) => token.id === id);
  if (!found) throw new HttpProblem('NOT_FOUND', 'There is no such token, or not for you.');
  return found;
}

function record(core: Core, access: WorkspaceAccess, action: Deed['action'], { id, name, role }: ApiToken) {
  const { workspaceId, actor } = access;
  return recordDeed(core, { workspaceId, personId: actor.personId, action, subjectId: id, detail: { name, role } });
}
