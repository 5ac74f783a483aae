import { afterAll, beforeAll, expect, it } from 'vitest';
import { libraryEndpoints as library } from '../contract/library.ts';
import { studyEndpoints as studies } from '../contract/study.ts';
import { exampleStudy } from '../testing/example-study.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { makeWorld } from '../testing/test-world.ts';

let server: TestServer;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());

it('listLibraryUse names the studies whose working copy uses a part, newest first, and the part counts them', async () => {
  const { workspaceId, people, libraryItemId: itemId, study } = await makeWorld(server);
  const analyst = await server.browserOf(people.analyst);
  const params = { workspaceId };
  const ids: string[] = [];
  for (const title of ['Second', 'Third']) {
    const parts = [{ part: 'cell', itemId, revision: 2 }] as const;
    const body = { inputs: { ...exampleStudy(), title }, parts: [...parts] };
    const made = await analyst.call(studies.createStudy, { params, body });
    expect(made.status).toBe(201);
    ids.push(made.body.id as string);
  }
  await analyst.call(studies.archiveStudy, { params: { ...params, studyId: ids[0] ?? '' } });

  const at = { ...params, itemId };
  const first = await analyst.call(library.listLibraryUse, { params: at, query: { limit: '2' } });
  expect(first.body.items).toEqual([
    { studyId: ids[1], number: 3, title: 'Third', kind: 'session', revision: 2, isArchived: false },
    { studyId: ids[0], number: 2, title: 'Second', kind: 'session', revision: 2, isArchived: true },
  ]);
  const cursor = first.body.nextCursor as string;
  const second = await analyst.call(library.listLibraryUse, { params: at, query: { limit: '2', cursor } });
  expect(second.body).toMatchObject({ items: [{ studyId: study.id, revision: 1 }], nextCursor: null });

  expect((await analyst.call(library.readLibraryItem, { params: at })).body.studyCount).toBe(2);
  const list = await analyst.call(library.listLibrary, { params, query: { sort: 'studies', order: 'desc' } });
  expect(list.body.items).toMatchObject([{ id: itemId, studyCount: 2 }]);

  const wrong = await analyst.call(library.listLibraryUse, { params: at, query: { cursor: '?' } });
  expect(wrong.body).toMatchObject({ status: 422, errors: [{ path: 'query.cursor' }] });
});
