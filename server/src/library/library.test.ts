import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { libraryEndpoints as library, libraryKinds, type LibraryKind } from '../contract/library.ts';
import { workspaceEndpoints } from '../contract/workspace.ts';
import { examplePart } from '../testing/example-parts.ts';
import type { TestBrowser } from '../testing/test-browser.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { makeWorld, type TestWorld } from '../testing/test-world.ts';

let server: TestServer;
let world: TestWorld;
let engineer: TestBrowser;
let params: { workspaceId: string };
beforeAll(async () => {
  server = await startTestServer();
});
beforeEach(async () => {
  world = await makeWorld(server);
  engineer = await server.browserOf(world.people.engineer);
  params = { workspaceId: world.workspaceId };
});
afterAll(() => server.close());

const said = (kind: LibraryKind, name = `A ${kind}`) => ({ name, notes: '', source: '', body: examplePart(kind) });
const nowhere = '0'.repeat(26);

async function add(kind: LibraryKind, name?: string): Promise<{ workspaceId: string; itemId: string }> {
  const answer = await engineer.call(library.createLibraryItem, { params, body: { kind, ...said(kind, name) } });
  expect(answer.status).toBe(201);
  return { ...params, itemId: answer.body.id as string };
}

function revise(item: { workspaceId: string; itemId: string }, ifMatch: string, body: object) {
  const headers = { 'If-Match': ifMatch };
  const whole = { ...said('cell', 'Vicuña cell'), ...body };
  return engineer.call(library.reviseLibraryItem, { params: item, body: whole, headers });
}

async function deedsOf(subjectId: string) {
  const query = { subjectId };
  const { body } = await engineer.call(workspaceEndpoints.listActivity, { params, query });
  return (body.items as { action: string; detail: object; personName: string }[]).reverse();
}

describe('createLibraryItem', () => {
  it.each(libraryKinds)('adds a part of each kind as it was sent, with its first revision: %s', async (kind) => {
    const answer = await engineer.call(library.createLibraryItem, {
      params,
      body: { kind, ...said(kind, '  Vicuña, 400 V '), source: 'Bench' },
    });
    expect(answer.status).toBe(201);
    expect(answer.headers.get('etag')).toBe('"r1"');
    const sent = examplePart(kind);
    const body = 'name' in sent ? { ...sent, name: 'Vicuña, 400 V' } : sent;
    expect(answer.body).toMatchObject({ kind, name: 'Vicuña, 400 V', notes: '', source: 'Bench', revision: 1 });
    expect(answer.body).toMatchObject({ archivedAt: null, studyCount: 0, changedBy: { name: 'engineer' } });
    expect(answer.body.body).toEqual(body);
    const read = await engineer.call(library.readLibraryItem, { params: { ...params, itemId: answer.body.id } });
    expect(read.body).toEqual(answer.body);
    expect(read.headers.get('etag')).toBe('"r1"');
    expect(await deedsOf(answer.body.id as string)).toMatchObject([
      { action: 'library.added', detail: { kind, name: 'Vicuña, 400 V', revision: '1', message: 'Added' } },
    ]);
  });

  it('gives the body a name where its kind has one and it came without', async () => {
    const { name: _none, ...body } = examplePart('station');
    const sent = { kind: 'station', ...said('station', 'Salar 3'), body } as const;
    const answer = await engineer.call(library.createLibraryItem, { params, body: sent });
    expect(answer.body.body).toEqual({ name: 'Salar 3', ...body });
  });

  it('names each wrong field of the body with rule and value, and keeps nothing', async () => {
    const body = { ...examplePart('cell'), capacityAh: -5, rcPairs: [{ rMilliohm: 1, tauS: 'long' }], sideways: 1 };
    const sent = { kind: 'cell', ...said('cell'), body } as const;
    const answer = await engineer.call(library.createLibraryItem, { params, body: sent });
    expect(answer.body).toMatchObject({ status: 422, code: 'INVALID_INPUT' });
    expect(answer.body.errors).toEqual(
      expect.arrayContaining([
        { path: 'body.body.capacityAh', message: 'capacityAh must be above 0, but is -5' },
        { path: 'body.body.rcPairs.0.tauS', message: 'rcPairs[0].tauS must be a number, but is "long"' },
        { path: 'body.body.sideways', message: 'sideways is not a field of a cell' },
      ]),
    );
    const { body: list } = await engineer.call(library.listLibrary, { params });
    expect(list.total).toBe(1);
  });

  it('lists the first hundred of very many wrong fields', async () => {
    const body = { legs: Array.from({ length: 300 }, () => ({ km: 'far', kmPerH: 90 })) };
    const sent = { kind: 'route', ...said('route'), body } as const;
    const answer = await engineer.call(library.createLibraryItem, { params, body: sent });
    expect(answer.body.errors).toHaveLength(100);
    expect(answer.body.detail).toMatch(/^body\.body\.legs\.0\.km: .+ Of \d+ errors the first 100 are listed\.$/);
  });

  it.each([
    ['body.name', { name: '  ' }],
    ['body.name', { name: 'x'.repeat(201) }],
    ['body.notes', { notes: 'x'.repeat(4001) }],
    ['body.source', { source: 'x'.repeat(1001) }],
    ['body.message', { message: 'x'.repeat(301) }],
    ['body.kind', { kind: 'boost' }],
    ['body.body', { body: [] }],
    ['body.body', { body: null }],
  ])('refuses a wrong %s', async (path, wrong) => {
    const body = { kind: 'cell', ...said('cell'), ...wrong } as never;
    const answer = await engineer.call(library.createLibraryItem, { params, body });
    expect(answer.body).toMatchObject({ status: 422, errors: [{ path }] });
  });

  it('adds one part under one key, and gives the ETag again', async () => {
    const call = { params, body: { kind: 'cell', ...said('cell') }, headers: { 'Idempotency-Key': 'add' } } as const;
    const [first, second] = [
      await engineer.call(library.createLibraryItem, call),
      await engineer.call(library.createLibraryItem, call),
    ];
    expect(second.body).toEqual(first.body);
    expect(second.headers.get('etag')).toBe('"r1"');
    const { body: list } = await engineer.call(library.listLibrary, { params });
    expect(list.total).toBe(2);
  });
});

describe('reviseLibraryItem', () => {
  it('saves a revision, with who made it, when and why', async () => {
    const item = await add('cell', 'Vicuña cell');
    server.clock.now += 60_000;
    const answer = await revise(item, '"r1"', { name: 'Vicuña cell B', notes: 'Aged', message: 'After 300 cycles' });
    expect(answer.status).toBe(201);
    expect(answer.headers.get('etag')).toBe('"r2"');
    expect(answer.body).toMatchObject({ revision: 2, name: 'Vicuña cell B', body: { name: 'Vicuña cell B' } });
    expect(answer.body.changedAt).toBe(new Date(server.clock.now).toISOString());
    expect((await deedsOf(item.itemId)).at(-1)).toMatchObject({
      action: 'library.revised',
      detail: { kind: 'cell', name: 'Vicuña cell B', revision: '2', message: 'After 300 cycles' },
    });
    const rows = await engineer.call(library.listLibraryRevisions, { params: item });
    expect(rows.body.items).toMatchObject([
      { revision: 2, name: 'Vicuña cell B', message: 'After 300 cycles', by: { name: 'engineer' } },
      { revision: 1, name: 'Vicuña cell', message: 'Added' },
    ]);
    const first = await engineer.call(library.readLibraryRevision, { params: { ...item, revision: 1 } });
    expect(first.body).toMatchObject({ revision: 1, name: 'Vicuña cell', notes: '', body: { name: 'Vicuña cell' } });
  });

  it('lets one of two edits of the same revision win, and tells the other', async () => {
    const item = await add('cell', 'Vicuña cell');
    const answers = await Promise.all(['left', 'right'].map((notes) => revise(item, '"r1"', { notes })));
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 412]);
    const lost = answers.find(({ status }) => status === 412);
    expect(lost?.body).toMatchObject({ code: 'EDIT_CONFLICT', detail: expect.stringContaining('"r2"') as string });
    const won = answers.find(({ status }) => status === 201);
    const read = await engineer.call(library.readLibraryItem, { params: item });
    expect(read.body).toEqual(won?.body);
  });

  it('needs If-Match', async () => {
    const item = await add('cell');
    const answer = await engineer.call(library.reviseLibraryItem, { params: item, body: said('cell') });
    expect(answer.body).toMatchObject({ status: 428, code: 'IF_MATCH_MISSING' });
  });

  it('refuses to save what the newest revision says, in whatever order its fields stand', async () => {
    const item = await add('cell', 'Vicuña cell');
    const body = Object.fromEntries(Object.entries(examplePart('cell')).reverse());
    expect((await revise(item, '"r1"', { body })).body).toMatchObject({ status: 409, code: 'UNCHANGED' });
    expect((await revise(item, '"r1"', { source: 'Bench' })).status).toBe(201);
  });

  it('changes nothing in the archive', async () => {
    const item = await add('cell');
    await engineer.call(library.archiveLibraryItem, { params: item });
    expect((await revise(item, '"r1"', { notes: 'x' })).body).toMatchObject({ status: 409, code: 'ARCHIVED' });
  });

  it('judges the body by the kind of the part', async () => {
    const item = await add('cell');
    const answer = await revise(item, '"r1"', { body: examplePart('pack') });
    expect(answer.body).toMatchObject({ status: 422, code: 'INVALID_INPUT' });
    expect(answer.body.errors).toContainEqual({ path: 'body.body.capacityAh', message: 'capacityAh is missing' });
  });

  it('repeated under its key gives the same answer, and not under that key for another revision', async () => {
    const item = await add('cell', 'Vicuña cell');
    const body = { ...said('cell', 'Vicuña cell'), notes: 'once' };
    const call = (ifMatch: string) =>
      engineer.call(library.reviseLibraryItem, {
        params: item,
        body,
        headers: { 'If-Match': ifMatch, 'Idempotency-Key': 'once' },
      });
    const [first, second, other] = [await call('"r1"'), await call('"r1"'), await call('"r2"')];
    expect(first.status).toBe(201);
    expect(second.body).toEqual(first.body);
    expect(second.headers.get('etag')).toBe('"r2"');
    expect(other.body).toMatchObject({ status: 422, code: 'IDEMPOTENCY_MISMATCH' });
  });
});

describe('restoreLibraryRevision', () => {
  const restore = (item: object, revision: number, ifMatch: string) =>
    engineer.call(library.restoreLibraryRevision, {
      params: { ...item, revision } as never,
      headers: { 'If-Match': ifMatch },
    });

  it('saves a new revision that says what the older one said', async () => {
    const item = await add('cell', 'Vicuña cell');
    await revise(item, '"r1"', {
      name: 'Other',
      notes: 'Other',
      source: 'Other',
      body: { ...examplePart('cell'), massKg: 2 },
    });
    const answer = await restore(item, 1, '"r2"');
    expect(answer.status).toBe(201);
    expect(answer.headers.get('etag')).toBe('"r3"');
    const { name, notes, source, body } = said('cell', 'Vicuña cell');
    expect(answer.body).toMatchObject({ revision: 3, name, notes, source, body: { ...body, name } });
    const rows = await engineer.call(library.listLibraryRevisions, { params: item });
    expect(rows.body.items[0]).toMatchObject({ revision: 3, message: 'Restored revision 1' });
    expect((await deedsOf(item.itemId)).at(-1)).toMatchObject({
      action: 'library.restored',
      detail: { revision: '3', message: 'Restored revision 1' },
    });
  });

  it('answers each problem', async () => {
    const item = await add('cell', 'Vicuña cell');
    await revise(item, '"r1"', { notes: 'second' });
    expect((await restore(item, 1, '"r1"')).body).toMatchObject({ status: 412, code: 'EDIT_CONFLICT' });
    expect((await restore(item, 2, '"r2"')).body).toMatchObject({ status: 409, code: 'UNCHANGED' });
    expect((await restore(item, 3, '"r2"')).body).toMatchObject({ status: 404, code: 'NOT_FOUND' });
    await engineer.call(library.archiveLibraryItem, { params: item });
    expect((await restore(item, 1, '"r2"')).body).toMatchObject({ status: 409, code: 'ARCHIVED' });
    const missing = await engineer.call(library.restoreLibraryRevision, { params: { ...item, revision: 1 } });
    expect(missing.body).toMatchObject({ status: 428, code: 'IF_MATCH_MISSING' });
  });
});

describe('the archive', () => {
  it('takes a part and gives it back, each time it is asked, written down once', async () => {
    const item = await add('cell', 'Vicuña cell');
    const into = () => engineer.call(library.archiveLibraryItem, { params: item });
    const out = () => engineer.call(library.unarchiveLibraryItem, { params: item });
    const archived = await into();
    server.clock.now += 1000;
    expect(archived.body.archivedAt).not.toBeNull();
    expect((await into()).body).toEqual(archived.body);
    expect((await out()).body.archivedAt).toBeNull();
    expect((await out()).status).toBe(200);
    expect((await revise(item, '"r1"', { notes: 'again' })).status).toBe(201);
    const deeds = await deedsOf(item.itemId);
    expect(deeds.map(({ action }) => action)).toEqual([
      'library.added',
      'library.archived',
      'library.unarchived',
      'library.revised',
    ]);
    expect(deeds[1]?.detail).toEqual({ kind: 'cell', name: 'Vicuña cell', revision: '1' });
  });
});

describe('a part that is not there', () => {
  it('is not found by any call, nor is that of another workspace', async () => {
    const other = await makeWorld(server);
    const headers = { 'If-Match': '"r1"' };
    for (const itemId of [nowhere, other.libraryItemId]) {
      const at = { ...params, itemId };
      const answers = [
        await engineer.call(library.readLibraryItem, { params: at }),
        await engineer.call(library.reviseLibraryItem, { params: at, body: said('cell'), headers }),
        await engineer.call(library.restoreLibraryRevision, { params: { ...at, revision: 1 }, headers }),
        await engineer.call(library.archiveLibraryItem, { params: at }),
        await engineer.call(library.unarchiveLibraryItem, { params: at }),
        await engineer.call(library.listLibraryRevisions, { params: at }),
        await engineer.call(library.readLibraryRevision, { params: { ...at, revision: 1 } }),
        await engineer.call(library.listLibraryUse, { params: at }),
        await engineer.call(library.exportLibrary, { params, query: { itemId } }),
      ];
      for (const { body } of answers) expect(body).toMatchObject({ status: 404, code: 'NOT_FOUND' });
    }
  });

  it.each(['0', '-1', 'one', '1.5'])('nor is revision %s', async (revision) => {
    const at = { ...params, itemId: world.libraryItemId, revision } as never;
    expect((await engineer.call(library.readLibraryRevision, { params: at })).status).toBe(404);
  });
});

describe('listLibraryRevisions', () => {
  it('goes through all of them in pages, newest first', async () => {
    const item = await add('cell', 'Vicuña cell');
    for (let i = 1; i < 7; i += 1) await revise(item, `"r${i}"`, { notes: `note ${i}` });
    const seen: number[] = [];
    let query: Record<string, string> = { limit: '3' };
    for (;;) {
      const { body } = await engineer.call(library.listLibraryRevisions, { params: item, query });
      seen.push(...(body.items as { revision: number }[]).map(({ revision }) => revision));
      if (body.nextCursor === null) break;
      query = { limit: '3', cursor: body.nextCursor as string };
    }
    expect(seen).toEqual([7, 6, 5, 4, 3, 2, 1]);
  });

  it('refuses a cursor that it did not make', async () => {
    const at = { ...params, itemId: world.libraryItemId };
    const answer = await engineer.call(library.listLibraryRevisions, { params: at, query: { cursor: 'x' } });
    expect(answer.body).toMatchObject({ status: 422, errors: [{ path: 'query.cursor' }] });
  });
});

describe('readLibraryItem', () => {
  it('is never answered "not modified": what the ETag does not count may have changed', async () => {
    const at = { ...params, itemId: world.libraryItemId };
    const answer = await engineer.call(library.readLibraryItem, { params: at, headers: { 'If-None-Match': '"r2"' } });
    expect(answer.status).toBe(200);
  });

  it('keeps a part whose author is gone', async () => {
    const at = { ...params, itemId: world.libraryItemId };
    await server.core.db.deleteFrom('people').where('id', '=', world.people.bystander).execute();
    expect((await engineer.call(library.readLibraryItem, { params: at })).body.changedBy).toBeNull();
    const rows = await engineer.call(library.listLibraryRevisions, { params: at });
    expect(rows.body.items).toMatchObject([{ by: null }, { by: null }]);
  });
});
