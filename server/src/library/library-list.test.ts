import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { libraryEndpoints as library, libraryKinds, type LibraryItem } from '../contract/library.ts';
import { sortText } from '../db/search-text.ts';
import { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import { examplePart } from '../testing/example-parts.ts';
import type { TestBrowser } from '../testing/test-browser.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { makeWorld } from '../testing/test-world.ts';
import { insertItem, setArchived } from './library-repository.ts';

const sorts = ['name', 'kind', 'changed', 'studies'] as const;
type Said = { kind: (typeof libraryKinds)[number]; name: string; notes?: string; source?: string; archived?: boolean };

let server: TestServer;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());

/** A workspace whose library holds these, and somebody who reads it. */
async function shelf(items: readonly Said[]): Promise<{ reader: TestBrowser; params: { workspaceId: string } }> {
  const { workspaceId, people, study } = await makeWorld(server);
  await server.core.db.transaction().execute(async (db) => {
    const core = { ...server.core, db };
    const actor = { kind: 'session', personId: people.engineer, sessionId: '' } as const;
    const access = await WorkspaceAccess.open(db, actor, workspaceId);
    for (const { kind, name, notes = '', source = '', archived } of items) {
      server.clock.now += 1000;
      const { id } = await insertItem(core, access, kind, { name, notes, source, body: examplePart(kind) }, 'Added');
      if (archived) await setArchived(core, access, id, server.clock.now);
      // The study uses the first part of each kind.
      await db
        .insertInto('studyParts')
        .values({ studyId: study.id, part: kind, itemId: id, revision: 1, keptAgainst: null })
        .onConflict((conflict) => conflict.doNothing())
        .execute();
    }
  });
  return { reader: await server.browserOf(people.viewer), params: { workspaceId } };
}

type Shelf = Awaited<ReturnType<typeof shelf>>;

async function list({ reader, params }: Shelf, query: Record<string, string>) {
  const { status, body } = await reader.call(library.listLibrary, { params, query });
  expect(status, JSON.stringify(query)).toBe(200);
  return body as { items: LibraryItem[]; nextCursor: string | null; total: number };
}

const names = ({ items }: { items: LibraryItem[] }) => items.map(({ name }) => name);

async function allPages(of: Shelf, query: Record<string, string>): Promise<LibraryItem[]> {
  const seen: LibraryItem[] = [];
  for (let cursor: string | null = ''; cursor !== null;) {
    const page = await list(of, cursor === '' ? query : { ...query, cursor });
    seen.push(...page.items);
    expect(page.items.length).toBeLessThanOrEqual(Number(query.limit));
    expect(page.nextCursor === null || page.items.length > 0).toBe(true);
    cursor = page.nextCursor;
  }
  return seen;
}

const byteOrder = (a: string, b: string) => Buffer.compare(Buffer.from(a), Buffer.from(b));
const byName = (a: LibraryItem, b: LibraryItem) => byteOrder(sortText(a.name), sortText(b.name));
const byId = (a: LibraryItem, b: LibraryItem) => byteOrder(a.id, b.id);
const byKeys: Record<(typeof sorts)[number], (a: LibraryItem, b: LibraryItem) => number> = {
  name: (a, b) => byName(a, b) || byId(a, b),
  kind: (a, b) => byteOrder(a.kind, b.kind) || byName(a, b) || byId(a, b),
  changed: (a, b) => byteOrder(a.changedAt, b.changedAt) || byId(a, b),
  studies: (a, b) => a.studyCount - b.studyCount || byName(a, b) || byId(a, b),
};

describe('listLibrary', () => {
  it('sorts by name without minding accents and capitals, and counts what is there', async () => {
    const of = await shelf(['vicuña', 'Änderung', 'Suri', 'ábaco'].map((name) => ({ kind: 'station', name })));
    const page = await list(of, { kind: 'station' });
    expect(names(page)).toEqual(['ábaco', 'Änderung', 'Suri', 'vicuña']);
    expect(page).toMatchObject({ total: 4, nextCursor: null });
    expect(names(await list(of, { kind: 'station', order: 'desc', limit: '2' }))).toEqual(['vicuña', 'Suri']);
    expect((await list(of, { kind: 'station', limit: '2' })).total).toBe(4);
  });

  it('finds by kind and archive', async () => {
    const of = await shelf([
      { kind: 'pack', name: 'Suri 800 V' },
      { kind: 'station', name: 'Salar 3' },
      { kind: 'station', name: 'Salar 1', archived: true },
    ]);
    expect(names(await list(of, {}))).toEqual(['Salar 3', 'Suri 800 V', 'Vicuña cell']);
    expect(names(await list(of, { kind: 'station' }))).toEqual(['Salar 3']);
    expect(names(await list(of, { archived: 'yes' }))).toEqual(['Salar 1']);
    expect(await list(of, { archived: 'yes', kind: 'cell' })).toMatchObject({ items: [], total: 0 });
  });

  it('finds beginnings of words in name, notes and source of the newest revision', async () => {
    const of = await shelf([
      { kind: 'pack', name: 'Vicuña 400-V pack', notes: 'Three segments', source: 'Datasheet PM-17' },
      { kind: 'pack', name: 'Suri 800-V pack', notes: 'Liquid “plate” cooling' },
      { kind: 'station', name: 'Salar “Laguna” 2', notes: 'C++; 50% OR NOT AND NEAR' },
    ]);
    const found = async (q: string) => names(await list(of, { q }));
    expect(await found('VICUN')).toEqual(['Vicuña 400-V pack', 'Vicuña cell']);
    expect(await found('pack vic')).toEqual(['Vicuña 400-V pack']);
    expect(await found('400-V')).toEqual(['Vicuña 400-V pack']);
    expect(await found('datash')).toEqual(['Vicuña 400-V pack']);
    expect(await found('icuña')).toEqual([]);
    expect(await found('plate cool')).toEqual(['Suri 800-V pack']);
    expect(await found('OR')).toEqual(['Salar “Laguna” 2']);
    expect(await found('near not')).toEqual(['Salar “Laguna” 2']);
    expect(await found('name:suri')).toEqual([]);
    expect(await found('measured')).toEqual(['Vicuña cell']);
    expect(await found('   ')).toHaveLength(4);
    expect((await list(of, { q: 'pack', limit: '1' })).total).toBe(2);
  });

  it('finds no part of another workspace', async () => {
    await shelf([{ kind: 'pack', name: 'Guanaco' }]);
    const of = await shelf([]);
    expect(names(await list(of, { q: 'guanaco' }))).toEqual([]);
  });

  it('takes any text to search for, and never fails', async () => {
    const of = await shelf([]);
    const syntax = fc.constantFrom(
      '"',
      '""',
      '*',
      '(',
      ')',
      '^',
      ':',
      '{',
      '}',
      '+',
      '-',
      ',',
      'AND',
      'OR',
      'NOT',
      'NEAR(',
      '\0',
      '\\',
      "'",
      ' ',
      'name:',
      'vic',
      '\ud800',
      '\u0301',
    );
    const text = fc.oneof(
      fc.string({ maxLength: 200 }),
      fc.string({ unit: 'binary', maxLength: 100 }),
      fc.array(syntax, { maxLength: 30 }).map((parts) => parts.join('')),
      fc.array(fc.string({ minLength: 1, maxLength: 1 }), { maxLength: 100 }).map((parts) => parts.join(' ')),
    );
    await fc.assert(
      fc.asyncProperty(text, async (q) => {
        const { items, total } = await list(of, { q: q.slice(0, 200) });
        expect(items).toHaveLength(total);
      }),
      { numRuns: 150, seed: 5 },
    );
  });

  it('refuses a search of more than 200 characters', async () => {
    const { reader, params } = await shelf([]);
    const answer = await reader.call(library.listLibrary, { params, query: { q: 'x'.repeat(201) } });
    expect(answer.body).toMatchObject({ status: 422, errors: [{ path: 'query.q' }] });
  });
});

describe('pages of listLibrary', () => {
  const item = fc.record({
    kind: fc.constantFrom(...libraryKinds),
    // Few names, so that many are equal, and some that sort alike, or are long, or hold what a cursor might trip over.
    name: fc.constantFrom('Vicuña', 'vicuna', 'Suri', 'Salar "3"', '\u{1f50b} cell', '한글'.repeat(100), '[1,2]'),
  });

  it('one after the other are the whole list, in order, for each sort and both orders', async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(item, { maxLength: 14 }), fc.integer({ min: 1, max: 5 }), async (items, limit) => {
        const of = await shelf(items);
        for (const sort of sorts) {
          for (const order of ['asc', 'desc'] as const) {
            const whole = (await list(of, { sort, order, limit: '200' })).items;
            const expected = [...whole].sort(byKeys[sort]);
            if (order === 'desc') expected.reverse();
            expect(whole).toEqual(expected);
            expect(whole).toHaveLength(items.length + 1);
            expect(await allPages(of, { sort, order, limit: String(limit) })).toEqual(whole);
          }
        }
      }),
      { numRuns: 8, seed: 6 },
    );
  });

  it('neither lose nor repeat what stays, while other parts come and go', async () => {
    const kept = ['B', 'D', 'F', 'H'].map((name) => ({ kind: 'pack', name }) as const);
    const of = await shelf([...kept, { kind: 'pack', name: 'A' }]);
    const first = await list(of, { kind: 'pack', limit: '2' });
    expect(names(first)).toEqual(['A', 'B']);
    await server.core.db
      .updateTable('libraryItems')
      .set({ archivedAt: 1 })
      .where(
        'id',
        'in',
        first.items.map(({ id }) => id),
      )
      .execute();
    const rest = await list(of, { kind: 'pack', limit: '10', cursor: first.nextCursor ?? '' });
    expect(names(rest)).toEqual(['D', 'F', 'H']);
  });

  it('start at cursors of this list in this order only', async () => {
    const of = await shelf(['A', 'B', 'C'].map((name) => ({ kind: 'pack', name })));
    const { nextCursor } = await list(of, { limit: '1' });
    const cursor = nextCursor ?? '';
    const encoded = (value: unknown) => Buffer.from(JSON.stringify(value)).toString('base64url');
    const wrong: Record<string, string>[] = [
      { cursor, sort: 'kind' },
      { cursor, order: 'desc' },
      ...['', 'x', 'MTI', encoded(null), encoded({}), encoded(['library by name', 'asc', 'a'])].map((one) => ({
        cursor: one,
      })),
      { cursor: encoded(['library by name', 'asc', null, 'a']) },
      { cursor: 'x'.repeat(4001) },
    ];
    for (const query of wrong) {
      const answer = await of.reader.call(library.listLibrary, { params: of.params, query });
      expect(answer.body, JSON.stringify(query)).toMatchObject({ status: 422, errors: [{ path: 'query.cursor' }] });
    }
    expect((await list(of, { limit: '1', cursor })).items).toHaveLength(1);
  });
});
