import { insertPerson } from '../account/people-repository.ts';
import { type Role, roles } from '../contract/roles.ts';
import type { PartReference } from '../contract/study.ts';
import { newId, newSecret, hashSecret } from '../db/secret-tokens.ts';
import { etagOf } from '../http/if-match.ts';
import { failedHeadline } from '../runs/compute-headline.ts';
import { engineVersion } from '../runs/headline-runs.ts';
import { createStudy } from '../studies/study-service.ts';
import { writeWorkingCopy } from '../studies/working-copy-service.ts';
import { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { insertWorkspace } from '../workspaces/workspace-repository.ts';
import { examplePart } from './example-parts.ts';
import { exampleStudy } from './example-study.ts';
import type { TestServer } from './test-server.ts';

const DAY_MS = 24 * 3_600_000;

/** A workspace with a member of each role and two more owners' things to act on, an outsider, and a removed member. */
export type TestWorld = {
  workspaceId: string;
  name: string;
  people: Record<Role | 'bystander' | 'outsider' | 'removed', string>;
  outsiderWorkspaceId: string;
  /** An open invitation to somebody, and its token. */
  invitation: { id: string; token: string; email: string };
  /** An API token that the bystander made, of role viewer. */
  apiToken: { id: string; secret: string };
  /** A cell in the library, of two revisions. */
  libraryItemId: string;
  /** The analyst's study, whose working copy, at version 2, differs from its one revision. */
  study: { id: string };
};

let serial = 0;

/** Fills a database in one transaction, without HTTP. */
export function makeWorld({ core }: TestServer): Promise<TestWorld> {
  return core.db.transaction().execute(async (db) => {
    const inner = { ...core, db };
    serial += 1;
    const number = serial;
    const make = (name: string) =>
      insertPerson(inner, { email: `${name}-${number}@puna.example`, name, passwordHash: null, isEmailProven: true });
    const [owner, engineer, analyst, viewer] = [
      await make('owner'),
      await make('engineer'),
      await make('analyst'),
      await make('viewer'),
    ];
    const people = {
      owner,
      engineer,
      analyst,
      viewer,
      bystander: await make('bystander'),
      outsider: await make('outsider'),
      removed: await make('removed'),
    };
    const { id: workspaceId, name } = await insertWorkspace(inner, owner, 'Puna Mobility');
    const { id: outsiderWorkspaceId } = await insertWorkspace(inner, people.outsider, 'Salar');
    const joinedAt = core.now();
    for (const role of roles.filter((one) => one !== 'owner')) {
      await db.insertInto('members').values({ workspaceId, personId: people[role], role, joinedAt }).execute();
    }
    await db
      .insertInto('members')
      .values({ workspaceId, personId: people.bystander, role: 'viewer', joinedAt })
      .execute();
    const world = { workspaceId, name, people, outsiderWorkspaceId };
    const invitation = { id: newId(), token: newSecret(), email: `invited-${number}@puna.example` };
    await db
      .insertInto('invitations')
      .values({
        id: invitation.id,
        workspaceId,
        email: invitation.email,
        role: 'engineer',
        tokenHash: hashSecret(invitation.token),
        invitedBy: owner,
        createdAt: joinedAt,
        expiresAt: joinedAt + 7 * DAY_MS,
        acceptedAt: null,
        withdrawnAt: null,
      })
      .execute();
    const apiToken = await insertToken(inner, { workspaceId, personId: people.bystander, role: 'viewer' });
    const libraryItemId = await insertCell(inner, { workspaceId, personId: people.bystander });
    const study = await makeStudy(inner, workspaceId, { personId: analyst, cellId: libraryItemId });
    return { ...world, invitation, apiToken, libraryItemId, study };
  });
}

/** A study with a changed working copy that uses a cell of the library, without a run of the engine. */
async function makeStudy(
  core: TestServer['core'],
  workspaceId: string,
  { personId, cellId }: { personId: string; cellId: string },
): Promise<{ id: string }> {
  const actor = { kind: 'session', personId, sessionId: 'none' } as const;
  const access = await WorkspaceAccess.open(core.db, actor, workspaceId);
  const inputs = exampleStudy();
  const parts: PartReference[] = [{ part: 'cell', itemId: cellId, revision: 1, keptAgainst: null }];
  const beginning = { inputs, parts, message: 'Created' };
  const { id } = await createStudy(core, access, beginning, failedHeadline('Not run', engineVersion));
  const changed = { inputs: { ...inputs, title: `${inputs.title}, changed` }, parts, pending: {} };
  await writeWorkingCopy(core, access, id, changed, etagOf('w', 1));
  return { id };
}

/** An API token straight into the database. */
export async function insertToken(
  { db, now }: TestServer['core'],
  {
    workspaceId,
    personId,
    role,
    expiresAt = now() + DAY_MS,
  }: { workspaceId: string; personId: string; role: Role; expiresAt?: number },
): Promise<{ id: string; secret: string }> {
  const [id, secret] = [newId(), newSecret()];
  const tokenHash = hashSecret(secret);
  const values = { id, workspaceId, personId, name: 'script', role, tokenHash, createdAt: now(), expiresAt };
  await db
    .insertInto('apiTokens')
    .values({ ...values, lastUsedAt: null, revokedAt: null })
    .execute();
  return { id, secret };
}

/** A cell of two revisions straight into the database. */
async function insertCell(
  { db, now }: TestServer['core'],
  { workspaceId, personId }: { workspaceId: string; personId: string },
): Promise<string> {
  const id = newId();
  const head = { name: 'Vicuña cell', sortName: 'vicuna cell', revision: 2, changedAt: now(), changedBy: personId };
  await db
    .insertInto('libraryItems')
    .values({ id, workspaceId, kind: 'cell', ...head, archivedAt: null })
    .execute();
  for (const [revision, notes] of [
    [1, ''],
    [2, 'Measured'],
  ] as const) {
    const body = JSON.stringify({ ...examplePart('cell'), name: head.name });
    const said = { name: head.name, notes, source: 'Bench', body, message: notes };
    await db
      .insertInto('libraryRevisions')
      .values({ itemId: id, revision, ...said, createdAt: now(), createdBy: personId })
      .execute();
  }
  return id;
}
