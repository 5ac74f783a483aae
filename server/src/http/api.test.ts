import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accountEndpoints as account } from '../contract/account.ts';
import { apiTokenEndpoints as apiTokens } from '../contract/api-token.ts';
import { workspaceEndpoints as workspaces } from '../contract/workspace.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { makeWorld } from '../testing/test-world.ts';

const DAY_MS = 24 * 3_600_000;

let server: TestServer;
beforeAll(async () => {
  server = await startTestServer({ rateLimits: { mail: 3, 'same e-mail': 5 } });
});
afterAll(() => server.close());

describe('Idempotency-Key', () => {
  it('makes a repeated call create nothing more and get the same answer', async () => {
    const { people } = await makeWorld(server);
    const browser = await server.browserOf(people.owner);
    const call = { body: { name: 'Once' }, headers: { 'Idempotency-Key': 'key-1' } };
    const answers = await Promise.all([1, 2, 3].map(() => browser.call(workspaces.createWorkspace, call)));
    expect(answers.map(({ status }) => status)).toEqual([201, 201, 201]);
    expect(new Set(answers.map(({ body }) => body.id as string)).size).toBe(1);
    const { workspaces: mine } = (await browser.call(account.readMe)).body;
    expect(mine).toHaveLength(2);
  });

  it('is refused for another request, and is free for another person', async () => {
    const { people } = await makeWorld(server);
    const [owner, viewer] = [await server.browserOf(people.owner), await server.browserOf(people.viewer)];
    const headers = { 'Idempotency-Key': 'key-2' };
    await owner.call(workspaces.createWorkspace, { body: { name: 'One' }, headers });
    const other = await owner.call(workspaces.createWorkspace, { body: { name: 'Two' }, headers });
    expect(other.body).toMatchObject({ status: 422, code: 'IDEMPOTENCY_MISMATCH' });
    expect((await viewer.call(workspaces.createWorkspace, { body: { name: 'Two' }, headers })).status).toBe(201);
  });

  it('keeps no failed answer: the call may be mended under the same key', async () => {
    const { people, workspaceId } = await makeWorld(server);
    const engineer = await server.browserOf(people.engineer);
    const call = { params: { workspaceId }, headers: { 'Idempotency-Key': 'key-3' } };
    const refused = await engineer.call(apiTokens.createApiToken, {
      ...call,
      body: { name: 'x', role: 'owner', days: 1 },
    });
    expect(refused.status).toBe(403);
    const mended = await engineer.call(apiTokens.createApiToken, {
      ...call,
      body: { name: 'x', role: 'viewer', days: 1 },
    });
    expect(mended.status).toBe(201);
  });

  it('gives a secret again, although the database does not hold it readably', async () => {
    const { people, workspaceId } = await makeWorld(server);
    const engineer = await server.browserOf(people.engineer);
    const call = {
      params: { workspaceId },
      body: { name: 'x', role: 'viewer', days: 1 },
      headers: { 'Idempotency-Key': 'k' },
    } as const;
    const first = await engineer.call(apiTokens.createApiToken, call);
    const second = await engineer.call(apiTokens.createApiToken, call);
    expect(second.body).toEqual(first.body);
    const kept = await server.core.db.selectFrom('keptAnswers').select('sealedBody').execute();
    for (const { sealedBody } of kept) expect(sealedBody.toString('latin1')).not.toContain('voltiplano_');
  });

  it('is forgotten after a day', async () => {
    const { people } = await makeWorld(server);
    const headers = { 'Idempotency-Key': 'key-5' };
    const early = await (
      await server.browserOf(people.owner)
    ).call(workspaces.createWorkspace, { body: { name: 'One' }, headers });
    server.clock.now += DAY_MS;
    const late = await (
      await server.browserOf(people.owner)
    ).call(workspaces.createWorkspace, { body: { name: 'One' }, headers });
    expect(late.status).toBe(201);
    expect(late.body.id).not.toBe(early.body.id);
  });

  it.each(['', 'two words', 'x'.repeat(201)])('must be 1 to 200 visible characters: %j', async (key) => {
    const { people } = await makeWorld(server);
    const browser = await server.browserOf(people.owner);
    const answer = await browser.call(workspaces.createWorkspace, {
      body: { name: 'One' },
      headers: { 'Idempotency-Key': key },
    });
    expect(answer.body).toMatchObject({ status: 422, errors: [{ path: 'header.Idempotency-Key' }] });
  });
});

describe('a body', () => {
  it('that is no JSON is refused without its text', async () => {
    const response = await fetch(`${server.address}/api/v1/auth/sign-in`, {
      method: 'POST',
      headers: { 'Content-Type': 'application/json' },
      body: '{"password": "hush',
    });
    expect(response.status).toBe(400);
    expect(await response.text()).not.toContain('hush');
  });

  it('is not even read from somebody who may not call', async () => {
    const response = await fetch(`${server.address}/api/v1/workspaces`, {
      method: 'POST',
      headers: { 'Content-Type': 'application/json', Origin: server.address },
      body: '{"name": "hush',
    });
    expect(response.status).toBe(401);
  });

  it('of another type counts as none', async () => {
    const headers = { 'Content-Type': 'text/plain' };
    const answer = await server
      .browser()
      .call(account.signIn, { body: { email: 'a@b.example', password: 'x' }, headers });
    expect(answer.body).toMatchObject({ status: 422, code: 'INVALID_INPUT' });
  });

  it('above 1 MB is refused', async () => {
    const name = 'x'.repeat(1_100_000);
    const answer = await server
      .browser()
      .call(account.signUp, { body: { email: 'a@b.example', name, password: name, workspaceName: 'X' } });
    expect(answer.body).toMatchObject({ status: 413, code: 'BODY_TOO_LARGE' });
  });
});

describe('tries', () => {
  it('are counted by address and kind of call', async () => {
    const body = { email: 'nobody@puna.example' };
    for (const _try of [1, 2, 3]) expect((await server.browser().call(account.askReset, { body })).status).toBe(202);
    const answer = await server.browser().call(account.askReset, { body });
    expect(answer.body).toMatchObject({ status: 429, code: 'TOO_MANY_REQUESTS' });
    expect(Number(answer.headers.get('retry-after'))).toBeGreaterThan(0);
    expect((await server.browser().call(account.signIn, { body: { ...body, password: 'x' } })).status).toBe(401);
  });

  it('at signing in are counted by e-mail too, from wherever they come, and only those that fail', async () => {
    const email = 'guessed@puna.example';
    const browser = server.browser();
    const made = { email, name: 'G', password: 'a windy plateau', workspaceName: 'G' };
    expect((await browser.call(account.signUp, { body: made })).status).toBe(201);
    const attempt = async (password: string) =>
      (await browser.call(account.signIn, { body: { email, password } })).status;
    for (let i = 0; i < 8; i += 1) expect(await attempt(made.password)).toBe(200);
    for (let i = 0; i < 5; i += 1) expect(await attempt('a guess')).toBe(401);
    expect(await attempt('a guess')).toBe(429);
    const other = await server.browser().call(account.signIn, { body: { email: 'other@puna.example', password: 'x' } });
    expect(other.status).toBe(401);
  });
});
