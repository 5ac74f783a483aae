import { parseSessionStudy, simulateSession } from '@voltiplano/engine';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { engineVersion } from '../runs/headline-runs.ts';
import { exampleStudy, exampleTrip } from '../testing/example-study.ts';
import { StudyCalls } from '../testing/study-calls.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { makeWorld, type TestWorld } from '../testing/test-world.ts';

let server: TestServer;
let world: TestWorld;
let analyst: StudyCalls;
let engineer: StudyCalls;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());
beforeEach(async () => {
  world = await makeWorld(server);
  analyst = new StudyCalls(await server.browserOf(world.people.analyst), world.workspaceId);
  engineer = new StudyCalls(await server.browserOf(world.people.engineer), world.workspaceId);
});

const warm = exampleStudy('vicuna-warm-arrival');
const titled = (title: string) => ({ ...warm, title });
const hotter = { ...titled('Hotter'), session: { ...warm.session, startTempC: 40 } };

// Studies of a fresh world go on at number 2: number 1 is the world's own.
describe('createStudy', () => {
  it('makes a draft of the caller’s own with a first revision, and keeps the inputs as they were sent', async () => {
    const { body, headers } = await analyst.create({ inputs: warm, message: 'First guess' });
    expect(headers.get('etag')).toBe('"w1"');
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
    expect(JSON.stringify(body.working.inputs)).toBe(JSON.stringify(warm));
    const read = await analyst.read(body.id as string);
    expect(read.body).toEqual(body);
    expect(read.headers.get('etag')).toBe('"w1"');
    expect((await analyst.revision(body.id as string, 1)).body).toMatchObject({ message: 'First guess', inputs: warm });
    expect((await analyst.deeds())[0]).toMatchObject({
      action: 'study.created',
      subjectId: body.id,
      detail: { number: '2', title: warm.title },
    });
  });

  it('stores the engine’s own numbers with the engine’s version', async () => {
    const { body } = await analyst.create();
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

  it('takes a study that cannot be run, and says why in its headline', async () => {
    const { status, body } = await analyst.create({
      inputs: { ...warm, station: { ...warm.station, voltageMaxV: 201 } },
    });
    expect(status).toBe(201);
    expect(body.headline).toMatchObject({ numbers: null, section: null, failure: /cannot start/i });
  });

  it('names each field that is wrong with the engine’s sentence', async () => {
    const wrong = {
      ...warm,
      pack: { ...warm.pack, series: -1, colour: 'red' },
      session: { ...warm.session, startSoc: -1 },
    };
    const { status, body } = await analyst.create({ inputs: wrong });
    expect({ status, code: body.code }).toEqual({ status: 422, code: 'INVALID_INPUT' });
    const messages = Object.fromEntries(
      (body.errors as { path: string; message: string }[]).map(({ path, message }) => [path, message]),
    );
    expect(messages).toEqual({
      'body.inputs.pack.series': 'pack.series must be at least 1, but is -1',
      'body.inputs.pack.colour': 'pack.colour is not a field of a study',
      'body.inputs.session.startSoc': 'session.startSoc must be at least 0, but is -1',
    });
  });

  it.each([
    ['body.inputs', { inputs: 7 }],
    ['body.inputs', {}],
    ['body.inputs.format', { inputs: {} }],
    ['body.inputs.kind', { inputs: { ...warm, kind: 'sweep' } }],
    ['body.message', { inputs: warm, message: ' ' }],
    ['body', { inputs: { ...warm, title: Array.from({ length: 100 }).reduce((inner) => [inner], 1) } }],
  ])('refuses what is no study: %s', async (path, body) => {
    const answer = await analyst.create(body as never);
    expect(answer.body).toMatchObject({ status: 422, code: 'INVALID_INPUT' });
    expect((answer.body.errors as { path: string }[]).map((error) => error.path)).toContain(path);
  });

  it('refuses a body above 1 MB', async () => {
    const { body } = await analyst.create({ inputs: { ...warm, title: 'x'.repeat(1_100_000) } });
    expect(body).toMatchObject({ status: 413, code: 'BODY_TOO_LARGE' });
  });

  it('makes one study of a call that is repeated under its Idempotency-Key, also at once', async () => {
    const headers = { 'Idempotency-Key': 'once' };
    const answers = await Promise.all([1, 2, 3].map(() => analyst.create({ inputs: warm }, headers)));
    expect(new Set(answers.map(({ body }) => body.id as string)).size).toBe(1);
    expect(answers.map((answer) => answer.headers.get('etag'))).toEqual(['"w1"', '"w1"', '"w1"']);
    expect((await analyst.list()).body.total).toBe(2);
  });

  it('numbers the studies of a workspace without a gap or a duplicate, also where many are made at once', async () => {
    const answers = await Promise.all(Array.from({ length: 8 }, (_none, i) => [analyst, engineer][i % 2]!.create()));
    const numbers = answers.map(({ body }) => body.number as number).sort((a, b) => a - b);
    expect(numbers).toEqual([2, 3, 4, 5, 6, 7, 8, 9]);
  });
});

describe('writeWorkingCopy', () => {
  it('counts a change up and answers the new ETag; the newest revision stays, and no deed is told', async () => {
    const id = await analyst.begin();
    const before = (await analyst.deeds()).length;
    server.clock.now += 60_000;
    const pending = { 'pack.series': 'x' };
    const { status, body, headers } = await engineer.write(id, 1, { inputs: titled('Other'), pending });
    expect(status).toBe(200);
    expect(headers.get('etag')).toBe('"w2"');
    const changedAt = new Date(server.clock.now).toISOString();
    expect(body).toMatchObject({ version: 2, inputs: { title: 'Other' }, pending, isChanged: true, changedAt });
    expect(body.changedBy).toEqual({ id: world.people.engineer, name: 'engineer' });
    const read = (await analyst.read(id)).body;
    expect(read).toMatchObject({ title: 'Other', revision: 1, isChanged: true, changedAt, working: body });
    expect((await analyst.revision(id, 1)).body).toMatchObject({ title: warm.title });
    expect(await analyst.deeds()).toHaveLength(before);
  });

  it('refuses to write over another version, and leaves that one whole', async () => {
    const id = await analyst.begin();
    await analyst.write(id, 1, { inputs: titled('Mine') });
    for (const version of [1, 3]) {
      const { body } = await engineer.write(id, version, { inputs: titled('Theirs') });
      expect(body).toMatchObject({ status: 412, code: 'EDIT_CONFLICT' });
    }
    expect((await analyst.read(id)).body).toMatchObject({ title: 'Mine', working: { version: 2 } });
  });

  it('takes the same content once more without counting up, also from the version before', async () => {
    const id = await analyst.begin();
    const content = { inputs: titled('Mine'), pending: { 'cell.name': 7, 'pack.name': 8 } };
    const first = await analyst.write(id, 1, content);
    server.clock.now += 60_000;
    const turned = { ...Object.fromEntries(Object.entries(content.inputs).reverse()) };
    for (const version of [1, 2]) {
      const again = await engineer.write(id, version, { ...content, inputs: turned });
      expect(again.body).toEqual(first.body);
      expect(again.headers.get('etag')).toBe('"w2"');
    }
    expect((await analyst.write(id, 1, { inputs: content.inputs })).status).toBe(412);
  });

  it('turns changed back to unchanged where the content is that of the revision again', async () => {
    const id = await analyst.begin();
    expect((await analyst.write(id, 1, { inputs: titled('Mine') })).body.isChanged).toBe(true);
    expect((await analyst.write(id, 2, { inputs: warm })).body).toMatchObject({ version: 3, isChanged: false });
    expect((await analyst.write(id, 3, { inputs: warm, pending: { a: 1 } })).body.isChanged).toBe(true);
  });

  it('keeps the kind of the study, and takes nothing that the engine does not', async () => {
    const id = await analyst.begin();
    const trip = await analyst.write(id, 1, { inputs: exampleTrip() });
    expect(trip.body).toMatchObject({ status: 422, errors: [{ path: 'body.inputs.kind' }] });
    expect(trip.body.detail).toContain('must be "session", but is "trip"');
    const wrong = await analyst.write(id, 1, { inputs: { ...warm, cell: { ...warm.cell, capacityAh: 'much' } } });
    expect(wrong.body).toMatchObject({ status: 422, errors: [{ path: 'body.inputs.cell.capacityAh' }] });
    expect((await analyst.read(id)).body.working.version).toBe(1);
  });

  it('lets exactly one of several writers of one version win, whoever comes first', async () => {
    const id = await analyst.begin();
    const writers = Array.from({ length: 6 }, (_none, i) => ({
      calls: [analyst, engineer][i % 2]!,
      name: `Writer ${i}`,
    }));
    const acknowledged: string[] = [];
    for (let version = 1; version <= 8; version += 1) {
      const answers = await Promise.all(
        writers.map(({ calls, name }) => calls.write(id, version, { inputs: titled(`${name} at ${version}`) })),
      );
      const won = answers.filter(({ status }) => status === 200);
      expect(won).toHaveLength(1);
      expect(answers.filter(({ status }) => status === 412)).toHaveLength(writers.length - 1);
      acknowledged.push(won[0]!.body.inputs.title as string);
      expect((await analyst.read(id)).body.title).toBe(acknowledged.at(-1));
    }
    expect(acknowledged).toHaveLength(8);
  });
});

describe('a study of another workspace', () => {
  it('is not there, whatever is asked', async () => {
    const id = await analyst.begin();
    const browser = await server.browserOf(world.people.outsider);
    const outsider = new StudyCalls(browser, world.outsiderWorkspaceId);
    for (const answer of [
      await outsider.read(id),
      await outsider.write(id, 1, { inputs: hotter }),
      await outsider.save(id, 1),
      await outsider.copy(id),
      await outsider.archive(id),
      await outsider.unarchive(id),
      await outsider.revisions(id),
      await outsider.revision(id, 1),
    ]) {
      expect(answer.body).toMatchObject({ status: 404, code: 'NOT_FOUND' });
    }
    expect((await outsider.list()).body).toMatchObject({ items: [], total: 0, archivedTotal: 0 });
    expect((await outsider.create()).body.number).toBe(1);
  });
});
