import { CompiledQuery, createQueryId, type KyselyPlugin, type RawBuilder, type RootOperationNode, sql } from 'kysely';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { makeWorld, type TestWorld } from '../testing/test-world.ts';
import { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { listItems } from './library-list.ts';

let server: TestServer;
let world: TestWorld;
beforeAll(async () => {
  server = await startTestServer();
});
beforeEach(async () => {
  world = await makeWorld(server);
});
afterAll(() => server.close());

const run = (statement: RawBuilder<unknown>) => statement.execute(server.core.db);
const revisions = () =>
  server.core.db.selectFrom('libraryRevisions').selectAll().where('itemId', '=', world.libraryItemId).execute();

describe('revisions of the library', () => {
  it.each(['itemId', 'revision', 'name', 'notes', 'source', 'body', 'message', 'createdAt', 'createdBy'])(
    'never change: %s',
    async (column) => {
      const before = await revisions();
      const change = sql`UPDATE libraryRevisions SET ${sql.ref(column)} = ${sql.ref(column)} WHERE revision = 1`;
      await expect(run(change)).rejects.toThrow('never change');
      expect(await revisions()).toEqual(before);
    },
  );

  it('are never deleted, nor is their item, while the workspace is there', async () => {
    const { libraryItemId: id } = world;
    const before = await revisions();
    await expect(run(sql`DELETE FROM libraryRevisions WHERE itemId = ${id}`)).rejects.toThrow('never deleted');
    await expect(run(sql`DELETE FROM libraryItems WHERE id = ${id}`)).rejects.toThrow('never deleted');
    expect(await revisions()).toEqual(before);
  });

  it('follow each other: none is left out, none is written over', async () => {
    const insert = (verb: string, revision: number) =>
      run(sql`${sql.raw(verb)} INTO libraryRevisions
        SELECT itemId, ${revision}, 'X', notes, source, body, message, createdAt, createdBy
        FROM libraryRevisions WHERE itemId = ${world.libraryItemId} AND revision = 1`);
    for (const revision of [0, 1, 2, 4]) {
      await expect(insert('INSERT', revision)).rejects.toThrow('follow each other');
      await expect(insert('INSERT OR REPLACE', revision)).rejects.toThrow('follow each other');
    }
    await insert('INSERT', 3);
    expect(await revisions()).toHaveLength(3);
  });

  it('go with their workspace, and the words that find them too', async () => {
    const words = async () => {
      const found = await sql<{
        rowid: number;
      }>`SELECT rowid FROM librarySearch WHERE librarySearch MATCH 'measured'`.execute(server.core.db);
      return found.rows.length;
    };
    const before = await words();
    await run(sql`DELETE FROM workspaces WHERE id = ${world.workspaceId}`);
    expect(await revisions()).toEqual([]);
    expect(await words()).toBe(before - 1);
    await run(sql`INSERT INTO librarySearch (librarySearch) VALUES ('integrity-check')`);
  });
});

describe('indexes of the library', () => {
  const planOf = async (query: RawBuilder<unknown>) => {
    const { rows } = await sql<{ detail: string }>`EXPLAIN QUERY PLAN ${query}`.execute(server.core.db);
    return rows.map(({ detail }) => detail).join('\n');
  };

  it.each([
    ['name', 'libraryItemsByName'],
    ['kind', 'libraryItemsByKind'],
    ['changed', 'libraryItemsByChange'],
  ] as const)('find a page of the list sorted by %s without sorting', async (sort, index) => {
    const { db } = server.core;
    const nodes: RootOperationNode[] = [];
    const listening: KyselyPlugin = {
      transformQuery: ({ node }) => {
        nodes.push(node);
        return node;
      },
      transformResult: ({ result }) => Promise.resolve(result),
    };
    const actor = { kind: 'session', personId: world.people.viewer, sessionId: '' } as const;
    const access = await WorkspaceAccess.open(db, actor, world.workspaceId);
    const cursor = Buffer.from(JSON.stringify([`library by ${sort}`, 'desc', ...'xxx'.slice(sort === 'kind' ? 0 : 1)]));
    const query = { sort, order: 'desc', archived: 'no', limit: 50, cursor: cursor.toString('base64url') } as const;
    await listItems({ ...server.core, db: db.withPlugin(listening) }, access, query);
    const [node] = nodes;
    if (!node) throw new Error('The list asked for nothing.');
    const { sql: text, parameters } = db.getExecutor().compileQuery(node, createQueryId());
    const plan = await db.executeQuery(CompiledQuery.raw(`EXPLAIN QUERY PLAN ${text}`, [...parameters]));
    const details = (plan.rows as { detail: string }[]).map(({ detail }) => detail);
    expect(details).toContainEqual(expect.stringContaining(`SEARCH item USING INDEX ${index} (workspaceId=? AND (`));
    expect(details.join('\n')).not.toContain('TEMP B-TREE FOR ORDER BY');
  });

  it('lead every foreign key', async () => {
    for (const table of ['libraryItems', 'libraryRevisions']) {
      const keys = await sql<{ from: string }>`SELECT "from" FROM pragma_foreign_key_list(${table})`.execute(
        server.core.db,
      );
      expect(keys.rows.length).toBeGreaterThan(1);
      for (const { from } of keys.rows) {
        expect(await planOf(sql`SELECT 1 FROM ${sql.table(table)} WHERE ${sql.ref(from)} = 'x'`)).toMatch(/^SEARCH/);
      }
    }
  });

  it('find what was done to one subject', async () => {
    const plan = await planOf(sql`SELECT * FROM activity WHERE workspaceId = 'w' AND subjectId = 's' AND seq < 9
      ORDER BY seq DESC LIMIT 51`);
    expect(plan).toContain('activityBySubject');
    expect(plan).not.toContain('TEMP B-TREE');
  });
});
