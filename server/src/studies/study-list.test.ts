import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { SessionStudyInput, TripStudyInput } from '@voltiplano/engine';
import { accountEndpoints } from '../contract/account.ts';
import type { StudyRow } from '../contract/study.ts';
import { exampleStudy, exampleTrip } from '../testing/example-study.ts';
import { StudyCalls } from '../testing/study-calls.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { makeWorld, type TestWorld } from '../testing/test-world.ts';

const warm = exampleStudy('vicuna-warm-arrival');
const sorts = ['changed', 'number', 'title', 'minutes10To80', 'hottestCoreC', 'owner'] as const;

let server: TestServer;
let world: TestWorld;
let analyst: StudyCalls;
let engineer: StudyCalls;
beforeAll(async () => {
  server = await startTestServer();
  world = await makeWorld(server);
  analyst = new StudyCalls(await server.browserOf(world.people.analyst), world.workspaceId);
  engineer = new StudyCalls(await server.browserOf(world.people.engineer), world.workspaceId);
  await fill();
});
afterAll(() => server.close());

/** Studies 2 to 9; study 1 is the world's own, of the analyst, without numbers. */
async function fill(): Promise<void> {
  const begin = async (by: StudyCalls, inputs: object, message = 'Created') => {
    server.clock.now += 1000;
    const { body } = await by.create({ inputs, message });
    return body.id as string;
  };
  const shorter = (title: string, startTempC: number): SessionStudyInput => ({
    ...warm,
    title,
    session: { ...warm.session, startSoc: 0.1, startTempC },
  });
  await begin(analyst, shorter('Éventail at dawn', 20));
  await begin(engineer, shorter('eventail at dusk', 30));
  await begin(engineer, { ...exampleStudy('suri-full-power'), title: 'Zenith' });
  await begin(analyst, overThePass(), 'Over the pass');
  await begin(analyst, { ...warm, title: '' });
  const archived = await begin(engineer, shorter('Old taper', 25));
  await engineer.archive(archived);
  const waiting = await begin(engineer, shorter('Waits', 25));
  await server.core.db.updateTable('studies').set({ state: 'in-review' }).where('id', '=', waiting).execute();
  // Two of one moment: their order must hold all the same.
  const second = await begin(analyst, shorter('Tola 500-V', 25));
  const { changedAt } = await server.core.db
    .selectFrom('studies')
    .select('changedAt')
    .where('id', '=', second)
    .executeTakeFirstOrThrow();
  await server.core.db.updateTable('studies').set({ changedAt }).where('id', '=', waiting).execute();
}

function overThePass(): TripStudyInput {
  const study = exampleTrip();
  const [leg] = study.trip.legs;
  const station = { ...warm.station, name: 'Salar Paso' };
  return { ...study, trip: { ...study.trip, legs: [{ ...leg!, station }] } };
}

async function numbersOf(query: Record<string, string>): Promise<number[]> {
  const { body } = await analyst.list(query);
  return (body.items as StudyRow[]).map(({ number }) => number);
}

/** Every page of a list, one behind the other. */
async function pagesOf(query: Record<string, string>, limit: number): Promise<number[]> {
  const found: number[] = [];
  let cursor: string | null = null;
  do {
    const { status, body } = await analyst.list({ ...query, limit: String(limit), ...(cursor !== null && { cursor }) });
    expect(status).toBe(200);
    found.push(...(body.items as StudyRow[]).map(({ number }) => number));
    cursor = body.nextCursor as string | null;
  } while (cursor !== null);
  return found;
}

describe('listStudies', () => {
  it('shows those outside the archive, the last changed first, with the headline of the newest revision', async () => {
    const { body } = await analyst.list();
    expect(body).toMatchObject({ total: 8, archivedTotal: 1, inReviewTotal: 1, nextCursor: null });
    const rows = body.items as StudyRow[];
    expect(rows.map(({ number }) => number)).toEqual([9, 8, 6, 5, 4, 3, 2, 1]);
    const row = rows.find(({ number }) => number === 4)!;
    expect(row).toMatchObject({ title: 'Zenith', owner: { name: 'engineer' }, kind: 'session', isChanged: false });
    expect(row.packName).toBe(exampleStudy('suri-full-power').pack.name);
    expect(row.headline.numbers?.minutes10To80).toBeGreaterThan(5);
    expect(row.headline.section?.points.length).toBeGreaterThan(10);
    expect(rows.find(({ kind }) => kind === 'trip')).toMatchObject({ stationName: null, headline: { section: null } });
  });

  it('filters by kind, state, owner, part of the library and archive, together too', async () => {
    expect(await numbersOf({ kind: 'trip' })).toEqual([5]);
    expect(await numbersOf({ kind: 'sweep' })).toEqual([]);
    expect(await numbersOf({ state: 'in-review' })).toEqual([8]);
    expect(await numbersOf({ archived: 'yes' })).toEqual([7]);
    expect(await numbersOf({ ownerId: world.people.engineer })).toEqual([8, 4, 3]);
    expect(await numbersOf({ ownerId: world.people.engineer, archived: 'yes' })).toEqual([7]);
    expect(await numbersOf({ itemId: world.libraryItemId })).toEqual([1]);
    expect(await numbersOf({ itemId: world.libraryItemId, kind: 'trip' })).toEqual([]);
    expect((await analyst.list({ ownerId: world.people.engineer })).body).toMatchObject({ total: 3, archivedTotal: 1 });
  });

  it.each([
    ['number', 'asc', [1, 2, 3, 4, 5, 6, 8, 9]],
    // Without accents and capitals; no title comes first.
    ['title', 'asc', [6, 2, 3, 9, 1, 5, 8, 4]],
    ['changed', 'asc', [1, 2, 3, 4, 5, 6, 8, 9]],
    ['owner', 'asc', [1, 2, 5, 6, 9, 3, 4, 8]],
    ['owner', 'desc', [8, 4, 3, 9, 6, 5, 2, 1]],
  ])('sorts by %s, %s', async (sort, order, wanted) => {
    const titles = (await analyst.list({ sort, order })).body.items as StudyRow[];
    expect(
      titles.map(({ number }) => number),
      titles.map(({ title }) => title).join(' | '),
    ).toEqual(wanted);
  });

  it.each(['minutes10To80', 'hottestCoreC'] as const)('sorts by %s, those without the number last', async (sort) => {
    for (const order of ['asc', 'desc']) {
      const { body } = await analyst.list({ sort, order });
      const values = (body.items as StudyRow[]).map(({ headline }) => headline.numbers?.[sort] ?? null);
      const known = values.filter((value) => value !== null);
      expect(known.length).toBeGreaterThan(4);
      expect(values.length).toBeGreaterThan(known.length);
      const sorted = [...known].sort((a, b) => (order === 'asc' ? a - b : b - a));
      expect(values).toEqual([...sorted, ...Array<null>(values.length - known.length).fill(null)]);
    }
  });

  it('gives in pages of whatever size what it gives at once', async () => {
    const filters = fc.constantFrom<Record<string, string>>(
      {},
      { q: 'vicuna' },
      { kind: 'session' },
      { archived: 'yes' },
    );
    await fc.assert(
      fc.asyncProperty(
        fc.constantFrom(...sorts),
        fc.constantFrom('asc', 'desc'),
        filters,
        fc.integer({ min: 1, max: 9 }),
        async (sort, order, filter, limit) => {
          const query = { ...filter, sort, order };
          expect(await pagesOf(query, limit)).toEqual(await numbersOf({ ...query, limit: '200' }));
        },
      ),
      { numRuns: 60 },
    );
  });

  it('goes on behind the last row where rows have moved since', async () => {
    const query = { sort: 'number', order: 'asc', limit: '3' };
    const { body } = await analyst.list(query);
    const archived = (body.items as StudyRow[])[2]!;
    await analyst.archive(archived.id);
    expect(await numbersOf({ ...query, cursor: body.nextCursor as string })).toEqual([4, 5, 6]);
    await analyst.unarchive(archived.id);
  });

  it('refuses a cursor of another order, another list, or none', async () => {
    const cursorOf = async (query: Record<string, string>) =>
      (await analyst.list({ ...query, limit: '1' })).body.nextCursor as string;
    const cursors = [
      await cursorOf({ sort: 'number', order: 'asc' }),
      await cursorOf({ sort: 'title', order: 'desc' }),
      'nonsense',
      Buffer.from('["studies by number","desc",{},1]').toString('base64url'),
    ];
    for (const cursor of cursors) {
      const { body } = await analyst.list({ sort: 'number', order: 'desc', cursor });
      expect(body).toMatchObject({ status: 422, code: 'INVALID_INPUT', errors: [{ path: 'query.cursor' }] });
    }
  });
});

describe('the search', () => {
  it.each([
    ['zenith', [4]],
    ['ÉVENTAIL', [3, 2]],
    ['event du', [3]],
    ['dusk eventail', [3]],
    // Names of pack, cell, station and strategy; of the leg's station of a trip too.
    ['Suri', [4]],
    ['ledges', [9, 8, 6, 5, 3, 2, 1]],
    ['paso', [5]],
    ['pouch 72', [9, 8, 6, 5, 3, 2, 1]],
    // A message, and people.
    ['over pass', [5]],
    ['engineer', [8, 4, 3]],
    ['engineer zen', [4]],
    ['500-V', [9]],
    ['nowhere', []],
    ['!!!', []],
    ['  ', [9, 8, 6, 5, 4, 3, 2, 1]],
    // Neither syntax nor the word by which the workspace is kept apart.
    ['zenith OR dusk', []],
    ['zen*', [4]],
    ['title:zenith', []],
    ['"zenith', [4]],
  ])('finds by beginnings of words: %j', async (q, wanted) => {
    expect(await numbersOf({ q })).toEqual(wanted);
    expect((await analyst.list({ q })).body.total).toBe(wanted.length);
  });

  it('does not find a study by its workspace, and keeps to the workspace', async () => {
    expect(await numbersOf({ q: world.workspaceId })).toEqual([]);
    const browser = await server.browserOf(world.people.outsider);
    expect((await new StudyCalls(browser, world.outsiderWorkspaceId).list({ q: 'zenith' })).body.total).toBe(0);
  });

  it('answers whatever is typed', async () => {
    const typed = fc.oneof(
      fc.string({ unit: 'binary', maxLength: 200 }),
      fc.string({ unit: fc.constantFrom('"', "'", '*', '(', ')', ':', '^', '-', '+', '{', '}', ' ', '\0', 'a', 'OR') }),
    );
    await fc.assert(
      fc.asyncProperty(typed, async (q) => {
        const { status } = await analyst.list({ q });
        expect([200, 422]).toContain(status);
        expect(status === 422).toBe(q.length > 200);
      }),
      { numRuns: 300 },
    );
  });

  it('follows a title and names as they are typed, a revision, and a person’s new name', async () => {
    const { body } = await engineer.create({ inputs: { ...warm, title: 'Quebrada' }, message: 'Begun' });
    const id = body.id as string;
    const own = [body.number as number];
    expect(await numbersOf({ q: 'quebrada' })).toEqual(own);
    const inputs = { ...warm, title: 'Laguna', strategy: { ...warm.strategy, name: 'Gentle slope' } };
    await engineer.write(id, 1, { inputs });
    expect(await numbersOf({ q: 'quebrada' })).toEqual([]);
    expect(await numbersOf({ q: 'laguna gentle' })).toEqual(own);
    await analyst.save(id, 2, 'Softened for winter');
    expect(await numbersOf({ q: 'laguna begun soft winter' })).toEqual(own);
    expect(await numbersOf({ q: 'laguna analyst' })).toEqual(own);
    await analyst.browser.call(accountEndpoints.renameMe, { body: { name: 'Inés Quispe' } });
    expect(await numbersOf({ q: 'laguna analyst' })).toEqual([]);
    expect(await numbersOf({ q: 'laguna ines' })).toEqual(own);
    expect(await numbersOf({ q: 'zenith ines' })).toEqual([]);
    await server.core.db.deleteFrom('people').where('id', '=', world.people.analyst).execute();
    const { body: left } = await engineer.list({ q: 'laguna ines' });
    expect(left.items).toEqual([]);
    expect((await engineer.list({ q: 'laguna engineer' })).body.total).toBe(1);
  });
});
