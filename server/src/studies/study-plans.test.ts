import { CompiledQuery, type RootOperationNode } from 'kysely';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { studyEndpoints } from '../contract/study.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { makeWorld, type TestWorld } from '../testing/test-world.ts';
import { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { listStudies } from './study-list.ts';

let server: TestServer;
let world: TestWorld;
let access: WorkspaceAccess;
beforeAll(async () => {
  server = await startTestServer();
  world = await makeWorld(server);
  const actor = { kind: 'session', personId: world.people.viewer, sessionId: 'none' } as const;
  access = await WorkspaceAccess.open(server.core.db, actor, world.workspaceId);
});
afterAll(() => server.close());

/** What SQLite is going to do for each statement of a list, a line for a step. */
async function plansOf(query: Record<string, unknown>): Promise<string[]> {
  const nodes: RootOperationNode[] = [];
  const db = server.core.db.withPlugin({
    transformQuery: ({ node }) => {
      nodes.push(node);
      return node;
    },
    transformResult: ({ result }) => Promise.resolve(result),
  });
  await listStudies({ ...server.core, db }, access, studyEndpoints.listStudies.query.parse(query));
  const steps: string[] = [];
  for (const node of nodes) {
    const executor = server.core.db.getExecutor();
    const { sql, parameters } = executor.compileQuery(node, { queryId: 'plan' });
    const explained = CompiledQuery.raw(`EXPLAIN QUERY PLAN ${sql}`, [...parameters]);
    const { rows } = await server.core.db.executeQuery<{ detail: string }>(explained);
    steps.push(...rows.map(({ detail }) => detail));
  }
  return steps;
}

const isFullScan = (step: string) => /^SCAN (studies|newest|studyRevisions|studyParts|owner|people)\b/.test(step);

describe('listing studies', () => {
  const sorts = ['changed', 'number', 'title', 'minutes10To80', 'hottestCoreC', 'owner'];
  const filters = [{}, { q: 'vicuna tola' }, { kind: 'trip' }, { state: 'in-review' }, { archived: 'yes' }];

  it.each(sorts.flatMap((sort) => ['asc', 'desc'].map((order) => [sort, order] as const)))(
    'looks through no whole table, by %s, %s, whatever the filter',
    async (sort, order) => {
      const owned = [{ itemId: world.libraryItemId }, { ownerId: world.people.analyst }];
      for (const filter of [...filters, ...owned]) {
        const steps = await plansOf({ ...filter, sort, order });
        expect(steps.length).toBeGreaterThanOrEqual(4);
        expect(steps.filter(isFullScan)).toEqual([]);
      }
    },
  );

  it.each([
    ['changed', 'desc', 'studiesByChange'],
    ['changed', 'asc', 'studiesByChange'],
    ['number', 'desc', 'studiesByNumber'],
    ['title', 'asc', 'studiesByTitle'],
    ['minutes10To80', 'asc', 'studiesByMinutes'],
    ['hottestCoreC', 'asc', 'studiesByCore'],
  ])('by %s, %s reads a page in the order of %s, without sorting', async (sort, order, index) => {
    const steps = await plansOf({ sort, order });
    expect(steps[0]).toContain(`INDEX ${index} (workspaceId=?`);
    expect(steps.filter((step) => step.includes('TEMP B-TREE'))).toEqual([]);
  });

  it('asks the full-text index for words, and the references for a part of the library', async () => {
    expect((await plansOf({ q: 'tola' })).join('\n')).toContain('SCAN studySearch VIRTUAL TABLE INDEX');
    expect((await plansOf({ itemId: world.libraryItemId })).join('\n')).toContain('INDEX studyPartsByItem (itemId=?)');
  });
});
