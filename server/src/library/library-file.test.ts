import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { libraryEndpoints as library, libraryKinds, type LibraryFile, type LibraryItem } from '../contract/library.ts';
import { workspaceEndpoints } from '../contract/workspace.ts';
import { examplePart } from '../testing/example-parts.ts';
import type { TestBrowser } from '../testing/test-browser.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { makeWorld, type TestWorld } from '../testing/test-world.ts';

type FileItem = LibraryFile['items'][number];
type SameName = 'revise' | 'add' | 'skip';

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

const part = (kind: FileItem['kind'], name: string, notes = ''): FileItem => {
  const body = examplePart(kind);
  return { kind, name, notes, source: '', body: 'name' in body ? { ...body, name } : body };
};
const fileOf = (items: FileItem[]): LibraryFile => ({ format: 'voltiplano/library', version: 1, items });
const send = (items: FileItem[], sameName?: SameName, by = engineer, at = params) =>
  by.call(library.importLibrary, { params: at, body: { file: fileOf(items), sameName } });
const exported = async (query: Record<string, string> = {}) =>
  (await engineer.call(library.exportLibrary, { params, query })).body as LibraryFile;
const itemsOf = async (query: Record<string, string> = {}) =>
  (await engineer.call(library.listLibrary, { params, query })).body.items as LibraryItem[];

describe('exportLibrary', () => {
  it('gives all parts outside the archive, those of a kind, or one, sorted by kind and name', async () => {
    await send([part('station', 'Salar 2'), part('station', 'Álamo'), part('pack', 'Suri')]);
    const [archived] = await itemsOf({ q: 'Suri' });
    const at = { ...params, itemId: archived?.id ?? '' };
    await engineer.call(library.archiveLibraryItem, { params: at });
    const whole = await exported();
    expect(whole).toMatchObject({ format: 'voltiplano/library', version: 1 });
    expect(whole.items.map(({ name }) => name)).toEqual(['Vicuña cell', 'Álamo', 'Salar 2']);
    expect(whole.items[2]).toEqual(part('station', 'Salar 2'));
    expect((await exported({ kind: 'cell' })).items.map(({ name }) => name)).toEqual(['Vicuña cell']);
    expect((await exported({ itemId: at.itemId })).items.map(({ name }) => name)).toEqual(['Suri']);
  });

  it('of an empty library has no parts', async () => {
    await engineer.call(library.archiveLibraryItem, { params: { ...params, itemId: world.libraryItemId } });
    expect((await exported()).items).toEqual([]);
  });
});

describe('importLibrary', () => {
  it('carries a library with a part of each kind to another workspace unchanged', async () => {
    await send(libraryKinds.map((kind) => part(kind, `Guanaco ${kind}`, 'Notes')));
    const whole = await exported();
    const other = await makeWorld(server);
    const at = { workspaceId: other.workspaceId };
    const there = await server.browserOf(other.people.engineer);
    const answer = await send(whole.items, 'revise', there, at);
    expect(answer.status).toBe(201);
    expect(answer.body.added).toHaveLength(libraryKinds.length);
    // Both workspaces have the same cell from the beginning.
    expect(answer.body).toMatchObject({ revised: [], left: 1 });
    const back = await there.call(library.exportLibrary, { params: at });
    expect(back.body).toEqual(whole);
  });

  it('revises a part of the same kind and name, adds others, and leaves what says the same', async () => {
    await send([part('pack', 'Suri'), part('station', 'Suri'), part('station', 'Salar 1')]);
    const again = [part('pack', 'Suri', 'Heavier'), part('station', 'Suri'), part('station', 'Salar 2')];
    const { body } = await send(again);
    expect(body.left).toBe(1);
    expect(body.revised).toMatchObject([{ kind: 'pack', name: 'Suri', notes: 'Heavier', revision: 2 }]);
    expect(body.added).toMatchObject([{ kind: 'station', name: 'Salar 2', revision: 1 }]);
    const [{ id }] = body.revised as [LibraryItem];
    const { body: activity } = await engineer.call(workspaceEndpoints.listActivity, {
      params,
      query: { subjectId: id },
    });
    expect(activity.items).toMatchObject([
      { action: 'library.imported', detail: { kind: 'pack', name: 'Suri', revision: '2', message: 'Imported' } },
      { action: 'library.imported', detail: { kind: 'pack', name: 'Suri', revision: '1', message: 'Imported' } },
    ]);
    expect((await send(again)).body).toEqual({ added: [], revised: [], left: 3 });
  });

  it('adds another of the same name, or skips it, where that is asked for', async () => {
    await send([part('pack', 'Suri')]);
    const changed = part('pack', 'Suri', 'Heavier');
    expect((await send([changed], 'skip')).body).toEqual({ added: [], revised: [], left: 1 });
    const added = await send([changed, part('pack', 'Suri')], 'add');
    expect(added.body).toMatchObject({ added: [{ notes: 'Heavier', revision: 1 }], revised: [], left: 1 });
    expect(await itemsOf({ q: 'Suri' })).toHaveLength(2);
  });

  it('keeps two parts of one name apart, whatever their order', async () => {
    const two = [part('pack', 'Suri', 'light'), part('pack', 'Suri', 'heavy')];
    expect((await send(two)).body.added).toHaveLength(2);
    expect((await send([...two].reverse())).body).toEqual({ added: [], revised: [], left: 2 });
    const heavier = await send([part('pack', 'Suri', 'heavier'), part('pack', 'Suri', 'light')]);
    expect(heavier.body).toMatchObject({ left: 1, added: [], revised: [{ notes: 'heavier', revision: 2 }] });
    expect((await itemsOf({ q: 'Suri' })).map(({ notes }) => notes).sort()).toEqual(['heavier', 'light']);
  });

  it('does not touch the archive', async () => {
    await engineer.call(library.archiveLibraryItem, { params: { ...params, itemId: world.libraryItemId } });
    const { body } = await send([part('cell', 'Vicuña cell', 'new')]);
    expect(body).toMatchObject({ added: [{ revision: 1 }], revised: [] });
    expect(await itemsOf({ archived: 'yes' })).toMatchObject([{ id: world.libraryItemId, revision: 2 }]);
  });

  it('takes none where one is wrong, and names every wrong field', async () => {
    const [bad, worse] = [part('cell', 'Bad'), part('route', 'Worse')];
    const items = [
      part('pack', 'Good'),
      { ...bad, body: { ...bad.body, massKg: 0 } },
      { ...worse, body: { legs: [{ km: 10, kmPerH: 'fast' }] } },
    ];
    const answer = await send(items);
    expect(answer.body).toMatchObject({ status: 422, code: 'INVALID_INPUT' });
    expect(answer.body.errors).toEqual([
      { path: 'body.file.items.1.body.massKg', message: 'massKg must be above 0, but is 0' },
      {
        path: 'body.file.items.2.body.legs.0.kmPerH',
        message: 'legs[0].kmPerH must be a number, but is "fast"',
      },
    ]);
    expect(await itemsOf()).toHaveLength(1);
  });

  it.each([
    ['body.file.format', { ...fileOf([part('pack', 'A')]), format: 'voltiplano/study' }],
    ['body.file.version', { ...fileOf([part('pack', 'A')]), version: 2 }],
    ['body.file.items', fileOf([])],
    ['body.file.items', fileOf(Array.from({ length: 2001 }, () => part('pack', 'A')))],
    ['body.file.items.0.kind', fileOf([{ ...part('pack', 'A'), kind: 'boost' as never }])],
    ['body.file.items.0.name', fileOf([{ ...part('pack', 'A'), name: ' ' }])],
  ])('refuses a wrong %s', async (path, file) => {
    const answer = await engineer.call(library.importLibrary, { params, body: { file: file as LibraryFile } });
    expect(answer.body).toMatchObject({ status: 422, errors: [{ path }] });
  });

  it('takes a file of several megabytes, and none above 10 MB', async () => {
    const leg = { km: 10, kmPerH: 90, station: examplePart('station'), depart: { rule: 'reach-next' } };
    const route = { legs: Array.from({ length: 500 }, () => leg) };
    const big = (count: number) =>
      Array.from({ length: count }, (_one, i) => ({ ...part('route', `Route ${i}`), body: route }));
    const size = JSON.stringify(fileOf(big(20))).length;
    expect(size).toBeGreaterThan(2_000_000);
    const taken = await send(big(20));
    expect(taken.status).toBe(201);
    expect(taken.body.added).toHaveLength(20);
    const refused = await send(big(Math.ceil((20 * 10 * 1024 * 1024) / size)));
    expect(refused.body).toMatchObject({ status: 413, code: 'BODY_TOO_LARGE' });
  });

  it('alone takes such bodies', async () => {
    const body = { ...part('cell', 'A'), notes: 'x'.repeat(1_100_000) };
    const answer = await engineer.call(library.createLibraryItem, { params, body });
    expect(answer.body).toMatchObject({ status: 413, code: 'BODY_TOO_LARGE' });
  });

  it('is done once under one key', async () => {
    const call = {
      params,
      body: { file: fileOf([part('pack', 'Suri')]), sameName: 'add' },
      headers: { 'Idempotency-Key': 'import' },
    } as const;
    const [first, second] = [
      await engineer.call(library.importLibrary, call),
      await engineer.call(library.importLibrary, call),
    ];
    expect(second.body).toEqual(first.body);
    expect(await itemsOf({ q: 'Suri' })).toHaveLength(1);
  });
});
