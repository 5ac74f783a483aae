import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type ApiToken, apiTokenEndpoints as apiTokens } from '../contract/api-token.ts';
import { workspaceEndpoints as workspaces } from '../contract/workspace.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { makeWorld, type TestWorld } from '../testing/test-world.ts';

const DAY_MS = 24 * 3_600_000;

let server: TestServer;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());

async function newToken(
  world: TestWorld,
  who: 'engineer' | 'owner',
  role: 'viewer' | 'analyst' | 'engineer' | 'owner',
) {
  const browser = await server.browserOf(world.people[who]);
  const params = { workspaceId: world.workspaceId };
  const answer = await browser.call(apiTokens.createApiToken, { params, body: { name: 'nightly', role, days: 30 } });
  const headers = { Authorization: `Bearer ${String(answer.body.token)}` };
  return { browser, params, answer, headers };
}

describe('an API token', () => {
  it('reads by its secret, which is shown once and stored as a hash', async () => {
    const world = await makeWorld(server);
    const { browser, params, answer, headers } = await newToken(world, 'engineer', 'analyst');
    expect(answer.status).toBe(201);
    expect(answer.body.token).toMatch(/^voltiplano_[\w-]{43}$/);
    const read = await server.browser().call(workspaces.readWorkspace, { params, headers });
    expect(read.body).toMatchObject({ id: world.workspaceId, role: 'analyst' });
    const listed = (await browser.call(apiTokens.listApiTokens, { params })).body.items;
    expect(listed).toEqual([expect.objectContaining({ name: 'nightly', role: 'analyst' })]);
    expect(listed[0].lastUsedAt).toBe(new Date(server.clock.now).toISOString());
    const rows = await server.core.db.selectFrom('apiTokens').selectAll().execute();
    expect(JSON.stringify(rows)).not.toContain(answer.body.token);
  });

  it('is not made for a role above the own one', async () => {
    const { answer } = await newToken(await makeWorld(server), 'engineer', 'owner');
    expect(answer.body).toMatchObject({ status: 403, code: 'FORBIDDEN' });
  });

  it('does no more than its maker may by now', async () => {
    const world = await makeWorld(server);
    const owner = await server.browserOf(world.people.owner);
    const { params, headers } = await newToken(world, 'engineer', 'engineer');
    const target = { ...params, personId: world.people.engineer };
    await owner.call(workspaces.changeRole, { params: target, body: { role: 'viewer' } });
    expect((await server.browser().call(workspaces.readWorkspace, { params, headers })).body.role).toBe('viewer');
  });

  it('ends when its maker is removed, and stays ended when they come back', async () => {
    const world = await makeWorld(server);
    const owner = await server.browserOf(world.people.owner);
    const { params, headers } = await newToken(world, 'engineer', 'engineer');
    await owner.call(workspaces.removeMember, { params: { ...params, personId: world.people.engineer } });
    const personId = world.people.engineer;
    const back = { ...params, personId, role: 'engineer', joinedAt: 0 } as const;
    await server.core.db.insertInto('members').values(back).execute();
    const answer = await server.browser().call(workspaces.readWorkspace, { params, headers });
    expect(answer.body).toMatchObject({ status: 401, code: 'API_TOKEN_INVALID' });
  });

  it('ends when revoked, by its maker or an owner, and at its date', async () => {
    const world = await makeWorld(server);
    const owner = await server.browserOf(world.people.owner);
    const { params, answer, headers } = await newToken(world, 'engineer', 'engineer');
    const late = await newToken(world, 'engineer', 'engineer');
    await owner.call(apiTokens.revokeApiToken, { params: { ...params, tokenId: answer.body.apiToken.id as string } });
    expect((await server.browser().call(workspaces.readWorkspace, { params, headers })).status).toBe(401);
    server.clock.now += 30 * DAY_MS - 1;
    expect((await server.browser().call(workspaces.readWorkspace, { params, headers: late.headers })).status).toBe(200);
    server.clock.now += 1;
    expect((await server.browser().call(workspaces.readWorkspace, { params, headers: late.headers })).status).toBe(401);
  });

  it('of another workspace is neither seen nor revoked by an owner', async () => {
    const [one, two] = [await makeWorld(server), await makeWorld(server)];
    const owner = await server.browserOf(one.people.owner);
    const params = { workspaceId: one.workspaceId };
    const { items } = (await owner.call(apiTokens.listApiTokens, { params })).body as { items: ApiToken[] };
    expect(items.map(({ id }) => id)).toEqual([one.apiToken.id]);
    const foreign = { ...params, tokenId: two.apiToken.id };
    expect((await owner.call(apiTokens.revokeApiToken, { params: foreign })).status).toBe(404);
    const headers = { Authorization: `Bearer ${two.apiToken.secret}` };
    const read = await server
      .browser()
      .call(workspaces.readWorkspace, { params: { workspaceId: two.workspaceId }, headers });
    expect(read.status).toBe(200);
  });

  it('needs no CSRF token, and is not helped by cookies beside it', async () => {
    const world = await makeWorld(server);
    const { params, headers } = await newToken(world, 'owner', 'viewer');
    const owner = await server.browserOf(world.people.owner);
    const answer = await owner.call(workspaces.renameWorkspace, { params, body: { name: 'X' }, headers });
    expect(answer.body).toMatchObject({ status: 403, code: 'FORBIDDEN' });
  });

  it.each(['Bearer', 'Bearer made-up', 'Basic dXNlcjpwYXNz'])('is refused as %s', async (authorization) => {
    const { workspaceId } = await makeWorld(server);
    const answer = await server
      .browser()
      .call(workspaces.readWorkspace, { params: { workspaceId }, headers: { Authorization: authorization } });
    expect(answer.body).toMatchObject({ status: 401, code: 'API_TOKEN_INVALID' });
  });
});
