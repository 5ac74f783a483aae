import express from 'express';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { defineEndpoint } from '../contract/endpoint.ts';
import { closeGracefully } from '../close-gracefully.ts';
import { listen } from '../listen.ts';
import { problemsOf } from '../openapi/document.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { Api } from './api.ts';
import { etagOf, requireMatch } from './if-match.ts';
import { answerProblem } from './problem.ts';
import { requestLog } from './request-log.ts';

const change = defineEndpoint({
  id: 'changeThing',
  method: 'put',
  path: '/thing',
  tag: 'Test',
  summary: 'Change the thing, of which revision 3 is there',
  access: 'anyone',
  body: z.object({}),
  status: 200,
  answer: z.object({ ifMatch: z.string() }),
  problems: [],
  ifMatch: true,
});

let world: TestServer;
let listening: Awaited<ReturnType<typeof listen>>;
beforeAll(async () => {
  world = await startTestServer();
  const { core, site, rateLimits } = world.appDeps;
  const api = new Api({ core, site, rateLimits });
  api.serve(change, ({ ifMatch, res }) => {
    requireMatch(ifMatch, etagOf('r', 3));
    res.set('ETag', etagOf('r', 4));
    return { ifMatch };
  });
  const app = express().use(requestLog(core.logger)).use(api.router).use(answerProblem);
  listening = await listen(app, 0);
});
afterAll(async () => {
  await closeGracefully(listening.server, 1000);
  await world.close();
});

async function put(ifMatch?: string) {
  const response = await fetch(`http://localhost:${listening.port}/thing`, {
    method: 'PUT',
    headers: { Origin: world.address, ...(ifMatch === undefined ? {} : { 'If-Match': ifMatch }) },
  });
  const body = (await response.json()) as { code?: string; ifMatch?: string; errors?: { path: string }[] };
  return { status: response.status, etag: response.headers.get('etag'), body };
}

describe('an endpoint with ifMatch', () => {
  it('hands the entity tag on and answers the new one', async () => {
    expect(await put('"r3"')).toEqual({ status: 200, etag: '"r4"', body: { ifMatch: '"r3"' } });
    expect((await put('  "r3" ')).status).toBe(200);
  });

  it.each([undefined, ''])('without the header asks for it: %j', async (header) => {
    expect(await put(header)).toMatchObject({ status: 428, body: { code: 'IF_MATCH_MISSING' } });
  });

  it.each(['"r2"', '"w3"', '""', 'W/"r3"'])('refuses a change made from another version: %s', async (header) => {
    expect(await put(header)).toMatchObject({ status: 412, body: { code: 'EDIT_CONFLICT' } });
  });

  it.each(['*', 'r3', '3', '"r3', '"r2", "r3"', "'r3'", 'w/"r3"'])('takes one entity tag only: %s', async (header) => {
    const { status, body } = await put(header);
    expect(status).toBe(422);
    expect(body).toMatchObject({ code: 'INVALID_INPUT', errors: [{ path: 'header.If-Match' }] });
  });

  it('has the problems of the header in the OpenAPI document', () => {
    const { ifMatch: _none, ...free } = change;
    expect(problemsOf(change)).toEqual(expect.arrayContaining(['IF_MATCH_MISSING', 'EDIT_CONFLICT', 'INVALID_INPUT']));
    for (const code of ['IF_MATCH_MISSING', 'EDIT_CONFLICT']) expect(problemsOf(free)).not.toContain(code);
  });
});
