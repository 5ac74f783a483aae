import express from 'express';
import { sql } from 'kysely';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { idSchema } from '../contract/common.ts';
import { defineEndpoint } from '../contract/endpoint.ts';
import { closeGracefully } from '../close-gracefully.ts';
import { listen } from '../listen.ts';
import type { TestBrowser } from '../testing/test-browser.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { makeWorld, type TestWorld } from '../testing/test-world.ts';
import { Api } from './api.ts';
import { answerProblem } from './problem.ts';
import { requestLog } from './request-log.ts';

const make = defineEndpoint({
  id: 'makeThing',
  method: 'post',
  path: '/workspaces/:workspaceId/things',
  tag: 'Test',
  summary: 'Make a thing, which takes long',
  access: 'edit-studies',
  params: z.object({ workspaceId: idSchema }),
  body: z.object({ name: z.string() }),
  status: 201,
  answer: z.object({ name: z.string(), prepared: z.int() }),
  problems: [],
  creates: true,
});

let server: TestServer;
let world: TestWorld;
let analyst: TestBrowser;
let listening: Awaited<ReturnType<typeof listen>>;
/** What the steps saw, and what happens while the first one works. */
let seen: { preparedIn: boolean[]; handledIn: boolean[]; meanwhile: () => Promise<unknown> };

beforeAll(async () => {
  server = await startTestServer();
  const { core, site, rateLimits } = server.appDeps;
  const api = new Api({ core, site, rateLimits });
  api.serve(make, {
    prepare: async ({ core: { db } }) => {
      seen.preparedIn.push(db.isTransaction);
      await seen.meanwhile();
      return seen.preparedIn.length;
    },
    handle: ({ core: { db }, body: { name } }, prepared) => {
      seen.handledIn.push(db.isTransaction);
      return { name, prepared };
    },
  });
  const app = express().use(requestLog(core.logger)).use(api.router).use(answerProblem);
  listening = await listen(app, 0);
});
afterAll(async () => {
  await closeGracefully(listening.server, 1000);
  await server.close();
});
beforeEach(async () => {
  world = await makeWorld(server);
  analyst = await server.browserOf(world.people.analyst);
  seen = { preparedIn: [], handledIn: [], meanwhile: () => Promise.resolve() };
});

async function post(name: string, key?: string): Promise<{ status: number; body: unknown }> {
  const response = await fetch(`http://localhost:${listening.port}/workspaces/${world.workspaceId}/things`, {
    method: 'POST',
    headers: {
      'Content-Type': 'application/json',
      Origin: server.address,
      Cookie: [...analyst.cookies].map(([cookie, value]) => `${cookie}=${value}`).join('; '),
      'X-CSRF-Token': analyst.cookies.get('voltiplano_csrf') ?? '',
      ...(key !== undefined && { 'Idempotency-Key': key }),
    },
    body: JSON.stringify({ name }),
  });
  return { status: response.status, body: await response.json() };
}

describe('a call in two steps', () => {
  it('prepares outside the transaction that it is handled in, and hands over what it made', async () => {
    for (const key of [undefined, 'key-1']) {
      seen = { ...seen, preparedIn: [], handledIn: [] };
      expect(await post('A', key)).toEqual({ status: 201, body: { name: 'A', prepared: 1 } });
      expect(seen).toMatchObject({ preparedIn: [false], handledIn: [true] });
    }
  });

  it('lets others use the database while it prepares', async () => {
    seen.meanwhile = () => server.core.db.transaction().execute((db) => db.selectFrom('people').select('id').execute());
    expect((await post('A')).status).toBe(201);
  });

  it('is neither prepared nor handled again under its key, once it was answered', async () => {
    const first = await post('A', 'key-2');
    expect(await post('A', 'key-2')).toEqual(first);
    expect(seen).toMatchObject({ preparedIn: [false], handledIn: [true] });
    expect(await post('B', 'key-2')).toMatchObject({ status: 422, body: { code: 'IDEMPOTENCY_MISMATCH' } });
    expect(seen.preparedIn).toHaveLength(1);
  });

  it('is handled once where it is asked for twice at once under one key', async () => {
    const answers = await Promise.all([post('A', 'key-3'), post('A', 'key-3')]);
    expect(answers[1]).toEqual(answers[0]);
    expect(seen.handledIn).toHaveLength(1);
  });

  it.each([
    ['lost their role', 403, "UPDATE members SET role = 'viewer'"],
    ['was taken out', 404, 'DELETE FROM members'],
  ])('is refused to somebody who %s while it was prepared', async (_what, status, change) => {
    const { workspaceId, people } = world;
    const meanwhile = sql`${sql.raw(change)} WHERE workspaceId = ${workspaceId} AND personId = ${people.analyst}`;
    seen.meanwhile = () => meanwhile.execute(server.core.db);
    expect((await post('A')).status).toBe(status);
    expect(seen.handledIn).toEqual([]);
  });
});
