import { sql } from 'kysely';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { engineVersion } from '../runs/headline-runs.ts';
import { exampleStudy } from '../testing/example-study.ts';
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

describe('saveRevision', () => {
  it('makes the working copy a revision with its message, author and headline', async () => {
    const id = await analyst.begin();
    await engineer.write(id, 1, { inputs: hotter });
    const { status, body, headers } = await engineer.save(id, 2, ' Arrives hotter ');
    expect(status).toBe(201);
    expect(headers.get('etag')).toBe('"w2"');
    expect(body).toMatchObject({
      title: 'Hotter',
      revision: 2,
      isChanged: false,
      working: { version: 2, inputs: hotter },
    });
    expect(body.headline.numbers.hottestCoreC).toBeGreaterThan(40);
    const revision = (await analyst.revision(id, 2)).body;
    expect(revision).toMatchObject({
      revision: 2,
      message: 'Arrives hotter',
      title: 'Hotter',
      inputs: hotter,
      parts: [],
    });
    expect(revision.by).toEqual({ id: world.people.engineer, name: 'engineer' });
    expect(revision.headline).toEqual(body.headline);
    const detail = { number: '2', title: 'Hotter', revision: '2', message: 'Arrives hotter' };
    expect((await analyst.deeds())[0]).toMatchObject({ action: 'study.revised', subjectId: id, detail });
  });

  it('refuses another version, entries that wait, no change, and no message', async () => {
    const id = await analyst.begin();
    expect((await analyst.save(id, 1)).body).toMatchObject({ status: 409, code: 'UNCHANGED' });
    await analyst.write(id, 1, { inputs: hotter, pending: { 'pack.series': '-' } });
    expect((await analyst.save(id, 1)).body).toMatchObject({ status: 412, code: 'EDIT_CONFLICT' });
    expect((await analyst.save(id, 2)).body).toMatchObject({ status: 409, code: 'ENTRIES_PENDING' });
    await analyst.write(id, 2, { inputs: hotter });
    expect((await analyst.save(id, 3, '  ')).body).toMatchObject({ status: 422, errors: [{ path: 'body.message' }] });
    expect((await analyst.revisions(id)).body.items).toHaveLength(1);
    expect((await analyst.save(id, 3)).status).toBe(201);
  });

  it('saves once where two save at once, and answers the same to a call repeated under its key', async () => {
    const id = await analyst.begin();
    await analyst.write(id, 1, { inputs: hotter });
    const answers = await Promise.all([analyst.save(id, 2), engineer.save(id, 2)]);
    expect(answers.map(({ body }) => (body.code as string) ?? body.revision).sort()).toEqual([2, 'UNCHANGED']);
    await analyst.write(id, 2, { inputs: titled('Third') });
    const key = { 'Idempotency-Key': 'third' };
    const first = await analyst.save(id, 3, 'Third', key);
    expect((await analyst.save(id, 3, 'Third', key)).body).toEqual(first.body);
    expect((await analyst.revisions(id)).body.items).toHaveLength(3);
  });

  it('takes the numbers of the version that it saves, where somebody writes while the engine runs', async () => {
    const id = await analyst.begin();
    await analyst.write(id, 1, { inputs: hotter });
    const [saved, written] = await Promise.all([
      analyst.save(id, 2),
      engineer.write(id, 2, { inputs: titled('Newer') }),
    ]);
    expect(written.status).toBe(200);
    expect([201, 412]).toContain(saved.status);
    const { revision, working } = (await analyst.read(id)).body;
    expect(revision).toBe(saved.status === 201 ? 2 : 1);
    expect(working).toMatchObject({ version: 3, inputs: { title: 'Newer' } });
  });
});

describe('revisions of a study', () => {
  it('are listed newest first, in pages, with their numbers', async () => {
    const id = await analyst.begin();
    for (const [i, inputs] of [hotter, titled('Third'), titled('Fourth')].entries()) {
      await analyst.write(id, i + 1, { inputs });
      await analyst.save(id, i + 2, `Step ${i + 2}`);
    }
    const first = (await analyst.revisions(id, { limit: '3' })).body;
    expect((first.items as { revision: number; message: string }[]).map(({ message }) => message)).toEqual([
      'Step 4',
      'Step 3',
      'Step 2',
    ]);
    const { body } = await analyst.revisions(id, { limit: '3', cursor: first.nextCursor as string });
    expect(body).toMatchObject({
      items: [{ revision: 1, message: 'Created', title: warm.title, engineVersion }],
      nextCursor: null,
    });
    expect(body.items[0].numbers.endMin).toBeGreaterThan(10);
  });

  it('cannot be changed or deleted, even by a statement that goes past the server', async () => {
    const id = await analyst.begin();
    const { db } = server.core;
    for (const change of ["message = 'Other'", "inputs = '{}'", "headline = '{}'", 'revision = 7', 'authorId = NULL']) {
      const update = sql.raw(`UPDATE studyRevisions SET ${change} WHERE studyId = '${id}'`).execute(db);
      await expect(update, change).rejects.toThrow('a revision of a study never changes');
    }
    const columns = 'studyId, revision, message, createdAt, title, engineVersion, headline, parts, inputs';
    const values = (revision: number) => `'${id}', ${revision}, 'Other', 0, '', '', '{}', '[]', '{}'`;
    for (const [statement, reason] of [
      [`DELETE FROM studyRevisions WHERE studyId = '${id}'`, 'a revision of a study is never deleted'],
      [`DELETE FROM studies WHERE id = '${id}'`, 'a study is archived, never deleted'],
      [`REPLACE INTO studyRevisions (${columns}) VALUES (${values(1)})`, 'revisions of a study follow each other'],
      [`INSERT INTO studyRevisions (${columns}) VALUES (${values(3)})`, 'revisions of a study follow each other'],
    ] as const) {
      await expect(sql.raw(statement).execute(db), statement).rejects.toThrow(reason);
    }
    expect((await analyst.revision(id, 1)).body).toMatchObject({ message: 'Created', inputs: warm });
  });

  it('go with their workspace', async () => {
    const id = await analyst.begin();
    const { db } = server.core;
    await db.deleteFrom('workspaces').where('id', '=', world.workspaceId).execute();
    for (const table of ['studyRevisions', 'studyParts'] as const) {
      expect(await db.selectFrom(table).selectAll().where('studyId', '=', id).execute()).toEqual([]);
    }
  });

  it('stay without their author where the account is gone', async () => {
    const id = await analyst.begin();
    await server.core.db.deleteFrom('people').where('id', '=', world.people.analyst).execute();
    expect((await engineer.read(id)).body).toMatchObject({ owner: null, changedBy: null, title: warm.title });
    expect((await engineer.revision(id, 1)).body).toMatchObject({ by: null, message: 'Created' });
  });
});

describe('copyStudy', () => {
  it('makes a study of the caller’s own from the newest revision, not from the working copy', async () => {
    const id = await analyst.begin();
    await analyst.write(id, 1, { inputs: hotter });
    const { status, body } = await engineer.copy(id);
    expect(status).toBe(201);
    expect(body).toMatchObject({
      number: 3,
      title: `${warm.title} copy`,
      owner: { name: 'engineer' },
      revision: 1,
      working: { version: 1, inputs: { session: warm.session } },
    });
    expect(body.headline.numbers).toEqual((await analyst.read(id)).body.headline.numbers);
    const message = 'Copy of study 2, revision 1';
    expect((await analyst.revision(body.id as string, 1)).body).toMatchObject({ message });
    expect((await analyst.deeds())[0]).toMatchObject({
      action: 'study.copied',
      detail: { number: '3', title: body.title, message },
    });
  });

  it('copies an older revision under the title it is given; a long title stays within the engine’s bound', async () => {
    const id = await analyst.begin(titled('🏔'.repeat(150)));
    await analyst.write(id, 1, { inputs: hotter });
    await analyst.save(id, 2);
    const old = await analyst.copy(id, { revision: 1, title: ' Cooler ' });
    expect(old.body).toMatchObject({
      title: 'Cooler',
      working: { inputs: { title: 'Cooler', session: warm.session } },
    });
    const long = await analyst.copy(id, { revision: 1 });
    expect(long.body.title).toBe(`${'🏔'.repeat(147)} copy`);
  });

  it('finds no revision that is not there', async () => {
    const id = await analyst.begin();
    expect((await analyst.copy(id, { revision: 2 })).status).toBe(404);
    expect((await analyst.copy(world.workspaceId)).status).toBe(404);
    expect((await analyst.copy(id, { title: 'x'.repeat(301) })).status).toBe(422);
  });
});

describe('the archive', () => {
  it('keeps a study from every change until it is taken out; going in and out twice changes nothing more', async () => {
    const id = await analyst.begin();
    await analyst.write(id, 1, { inputs: hotter });
    const archived = await analyst.archive(id);
    expect(archived.body.archivedAt).toBe(new Date(server.clock.now).toISOString());
    server.clock.now += 60_000;
    expect((await analyst.archive(id)).body).toEqual(archived.body);
    for (const answer of [
      await analyst.write(id, 2, { inputs: titled('Late') }),
      await analyst.write(id, 1, { inputs: titled('Late') }),
      await analyst.save(id, 2),
    ]) {
      expect(answer.body).toMatchObject({ status: 409, code: 'ARCHIVED' });
    }
    expect((await analyst.copy(id)).status).toBe(201);
    expect((await analyst.unarchive(id)).body).toMatchObject({ archivedAt: null, working: { version: 2 } });
    expect((await analyst.unarchive(id)).status).toBe(200);
    expect((await analyst.save(id, 2)).status).toBe(201);
    const actions = (await analyst.deeds()).map((deed) => (deed as { action: string }).action).slice(0, 4);
    expect(actions).toEqual(['study.revised', 'study.unarchived', 'study.copied', 'study.archived']);
  });
});
