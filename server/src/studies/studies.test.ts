import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { parseSessionStudy, simulateSession } from '@voltiplano/engine';
import { studyEndpoints as studies } from '../contract/study.ts';
import { workspaceEndpoints } from '../contract/workspace.ts';
import { engineVersion } from '../runs/headline-runs.ts';
import { exampleStudy } from '../testing/example-study.ts';
import type { TestAnswer, TestBrowser } from '../testing/test-browser.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { makeWorld, type TestWorld } from '../testing/test-world.ts';

let server: TestServer;
let world: TestWorld;
let analyst: TestBrowser;
let params: { workspaceId: string };
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());
beforeEach(async () => {
  world = await makeWorld(server);
  analyst = await server.browserOf(world.people.analyst);
  params = { workspaceId: world.workspaceId };
});

const warm = exampleStudy('vicuna-warm-arrival');
const titled = (title: string) => ({ ...warm, title });

/** The studies of a fresh world begin at number 2: number 1 is the world's own. */
async function create(inputs: object = warm) {
  const { status, body, headers } = await analyst.call(studies.createStudy, {
    params,
    body: { inputs: inputs as never },
  });
  expect(status).toBe(201);
  return { body, ofStudy: { ...params, studyId: body.id as string }, etag: headers.get('etag') };
}

const write = (ofStudy: { workspaceId: string; studyId: string }, etag: string, body: object, by = analyst) =>
  by.call(studies.writeWorkingCopy, { params: ofStudy, body: body as never, headers: { 'If-Match': etag } });
const save = (ofStudy: { workspaceId: string; studyId: string }, etag: string, message = 'Warmer', by = analyst) =>
  by.call(studies.saveRevision, { params: ofStudy, body: { message }, headers: { 'If-Match': etag } });
async function read(ofStudy: { workspaceId: string; studyId: string }): Promise<TestAnswer['body']> {
  const { body }: TestAnswer = await analyst.call(studies.readStudy, { params: ofStudy });
  return body as unknown;
}

/** Newest deed of the workspace. */
async function newestDeed(): Promise<unknown> {
  const { body } = await analyst.call(workspaceEndpoints.listActivity, { params, query: { limit: '1' } });
  return (body.items as unknown[])[0];
}

describe('createStudy', () => {
  it('makes a draft of the caller’s own with a first revision, and keeps the inputs as they were sent', async () => {
    const { body, ofStudy, etag } = await create();
    expect(etag).toBe('"w1"');
    expect(body).toMatchObject({
      number: 2,
      kind: 'session',
      title: warm.title,
      state: 'draft',
      owner: { id: world.people.analyst, name: 'analyst' },
      revision: 1,
      isChanged: false,
      archivedAt: null,
      working: { version: 1, pending: {}, parts: [], isChanged: false },
    });
    expect(body.working.inputs).toEqual(warm);
    expect(await read(ofStudy)).toEqual(body);
    expect(await newestDeed()).toMatchObject({
      action: 'study.created',
      subjectId: body.id,
      detail: { number: '2', title: warm.title },
    });
  });

  it('stores the engine’s own numbers with the engine’s version', async () => {
    const { body } = await create();
    const { metrics, energyLedger } = simulateSession(parseSessionStudy(warm)).result;
    expect(body.headline).toMatchObject({ engineVersion, failure: null });
    expect(body.headline.numbers).toEqual({
      endMin: metrics.endMin,
      endSoc: metrics.endSoc,
      minutes0To50: metrics.minutes0To50,
      minutes10To80: metrics.minutes10To80,
      minutes0To100: metrics.minutes0To100,
      peakStationPowerKw: metrics.peakStationPowerKw,
      meanStationPower10To80Kw: metrics.meanStationPower10To80Kw,
      kmIn10Min: metrics.kmAfterMin['10'],
      kmIn20Min: metrics.kmAfterMin['20'],
      hottestCoreC: metrics.hottestCoreC,
      lowestAnodeMv: metrics.lowestAnodeMv,
      stationKwh: energyLedger.stationKwh,
      storedKwh: energyLedger.storedKwh,
    });
  });
});

describe('writeWorkingCopy', () => {
  it('counts a change up and answers the new ETag; the newest revision stays', async () => {
    const { ofStudy } = await create();
    const { status, body, headers } = await write(ofStudy, '"w1"', {
      inputs: titled('Other'),
      pending: { 'pack.series': 'x' },
    });
    expect(status).toBe(200);
    expect(headers.get('etag')).toBe('"w2"');
    expect(body).toMatchObject({
      version: 2,
      inputs: { title: 'Other' },
      pending: { 'pack.series': 'x' },
      isChanged: true,
    });
    expect(await read(ofStudy)).toMatchObject({ title: 'Other', revision: 1, isChanged: true, working: body });
  });
});

describe('saveRevision', () => {
  it('makes the working copy a revision with its message, author and headline', async () => {
    const { ofStudy } = await create();
    await write(ofStudy, '"w1"', { inputs: { ...titled('Hotter'), session: { ...warm.session, startTempC: 40 } } });
    const { status, body, headers } = await save(ofStudy, '"w2"');
    expect(status).toBe(201);
    expect(headers.get('etag')).toBe('"w2"');
    expect(body).toMatchObject({
      title: 'Hotter',
      revision: 2,
      isChanged: false,
      working: { version: 2, isChanged: false },
    });
    expect(body.headline.numbers.hottestCoreC).toBeGreaterThan(40);
    expect(await newestDeed()).toMatchObject({
      action: 'study.revised',
      detail: { number: '2', title: 'Hotter', revision: '2', message: 'Warmer' },
    });
  });
});
