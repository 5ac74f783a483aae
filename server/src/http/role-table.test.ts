import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { signAccessToken } from '../account/access-token.ts';
import { endpoints } from '../contract/endpoints.ts';
import type { ProblemCode } from '../contract/problem.ts';
import { exampleStudy } from '../testing/example-study.ts';
import type { TestBrowser } from '../testing/test-browser.ts';
import { examplePart } from '../testing/example-parts.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { insertToken, makeWorld, type TestWorld } from '../testing/test-world.ts';

/**
 * Who tries. Those with "token" are scripts with an API token of that role; the other token is one of another workspace,
 * made by somebody who owns both.
 */
const actors = [
  'signed out',
  'expired',
  'viewer',
  'analyst',
  'engineer',
  'owner',
  'outsider',
  'removed',
  'viewer token',
  'owner token',
  'other token',
  'expired token',
] as const;
type Actor = (typeof actors)[number];
type Verdict = 'may' | ProblemCode;

const [may, no, gone, session] = ['may', 'FORBIDDEN', 'NOT_FOUND', 'SESSION_REQUIRED'] as const;
const anyone = actors.map((): Verdict => may);
const strangers = ['NOT_SIGNED_IN', 'ACCESS_EXPIRED'] as const;
const ended = 'API_TOKEN_INVALID' as const;

// Columns as in `actors`. Written out by hand from the table of roles, not read from the endpoints.
const person: Verdict[] = [...strangers, may, may, may, may, may, may, session, session, session, ended];
const members: Verdict[] = [...strangers, may, may, may, may, gone, gone, may, may, gone, ended];
const analysts: Verdict[] = [...strangers, no, may, may, may, gone, gone, no, may, gone, ended];
const owners: Verdict[] = [...strangers, no, no, no, may, gone, gone, no, may, gone, ended];
const engineers: Verdict[] = [...strangers, no, no, may, may, gone, gone, no, may, gone, ended];
const memberPersons: Verdict[] = [...strangers, may, may, may, may, gone, gone, session, session, gone, ended];

type Row = {
  verdicts: Verdict[];
  status?: number;
  params?: object;
  body?: object;
  query?: Record<string, string>;
  headers?: Record<string, string>;
};
type RowOf = (world: TestWorld) => Row;

const email = 'new@puna.example';
const password = 'a windy plateau';
const inWorkspace = ({ workspaceId }: TestWorld) => ({ workspaceId });
const bystander = ({ workspaceId, people }: TestWorld) => ({ workspaceId, personId: people.bystander });
const cell = ({ workspaceId, libraryItemId }: TestWorld) => ({ workspaceId, itemId: libraryItemId });
const firstOfCell = (world: TestWorld) => ({ ...cell(world), revision: '1' });
const content = { name: 'Suri cell', notes: '', source: '', body: examplePart('cell') };
const file = { format: 'voltiplano/library', version: 1, items: [{ kind: 'cell', ...content }] };
const study = ({ workspaceId, study: { id } }: TestWorld) => ({ workspaceId, studyId: id });
const invited = ({ workspaceId, invitation }: TestWorld) => ({ workspaceId, invitationId: invitation.id });

/** A row for each endpoint. `status` is what success looks like where the world has nothing for it to succeed with. */
const table: Record<string, RowOf> = {
  signInOptions: () => ({ verdicts: anyone }),
  signUp: (world) => ({
    verdicts: anyone,
    body: { email: `new-${world.workspaceId}@puna.example`, name: 'New', password, workspaceName: 'New' },
  }),
  signUpInvited: ({ invitation }) => ({ verdicts: anyone, body: { token: invitation.token, name: 'New', password } }),
  signIn: () => ({ verdicts: anyone, status: 401, body: { email, password } }),
  signOut: () => ({ verdicts: anyone }),
  startProvider: () => ({ verdicts: anyone, status: 404 }),
  finishProvider: () => ({ verdicts: anyone, status: 404 }),
  askReset: () => ({ verdicts: anyone, body: { email } }),
  resetPassword: () => ({ verdicts: anyone, status: 410, body: { token: 'unknown', password } }),
  confirmEmail: () => ({ verdicts: anyone, status: 410, body: { token: 'unknown' } }),
  readInvitation: ({ invitation }) => ({ verdicts: anyone, body: { token: invitation.token } }),
  readMailbox: () => ({ verdicts: anyone }),

  readMe: () => ({ verdicts: person }),
  renameMe: () => ({ verdicts: person, body: { name: 'Other' } }),
  listDevices: () => ({ verdicts: person }),
  signOutEverywhere: () => ({ verdicts: person }),
  signOutDevice: ({ workspaceId }) => ({ verdicts: person, status: 404, params: { deviceId: workspaceId } }),
  changePassword: () => ({ verdicts: person, status: 403, body: { presentPassword: 'wrong', newPassword: password } }),
  askEmailChange: () => ({ verdicts: person, status: 403, body: { newEmail: email, password: 'wrong' } }),
  createWorkspace: () => ({ verdicts: person, body: { name: 'Second' } }),
  acceptInvitation: ({ invitation }) => ({ verdicts: person, status: 403, body: { token: invitation.token } }),

  readWorkspace: (world) => ({ verdicts: members, params: inWorkspace(world) }),
  listMembers: (world) => ({ verdicts: members, params: inWorkspace(world) }),
  listActivity: (world) => ({ verdicts: members, params: inWorkspace(world) }),
  leaveWorkspace: (world) => ({
    // The one owner may try, and is told that somebody must stay.
    verdicts: memberPersons.map((verdict, i) => (actors[i] === 'owner' ? 'LAST_OWNER' : verdict)),
    params: inWorkspace(world),
  }),
  listApiTokens: (world) => ({ verdicts: memberPersons, params: inWorkspace(world) }),
  createApiToken: (world) => ({
    verdicts: memberPersons,
    params: inWorkspace(world),
    body: { name: 'script', role: 'viewer', days: 30 },
  }),
  revokeApiToken: (world) => ({
    // The token is the bystander's: only an owner sees it.
    verdicts: memberPersons.map((verdict, i) => (verdict === may && actors[i] !== 'owner' ? gone : verdict)),
    params: { workspaceId: world.workspaceId, tokenId: world.apiToken.id },
  }),

  listStudies: (world) => ({ verdicts: members, params: inWorkspace(world) }),
  readStudy: (world) => ({ verdicts: members, params: study(world) }),
  listStudyRevisions: (world) => ({ verdicts: members, params: study(world) }),
  readStudyRevision: (world) => ({ verdicts: members, params: { ...study(world), revision: '1' } }),
  createStudy: (world) => ({ verdicts: analysts, params: inWorkspace(world), body: { inputs: exampleStudy() } }),
  writeWorkingCopy: (world) => ({
    verdicts: analysts,
    params: study(world),
    body: { inputs: exampleStudy() },
    headers: { 'If-Match': '"w2"' },
  }),
  saveRevision: (world) => ({
    verdicts: analysts,
    params: study(world),
    body: { message: 'Warmer' },
    headers: { 'If-Match': '"w2"' },
  }),
  copyStudy: (world) => ({ verdicts: analysts, params: study(world), body: {} }),
  archiveStudy: (world) => ({ verdicts: analysts, params: study(world) }),
  unarchiveStudy: (world) => ({ verdicts: analysts, params: study(world) }),

  renameWorkspace: (world) => ({ verdicts: owners, params: inWorkspace(world), body: { name: 'Other' } }),
  deleteWorkspace: (world) => ({ verdicts: owners, params: inWorkspace(world), body: { name: world.name } }),
  changeRole: (world) => ({ verdicts: owners, params: bystander(world), body: { role: 'analyst' } }),
  removeMember: (world) => ({ verdicts: owners, params: bystander(world) }),
  listInvitations: (world) => ({ verdicts: owners, params: inWorkspace(world) }),
  invite: (world) => ({ verdicts: owners, params: inWorkspace(world), body: { email, role: 'viewer' } }),
  resendInvitation: (world) => ({ verdicts: owners, params: invited(world) }),
  withdrawInvitation: (world) => ({ verdicts: owners, params: invited(world) }),

  listLibrary: (world) => ({ verdicts: members, params: inWorkspace(world) }),
  readLibraryItem: (world) => ({ verdicts: members, params: cell(world) }),
  listLibraryRevisions: (world) => ({ verdicts: members, params: cell(world) }),
  readLibraryRevision: (world) => ({ verdicts: members, params: firstOfCell(world) }),
  listLibraryUse: (world) => ({ verdicts: members, params: cell(world) }),
  exportLibrary: (world) => ({ verdicts: members, params: inWorkspace(world) }),
  createLibraryItem: (world) => ({
    verdicts: engineers,
    params: inWorkspace(world),
    body: { kind: 'cell', ...content },
  }),
  reviseLibraryItem: (world) => ({
    verdicts: engineers,
    params: cell(world),
    headers: { 'If-Match': '"r2"' },
    body: content,
  }),
  restoreLibraryRevision: (world) => ({
    verdicts: engineers,
    params: firstOfCell(world),
    headers: { 'If-Match': '"r2"' },
  }),
  archiveLibraryItem: (world) => ({ verdicts: engineers, params: cell(world) }),
  unarchiveLibraryItem: (world) => ({ verdicts: engineers, params: cell(world) }),
  importLibrary: (world) => ({ verdicts: engineers, params: inWorkspace(world), body: { file } }),
};

/** Refreshing has its own tests: a browser without a session has nothing to refresh. */
const elsewhere = ['refresh'];

let server: TestServer;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());

describe('routes × roles', () => {
  it('has a row for every endpoint', () => {
    expect(Object.keys(table).concat(elsewhere).sort()).toEqual(endpoints.map(({ id }) => id).sort());
  });

  const judged = endpoints.filter(({ id }) => table[id]);
  it.each(judged.map((endpoint) => [endpoint.id, endpoint] as const))('%s', async (id, endpoint) => {
    const found: Record<string, unknown> = {};
    const wanted: Record<string, unknown> = {};
    for (const [i, actor] of actors.entries()) {
      const world = await makeWorld(server);
      const row = table[id]?.(world);
      const verdict = row?.verdicts[i];
      const { browser, headers } = await actAs(actor, world);
      const before = await rowsOf(world);
      const { params, body, query } = row ?? {};
      const call = { params, body, query, headers: { ...row?.headers, ...headers } };
      const answer = await browser.call(endpoint, call as object);
      wanted[actor] = verdict === may ? (row?.status ?? endpoint.status) : verdict;
      found[actor] = verdict === may ? answer.status : (answer.body.code ?? answer.status);
      if (verdict !== may)
        expect(await rowsOf(world), `${actor} was refused ${id}, but changed something`).toBe(before);
    }
    expect(found).toEqual(wanted);
  });
});

async function actAs(
  actor: Actor,
  world: TestWorld,
): Promise<{ browser: TestBrowser; headers?: Record<string, string> }> {
  const { people, workspaceId, outsiderWorkspaceId } = world;
  const token = async (personId: string, role: 'viewer' | 'owner', of = workspaceId, expiresAt?: number) => {
    const { secret } = await insertToken(server.core, { workspaceId: of, personId, role, expiresAt });
    return { browser: server.browser(), headers: { Authorization: `Bearer ${secret}` } };
  };
  switch (actor) {
    case 'signed out':
      return { browser: server.browser() };
    case 'expired':
      return { browser: await expiredBrowser(people.owner) };
    case 'removed':
      return { browser: await removedBrowser(world) };
    case 'viewer token':
      // Made by an owner: the token's role holds, not its maker's.
      return token(people.owner, 'viewer');
    case 'owner token':
      return token(people.owner, 'owner');
    case 'other token':
      return token(await ownerOfBoth(world), 'owner', outsiderWorkspaceId);
    case 'expired token':
      return token(people.owner, 'owner', workspaceId, server.clock.now - 1);
    default:
      return { browser: await server.browserOf(people[actor]) };
  }
}

/** The owner, who belongs to another workspace too. */
async function ownerOfBoth({ people, outsiderWorkspaceId: workspaceId }: TestWorld): Promise<string> {
  const values = { workspaceId, personId: people.owner, role: 'owner', joinedAt: server.clock.now } as const;
  await server.core.db.insertInto('members').values(values).execute();
  return people.owner;
}

async function expiredBrowser(personId: string): Promise<TestBrowser> {
  const browser = await server.browserOf(personId);
  const anHourAgo = { ...server.core, now: () => server.clock.now - 3_600_000 };
  browser.cookies.set(
    'voltiplano_access',
    await signAccessToken(anHourAgo, { personId, sessionId: await newestSession(personId) }),
  );
  return browser;
}

async function newestSession(personId: string): Promise<string> {
  const { id } = await server.core.db
    .selectFrom('sessions')
    .select('id')
    .where('personId', '=', personId)
    .executeTakeFirstOrThrow();
  return id;
}

/** Signed in while a member, and removed since. */
async function removedBrowser({ people, workspaceId }: TestWorld): Promise<TestBrowser> {
  const members = server.core.db;
  const values = { workspaceId, personId: people.removed, role: 'owner', joinedAt: server.clock.now } as const;
  await members.insertInto('members').values(values).execute();
  const browser = await server.browserOf(people.removed);
  await members.deleteFrom('members').where('personId', '=', people.removed).execute();
  return browser;
}

/** Everything of a workspace, as text to compare. */
async function rowsOf({ workspaceId }: TestWorld): Promise<string> {
  const { db } = server.core;
  const tables = ['members', 'invitations', 'activity', 'libraryItems', 'studies'] as const;
  const rows = await Promise.all([
    db.selectFrom('workspaces').selectAll().where('id', '=', workspaceId).execute(),
    ...tables.map((table) => db.selectFrom(table).selectAll().where('workspaceId', '=', workspaceId).execute()),
    db.selectFrom('apiTokens').select(['id', 'revokedAt']).where('workspaceId', '=', workspaceId).execute(),
    db
      .selectFrom('libraryRevisions')
      .innerJoin('libraryItems', 'libraryItems.id', 'libraryRevisions.itemId')
      .selectAll('libraryRevisions')
      .where('workspaceId', '=', workspaceId)
      .execute(),
  ]);
  return JSON.stringify(rows);
}
