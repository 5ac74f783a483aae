import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { LibraryKind } from '../contract/library.ts';
import { libraryEndpoints as library } from '../contract/library.ts';
import type { PartReference } from '../contract/study.ts';
import { exampleStudy, exampleTrip } from '../testing/example-study.ts';
import { StudyCalls } from '../testing/study-calls.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { makeWorld, type TestWorld } from '../testing/test-world.ts';

let server: TestServer;
let world: TestWorld;
let engineer: StudyCalls;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());
beforeEach(async () => {
  world = await makeWorld(server);
  engineer = new StudyCalls(await server.browserOf(world.people.engineer), world.workspaceId);
});

const warm = exampleStudy('vicuna-warm-arrival');
const trip = exampleTrip();

async function addItem(kind: LibraryKind, body: object, name = 'Taken'): Promise<string> {
  const call = {
    params: { workspaceId: world.workspaceId },
    body: { kind, name, body: body as Record<string, unknown> },
  };
  const answer = await engineer.browser.call(library.createLibraryItem, call);
  expect(answer.status).toBe(201);
  return answer.body.id as string;
}

async function reviseItem(itemId: string, revision: number, body: object, name = 'Taken'): Promise<void> {
  const answer = await engineer.browser.call(library.reviseLibraryItem, {
    params: { workspaceId: world.workspaceId, itemId },
    body: { name, notes: '', source: '', body: body as Record<string, unknown> },
    headers: { 'If-Match': `"r${revision}"` },
  });
  expect(answer.status).toBe(201);
}

const taken = (part: LibraryKind, itemId: string, revision = 1, keptAgainst: number | null = null): PartReference => ({
  part,
  itemId,
  revision,
  keptAgainst,
});

describe('references to the library', () => {
  it('stand in working copy and revision, with how the library stands to them now', async () => {
    const itemId = await addItem('thermal', warm.thermal, 'Two plates');
    const { status, body } = await engineer.create({ inputs: warm, parts: [taken('thermal', itemId)] });
    expect(status).toBe(201);
    const standing = {
      ...taken('thermal', itemId),
      itemName: 'Two plates',
      newestRevision: 1,
      isArchived: false,
      isChanged: false,
    };
    expect(body.working.parts).toEqual([standing]);
    await reviseItem(itemId, 1, { ...warm.thermal, pumpW: 95 }, 'Two plates, new pump');
    await engineer.browser.call(library.archiveLibraryItem, { params: { workspaceId: world.workspaceId, itemId } });
    const moved = { ...standing, itemName: 'Two plates, new pump', newestRevision: 2, isArchived: true };
    expect((await engineer.read(body.id as string)).body.working.parts).toEqual([moved]);
    expect((await engineer.revision(body.id as string, 1)).body.parts).toEqual([moved]);
  });

  it('tell whether the study says otherwise, whatever the order of keys, and with defaults filled in', async () => {
    const { pumpW: _pump, ...plain } = warm.thermal;
    const itemId = await addItem('thermal', plain);
    const changed = async (thermal: object) => {
      const { body } = await engineer.create({ inputs: { ...warm, thermal }, parts: [taken('thermal', itemId)] });
      return body.working.parts[0].isChanged as boolean;
    };
    expect(await changed(Object.fromEntries(Object.entries(plain).reverse()))).toBe(false);
    expect(await changed({ ...plain, pumpW: 0 })).toBe(false);
    expect(await changed({ ...plain, pumpW: 1 })).toBe(true);
  });

  it('of a route compare the legs of the trip', async () => {
    const itemId = await addItem('route', { legs: trip.trip.legs });
    const parts = [taken('route', itemId)];
    const same = (await engineer.create({ inputs: trip, parts })).body;
    expect(same.working.parts[0]).toMatchObject({ part: 'route', isChanged: false });
    const [leg] = trip.trip.legs;
    const slower = { ...trip, trip: { ...trip.trip, legs: [{ ...leg!, kmPerH: 70 }] } };
    const written = await engineer.write(same.id as string, 1, { inputs: slower, parts });
    expect(written.body.parts[0].isChanged).toBe(true);
    const later = { ...trip, trip: { ...trip.trip, startSoc: 0.7 } };
    expect((await engineer.write(same.id as string, 2, { inputs: later, parts })).body.parts[0].isChanged).toBe(false);
  });

  it('are content: another revision taken makes the working copy changed, one looked at and kept does not', async () => {
    const itemId = await addItem('thermal', warm.thermal);
    await reviseItem(itemId, 1, { ...warm.thermal, pumpW: 95 });
    const { body } = await engineer.create({ inputs: warm, parts: [taken('thermal', itemId)] });
    const id = body.id as string;
    const kept = await engineer.write(id, 1, { inputs: warm, parts: [taken('thermal', itemId, 1, 2)] });
    expect(kept.body).toMatchObject({ version: 2, isChanged: false, parts: [{ revision: 1, keptAgainst: 2 }] });
    expect((await engineer.save(id, 2)).body.code).toBe('UNCHANGED');
    const newer = { ...warm, thermal: { ...warm.thermal, pumpW: 95 } };
    const took = await engineer.write(id, 2, { inputs: newer, parts: [taken('thermal', itemId, 2)] });
    expect(took.body).toMatchObject({ version: 3, isChanged: true, parts: [{ revision: 2, isChanged: false }] });
    expect((await engineer.save(id, 3)).status).toBe(201);
    const dropped = await engineer.write(id, 3, { inputs: newer });
    expect(dropped.body).toMatchObject({ version: 4, isChanged: true, parts: [] });
    expect((await engineer.revision(id, 2)).body.parts).toMatchObject([{ itemId, revision: 2 }]);
  });

  it('are copied with a study, as the revision has them', async () => {
    const itemId = await addItem('thermal', warm.thermal);
    const { body } = await engineer.create({ inputs: warm, parts: [taken('thermal', itemId, 1, 4)] });
    await engineer.write(body.id as string, 1, { inputs: warm });
    const copy = (await engineer.copy(body.id as string)).body;
    expect(copy.working.parts).toMatchObject([taken('thermal', itemId, 1, 4)]);
    expect((await engineer.list({ itemId })).body.items).toMatchObject([{ id: copy.id as string }]);
  });

  it('are refused where the library or the study does not have it, and nothing is kept', async () => {
    const thermal = await addItem('thermal', warm.thermal, 'Two plates');
    const vehicle = await addItem('vehicle', trip.vehicle, 'Van');
    const elsewhere = new StudyCalls(await server.browserOf(world.people.outsider), world.outsiderWorkspaceId);
    const messageOf = async (calls: StudyCalls, reference: PartReference) => {
      const answers = [
        await calls.create({ inputs: warm, parts: [reference] }),
        await calls.write(calls === engineer ? world.study.id : elsewhereId, calls === engineer ? 2 : 1, {
          inputs: { ...warm, title: 'Late' },
          parts: [reference],
        }),
      ];
      for (const { body } of answers) {
        expect(body).toMatchObject({ status: 422, errors: [{ path: 'body.parts.0.itemId' }] });
      }
      return answers[0]!.body.errors[0].message as string;
    };
    const elsewhereId = (await elsewhere.create()).body.id as string;
    expect(await messageOf(engineer, taken('cell', thermal))).toBe(
      'Must be of kind cell, but Two plates is of kind thermal',
    );
    expect(await messageOf(engineer, taken('thermal', thermal, 2))).toBe('Two plates has revisions 1 to 1, but no 2');
    expect(await messageOf(engineer, taken('vehicle', vehicle))).toBe(
      'The study has no vehicle that could be taken from Van',
    );
    expect(await messageOf(engineer, taken('thermal', world.workspaceId))).toBe(
      `The library has no item ${world.workspaceId}`,
    );
    expect(await messageOf(elsewhere, taken('thermal', thermal))).toBe(`The library has no item ${thermal}`);
    expect((await engineer.list()).body.total).toBe(1);
    expect((await engineer.read(world.study.id)).body.working.version).toBe(2);
  });

  it('are one for each part at most', async () => {
    const itemId = await addItem('thermal', warm.thermal);
    const parts = [taken('thermal', itemId), taken('thermal', itemId)];
    const { body } = await engineer.create({ inputs: warm, parts });
    expect(body).toMatchObject({ status: 422, errors: [{ path: 'body.parts' }] });
  });
});
