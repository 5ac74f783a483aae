import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { insertPerson } from '../account/people-repository.ts';
import { hashPassword } from '../account/password.ts';
import { accountEndpoints } from '../contract/account.ts';
import { libraryEndpoints, type LibraryItem } from '../contract/library.ts';
import { studyEndpoints, type Study, type StudyRevisionRow, type StudyRow } from '../contract/study.ts';
import { type Activity, type Member, workspaceEndpoints } from '../contract/workspace.ts';
import { HeadlineRuns } from '../runs/headline-runs.ts';
import type { TestBrowser } from '../testing/test-browser.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { demoAccountsText, listDemoAccounts } from './demo-accounts.ts';
import { DEMO_PASSWORD } from './people.ts';
import { seedDemo } from './seed-demo.ts';

/** Some fifty runs of the engine, also on a machine that is busy with other tests. */
const PATIENCE_MS = 120_000;

async function countAll({ core: { db } }: TestServer) {
  const tables = ['people', 'workspaces', 'members', 'activity', 'libraryItems', 'studies', 'studyRevisions'] as const;
  const counts: Record<string, number> = {};
  for (const table of tables) {
    const { n } = await db
      .selectFrom(table)
      .select(({ fn }) => fn.countAll<number>().as('n'))
      .executeTakeFirstOrThrow();
    counts[table] = n;
  }
  return counts;
}

describe('the demo team', () => {
  let server: TestServer;
  let owner: TestBrowser;
  let workspaceId: string;
  let studies: StudyRow[];

  beforeAll(async () => {
    server = await startTestServer();
    expect(await seedDemo(server.core)).toBe(true);
    owner = server.browser();
    await owner.call(accountEndpoints.signIn, { body: { email: 'ines@puna.example', password: DEMO_PASSWORD } });
    const me = await owner.call(accountEndpoints.readMe);
    workspaceId = me.body.workspaces[0].workspaceId;
    studies = [...(await listStudies('no')), ...(await listStudies('yes'))];
  }, PATIENCE_MS);

  afterAll(() => server.close());

  async function listStudies(archived: 'yes' | 'no'): Promise<StudyRow[]> {
    const query = { archived, sort: 'number', order: 'asc' };
    const { body } = await owner.call(studyEndpoints.listStudies, { params: { workspaceId }, query });
    return body.items as StudyRow[];
  }

  async function listLibrary(archived: 'yes' | 'no'): Promise<LibraryItem[]> {
    const query = { archived, limit: '200' };
    const { body } = await owner.call(libraryEndpoints.listLibrary, { params: { workspaceId }, query });
    return body.items as LibraryItem[];
  }

  async function readStudy({ id: studyId }: StudyRow): Promise<Study> {
    const { body } = await owner.call(studyEndpoints.readStudy, { params: { workspaceId, studyId } });
    return body as Study;
  }

  async function listRevisions({ id: studyId }: StudyRow): Promise<StudyRevisionRow[]> {
    const { body } = await owner.call(studyEndpoints.listStudyRevisions, { params: { workspaceId, studyId } });
    return body.items as StudyRevisionRow[];
  }

  it('is four people in four roles, each signing in with the one password', async () => {
    const { body } = await owner.call(workspaceEndpoints.listMembers, { params: { workspaceId } });
    const members = body.items as Member[];
    expect(members.map(({ name, role }) => [name, role])).toEqual([
      ['Inés Quispe', 'owner'],
      ['Mateo Condori', 'analyst'],
      ['Rosa Mamani', 'engineer'],
      ['Tomás Apaza', 'viewer'],
    ]);
    for (const { email } of members) {
      const signedIn = await server
        .browser()
        .call(accountEndpoints.signIn, { body: { email, password: DEMO_PASSWORD } });
      expect(signedIn.status).toBe(200);
    }
  });

  it('has a library of every kind, six stations and both vehicles among it', async () => {
    const items = await listLibrary('no');
    const counts: Record<string, number> = {};
    for (const { kind } of items) counts[kind] = (counts[kind] ?? 0) + 1;
    expect(counts).toEqual({
      cell: 3,
      pack: 4,
      thermal: 3,
      inlet: 2,
      station: 6,
      strategy: 7,
      vehicle: 2,
      route: 3,
    });
    expect(await listLibrary('yes')).toMatchObject([{ kind: 'thermal', name: 'Vicuña loop, chiller 2.6 kW' }]);
    expect(items.filter(({ revision }) => revision >= 2).length).toBeGreaterThanOrEqual(10);
    expect(Math.max(...items.map(({ revision }) => revision))).toBe(4);
  });

  it('says of every part that it is invented, and why it is there', async () => {
    for (const { source, notes } of [...(await listLibrary('no')), ...(await listLibrary('yes'))]) {
      expect(source).toMatch(/^Invented for the demo, as if from \S/);
      expect(notes.length).toBeGreaterThan(20);
    }
  });

  it('has a dozen studies of three owners, one of them a trip, and two in the archive', () => {
    const kept = studies.filter(({ archivedAt }) => archivedAt === null);
    expect(kept).toHaveLength(12);
    expect(studies).toHaveLength(14);
    expect(studies.map(({ number }) => number).sort((a, b) => a - b)).toEqual(studies.map((_one, i) => i + 1));
    expect(new Set(kept.map(({ owner: by }) => by?.name))).toEqual(
      new Set(['Inés Quispe', 'Rosa Mamani', 'Mateo Condori']),
    );
    expect(kept.filter(({ kind }) => kind === 'trip')).toHaveLength(1);
    expect(new Set(kept.map(({ revision }) => revision))).toEqual(new Set([1, 2, 3, 4, 5, 6, 7]));
  });

  it('has numbers for the newest revision of every study, within what such packs do', () => {
    for (const { title, kind, headline } of studies) {
      const { numbers } = headline;
      expect(headline.failure, title).toBeNull();
      expect(numbers?.hottestCoreC, title).toBeGreaterThan(15);
      expect(numbers?.hottestCoreC, title).toBeLessThan(48);
      if (kind === 'trip') continue;
      expect(numbers?.minutes10To80, title).toBeGreaterThan(15);
      expect(numbers?.minutes10To80, title).toBeLessThan(75);
      expect(numbers?.lowestAnodeMv, title).toBeGreaterThan(15);
    }
  });

  it('shows what may hold a session: eight limits over the list, none of them everywhere', () => {
    const kept = studies.filter(({ archivedAt, kind }) => archivedAt === null && kind === 'session');
    const held = kept.map(({ headline }) => new Set(headline.section?.limits.map(({ limit }) => limit)));
    const all = new Set(held.flatMap((one) => [...one]));
    expect([...all].sort()).toEqual(
      expect.arrayContaining([
        'anode',
        'cell-voltage',
        'cold',
        'hot',
        'inlet',
        'station-current',
        'station-power',
        'taper',
      ]),
    );
    for (const limit of [...all].filter((one) => one !== 'station-ramp')) {
      expect(
        held.some((one) => !one.has(limit)),
        limit,
      ).toBe(true);
    }
  });

  it('fails one old revision alone, where a station cannot serve the pack', async () => {
    const failed: string[] = [];
    for (const study of studies) {
      for (const { revision, numbers } of await listRevisions(study)) {
        if (numbers === null) failed.push(`${study.title}, ${revision}`);
      }
    }
    expect(failed).toEqual(['Suri on a 500 V cabinet, with boost, 1']);
    const studyId = studies.find(({ title }) => title.startsWith('Suri on a 500 V'))?.id ?? '';
    const { body } = await owner.call(studyEndpoints.readStudyRevision, {
      params: { workspaceId, studyId, revision: 1 },
    });
    expect(body.headline.failure).toContain('Add a boost converter or choose another station.');
  });

  it('leaves one working copy unsaved, and studies that a newer revision waits for', async () => {
    expect(studies.filter(({ isChanged }) => isChanged).map(({ title }) => title)).toEqual([
      'Vicuña at Salar Tola, warm arrival',
    ]);
    const waiting = new Set<string>();
    const departed = new Set<string>();
    for (const study of studies.filter(({ archivedAt }) => archivedAt === null)) {
      for (const part of (await readStudy(study)).working.parts) {
        if (part.newestRevision > part.revision) waiting.add(study.title);
        if (part.isChanged) departed.add(study.title);
      }
    }
    expect([...waiting]).toContain('Third stop of a hot day');
    expect([...waiting].length).toBeLessThan(8);
    expect([...departed]).toContain('Station that sags at noon');
  });

  it('changes something with every revision, and says what', async () => {
    for (const study of studies) {
      const rows = await listRevisions(study);
      expect(new Set(rows.map(({ message }) => message)).size).toBe(rows.length);
      for (const { message } of rows) expect(message).not.toBe('Created');
    }
  });

  it('has lived through the weeks before now, in order, and told all of it', async () => {
    const seen: Activity[] = [];
    for (let cursor: string | null | undefined; cursor !== null;) {
      const query: Record<string, string> = cursor ? { limit: '200', cursor } : { limit: '200' };
      const { body } = await owner.call(workspaceEndpoints.listActivity, { params: { workspaceId }, query });
      seen.push(...(body.items as Activity[]));
      cursor = body.nextCursor as string | null;
    }
    const moments = seen.map(({ at }) => Date.parse(at));
    expect(moments).toEqual([...moments].sort((a, b) => b - a));
    expect(moments[0]).toBeLessThan(server.clock.now);
    expect(server.clock.now - (moments.at(-1) ?? 0)).toBeGreaterThan(60 * 24 * 3_600_000);
    expect(new Set(seen.map(({ action }) => action))).toEqual(
      new Set([
        'workspace.created',
        'invitation.sent',
        'member.joined',
        'member.roleChanged',
        'library.added',
        'library.revised',
        'library.archived',
        'study.created',
        'study.revised',
        'study.archived',
      ]),
    );
  });

  it('sends no mail', async () => {
    expect(await server.core.db.selectFrom('outbox').selectAll().execute()).toEqual([]);
  });

  it('is there once: a second seeding changes nothing', async () => {
    const before = await countAll(server);
    expect(await seedDemo(server.core)).toBe(false);
    expect(await countAll(server)).toEqual(before);
  });

  it('is named at the start as long as its password opens the accounts', async () => {
    const { db } = server.core;
    const accounts = await listDemoAccounts(db);
    expect(demoAccountsText(accounts)).toBe(
      `Demo team Puna Mobility, invented. Each signs in with the password ${DEMO_PASSWORD}
  ines@puna.example   Inés Quispe    owner
  rosa@puna.example   Rosa Mamani    engineer
  mateo@puna.example  Mateo Condori  analyst
  tomas@puna.example  Tomás Apaza    viewer
`,
    );
    const passwordHash = await hashPassword('nobody else knows this');
    await db.updateTable('people').set({ passwordHash }).where('email', '!=', 'tomas@puna.example').execute();
    expect((await listDemoAccounts(db)).map(({ name }) => name)).toEqual(['Tomás Apaza']);
    await db.updateTable('people').set({ passwordHash }).execute();
    expect(demoAccountsText(await listDemoAccounts(db))).toBe('');
  });
});

describe('seedDemo', () => {
  it('leaves a database alone that somebody is in', async () => {
    const server = await startTestServer();
    try {
      const person = { email: 'a@b.example', name: 'A', passwordHash: null, isEmailProven: true };
      await insertPerson(server.core, person);
      expect(await seedDemo(server.core)).toBe(false);
      expect(await countAll(server)).toMatchObject({ people: 1, workspaces: 0, studies: 0 });
    } finally {
      await server.close();
    }
  });

  it('leaves nothing where it fails half way', async () => {
    const server = await startTestServer();
    const runs = new HeadlineRuns();
    let left = 10;
    const failing = Object.assign(Object.create(runs) as HeadlineRuns, {
      headlineOf: (inputs: Parameters<HeadlineRuns['headlineOf']>[0]) =>
        (left -= 1) < 0 ? Promise.reject(new Error('the eleventh')) : runs.headlineOf(inputs),
    });
    try {
      await expect(seedDemo({ ...server.core, runs: failing })).rejects.toThrow('the eleventh');
      const counts = await countAll(server);
      expect(
        Object.values(counts).every((count) => count === 0),
        JSON.stringify(counts),
      ).toBe(true);
    } finally {
      await runs.close();
      await server.close();
    }
  }, 60_000);
});
