import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import type { WorkingCopy } from '../../../../../server/src/contract/study.ts';
import { ApiProblem, Unreachable } from '../../../lib/api/api-problem.ts';
import type { HeldEdits } from './held-edits.ts';
import { openedDesk } from './opened-desk.ts';
import { sampleStudy } from './sample-study.ts';
import { contentBody, contentMark, contentOfWorking, type Content } from './working-content.ts';
import { WorkingCopySaver } from './working-copy-saver.ts';

const content = (currentMaxA: number): Content => ({
  draft: { study: { ...sampleStudy, station: { ...sampleStudy.station, currentMaxA } }, pending: {} },
  references: [],
});
const currentOf = (copy: { inputs: unknown }) => (copy.inputs as typeof sampleStudy).station.currentMaxA;

const problem = (code: 'EDIT_CONFLICT' | 'NOT_SIGNED_IN' | 'ARCHIVED', status: number) =>
  new ApiProblem({ type: 'about:blank', title: code, status, detail: `${code}.`, code, requestId: 'r' });

const signedOut = problem('NOT_SIGNED_IN', 401);

/** A server with one working copy that keeps to its versions, and a connection that can be slow, cut, or lose answers. */
function fakeServer() {
  let copy = { ...copyOf(content(500), 5, 'Inés Quispe') };
  const server = {
    latencyMs: 100,
    isCut: false,
    losesAnswers: false,
    refuses: null as Error | null,
    writes: [] as number[],
    get copy() {
      return copy;
    },
    changeBy(name: string, current: number) {
      copy = copyOf(content(current), copy.version + 1, name);
    },
    async write(sent: Content, version: number): Promise<WorkingCopy> {
      await server.reach();
      if (server.refuses) throw server.refuses;
      if (version !== copy.version) throw problem('EDIT_CONFLICT', 412);
      copy = copyOf(sent, version + 1, 'Inés Quispe');
      server.writes.push(currentOf(copy));
      if (server.losesAnswers) throw new Unreachable('No answer');
      return copy;
    },
    async read(): Promise<WorkingCopy> {
      await server.reach();
      return copy;
    },
    async reach() {
      if (server.isCut) throw new Unreachable('No answer');
      await new Promise((resolve) => setTimeout(resolve, server.latencyMs));
    },
  };
  return server;
}

function copyOf(sent: Content, version: number, name: string): WorkingCopy {
  const { inputs, pending } = JSON.parse(JSON.stringify(contentBody(sent))) as ReturnType<typeof contentBody>;
  const at = '2026-11-02T10:00:00.000Z';
  return { version, inputs, pending, parts: [], changedAt: at, changedBy: { id: 'p', name }, isChanged: true };
}

/** A tab with its saver; what it holds in the browser outlives it. */
function openTab(server: ReturnType<typeof fakeServer>, held: { edits: HeldEdits | null } = { edits: null }) {
  const own = held.edits ? { tabId: 't', edits: held.edits, desk: null } : null;
  const opened = openedDesk(server.copy, own, []);
  const { draft, references } = opened.desk.sheet;
  const saver = new WorkingCopySaver({ draft, references }, opened.base, opened.attempts, opened.conflict, {
    write: (sent, version) => server.write(sent, version),
    read: () => server.read(),
    isSignedOut: (error) => error === signedOut,
    hold: (edits) => {
      // As through the browser's storage: nothing held is shared with the page.
      held.edits = JSON.parse(JSON.stringify(edits)) as HeldEdits;
      return true;
    },
  });
  return { saver, held, opened, phase: () => saver.get().phase.kind };
}

beforeEach(() => vi.useFakeTimers());
afterEach(() => vi.useRealTimers());
const pass = (ms: number) => vi.advanceTimersByTimeAsync(ms);

test('a change is held in the browser at once and sent when the hand rests, the newest content only', async () => {
  const server = fakeServer();
  const { saver, held, phase } = openTab(server);
  saver.changed(content(400));
  await pass(60);
  expect(held.edits).toMatchObject({ isSent: false, version: 5 });
  saver.changed(content(401));
  expect(phase()).toBe('saving');
  await pass(1000);
  expect(server.writes).toEqual([401]);
  expect(phase()).toBe('kept');
  expect(held.edits).toMatchObject({ isSent: true, version: 6 });
});

test('a hand that never rests is saved every few seconds', async () => {
  const server = fakeServer();
  const { saver } = openTab(server);
  for (let i = 0; i < 60; i++) {
    saver.changed(content(300 + i));
    await pass(200);
  }
  expect(server.writes.length).toBeGreaterThanOrEqual(2);
});

test('what is changed while an answer is slow goes with the next call, one call at a time', async () => {
  const server = fakeServer();
  server.latencyMs = 4000;
  const { saver, phase } = openTab(server);
  saver.changed(content(400));
  await pass(700);
  saver.changed(content(410));
  saver.changed(content(420));
  await pass(3000);
  expect(server.writes).toEqual([]);
  await pass(20_000);
  expect(server.writes).toEqual([400, 420]);
  expect(server.copy.version).toBe(7);
  expect(phase()).toBe('kept');
});

test('a change taken back before it is sent sends nothing', async () => {
  const server = fakeServer();
  const { saver, phase } = openTab(server);
  saver.changed(content(400));
  saver.changed(content(500));
  await pass(2000);
  expect(server.writes).toEqual([]);
  expect(phase()).toBe('kept');
});

test('without a connection it tries again less and less often, and at once when told that it is back', async () => {
  const server = fakeServer();
  server.isCut = true;
  const { saver, phase } = openTab(server);
  saver.changed(content(400));
  await pass(700);
  expect(phase()).toBe('offline');
  saver.changed(content(402));
  await pass(30_000);
  expect(phase()).toBe('offline');
  server.isCut = false;
  saver.retry();
  await pass(200);
  expect(server.writes).toEqual([402]);
  expect(phase()).toBe('kept');
});

test('without being told, the connection is found again by itself', async () => {
  const server = fakeServer();
  server.isCut = true;
  const { saver, phase } = openTab(server);
  saver.changed(content(400));
  await pass(10_000);
  server.isCut = false;
  await pass(60_000);
  expect(server.writes).toEqual([400]);
  expect(phase()).toBe('kept');
});

test('an own write whose answer was lost is no conflict', async () => {
  const server = fakeServer();
  server.losesAnswers = true;
  const { saver, phase } = openTab(server);
  saver.changed(content(400));
  await pass(800);
  expect(phase()).toBe('offline');
  server.losesAnswers = false;
  saver.changed(content(410));
  await pass(10_000);
  expect(server.writes).toEqual([400, 410]);
  expect(phase()).toBe('kept');
});

test('a crash between the server’s write and the browser’s: the next page takes the write for its own', async () => {
  const server = fakeServer();
  server.losesAnswers = true;
  const first = openTab(server);
  first.saver.changed(content(400));
  await pass(650);
  // The page dies while the call is under way; afterwards the server has 400 and the browser holds 410.
  first.saver.changed(content(410));
  await pass(60);
  const held = { edits: JSON.parse(JSON.stringify(first.held.edits)) as HeldEdits };
  await pass(100);
  expect(currentOf(server.copy)).toBe(400);
  server.losesAnswers = false;
  const second = openTab(server, held);
  expect(second.opened.conflict).toBeNull();
  await pass(1000);
  expect(currentOf(server.copy)).toBe(410);
  expect(second.phase()).toBe('kept');
});

test('edits that a dead page held and never sent are sent by the next', async () => {
  const server = fakeServer();
  server.isCut = true;
  const first = openTab(server);
  first.saver.changed(content(390));
  await pass(100);
  first.saver.stop();
  server.isCut = false;
  const second = openTab(server, first.held);
  expect(second.opened.desk.sheet.draft.study.station.currentMaxA).toBe(390);
  await pass(1000);
  expect(server.writes).toEqual([390]);
});

describe('when somebody else was first', () => {
  async function conflicting() {
    const server = fakeServer();
    const tab = openTab(server);
    server.changeBy('Mateo Condori', 450);
    tab.saver.changed(content(400));
    await pass(2000);
    return { server, ...tab };
  }

  test('nothing is sent until somebody chooses, and what is typed meanwhile is held', async () => {
    const { server, saver, held, phase } = await conflicting();
    expect(phase()).toBe('conflict');
    saver.changed(content(401));
    await pass(120_000);
    expect(server.writes).toEqual([]);
    expect(currentOf(server.copy)).toBe(450);
    expect(currentOf({ inputs: held.edits?.content.draft.study })).toBe(401);
  });

  test('mine is written over the version that was shown', async () => {
    const { server, saver, phase } = await conflicting();
    saver.took(server.copy);
    await pass(1000);
    expect(server.writes).toEqual([400]);
    expect(server.copy.version).toBe(7);
    expect(phase()).toBe('kept');
  });

  test('mine is not written over a version that came after the one that was shown', async () => {
    const { server, saver, phase } = await conflicting();
    const shown = server.copy;
    server.changeBy('Mateo Condori', 460);
    saver.took(shown);
    await pass(1000);
    expect(phase()).toBe('conflict');
    expect(currentOf(server.copy)).toBe(460);
  });

  test('theirs on the desk is kept and nothing is sent', async () => {
    const { server, saver, phase } = await conflicting();
    saver.changed(contentOfWorking(server.copy));
    saver.took(server.copy);
    expect(phase()).toBe('kept');
    await pass(10_000);
    expect(server.writes).toEqual([]);
  });

  test('a reload comes back to the same choice', async () => {
    const { server, saver, held } = await conflicting();
    saver.stop();
    const again = openTab(server, held);
    expect(again.phase()).toBe('conflict');
    expect(again.opened.desk.sheet.draft.study.station.currentMaxA).toBe(400);
    await pass(10_000);
    expect(server.writes).toEqual([]);
  });

  test('the same change made by both is no conflict', async () => {
    const server = fakeServer();
    const { saver, phase } = openTab(server);
    server.changeBy('Mateo Condori', 400);
    saver.changed(content(400));
    await pass(1000);
    expect(phase()).toBe('kept');
  });
});

test('two tabs: the second to write meets the first’s version, neither is lost', async () => {
  const server = fakeServer();
  const one = openTab(server);
  const other = openTab(server);
  one.saver.changed(content(410));
  other.saver.changed(content(420));
  await pass(1000);
  expect([one.phase(), other.phase()].toSorted()).toEqual(['conflict', 'kept']);
  expect(server.writes).toHaveLength(1);
});

test('heard gives a newer copy only where nothing here is unsent, and never an older one', async () => {
  const server = fakeServer();
  const { saver } = openTab(server);
  const old = server.copy;
  server.changeBy('Mateo Condori', 450);
  expect(saver.heard(server.copy)).toBe(server.copy);
  expect(saver.heard(old)).toBeNull();
  saver.changed(content(400));
  expect(saver.heard(server.copy)).toBeNull();
  await pass(1);
});

test('a session that ended is waited for; after signing in saving goes on', async () => {
  const server = fakeServer();
  server.refuses = signedOut;
  const { saver, phase } = openTab(server);
  saver.changed(content(400));
  await pass(700);
  expect(phase()).toBe('signed-out');
  saver.changed(content(401));
  await pass(120_000);
  expect(phase()).toBe('signed-out');
  server.refuses = null;
  saver.retry();
  await pass(200);
  expect(server.writes).toEqual([401]);
});

test('what the server refuses is said in its words and held; the next change tries again', async () => {
  const server = fakeServer();
  server.refuses = problem('ARCHIVED', 409);
  const { saver, held } = openTab(server);
  saver.changed(content(400));
  await pass(60_000);
  expect(saver.get().phase).toEqual({ kind: 'refused', why: 'ARCHIVED.' });
  expect(held.edits?.isSent).toBe(false);
  server.refuses = null;
  saver.changed(content(401));
  await pass(1000);
  expect(server.writes).toEqual([401]);
});

test('alone waits for unsent changes, then runs with their version and holds others back', async () => {
  const server = fakeServer();
  const { saver, phase } = openTab(server);
  saver.changed(content(400));
  const saved = saver.alone(async (version) => {
    expect(server.writes).toEqual([400]);
    expect(version).toBe(6);
    await new Promise((resolve) => setTimeout(resolve, 5000));
    return { working: server.copy };
  });
  await pass(2000);
  saver.changed(content(410));
  await pass(2000);
  expect(server.writes).toEqual([400]);
  await pass(10_000);
  await saved;
  expect(server.writes).toEqual([400, 410]);
  expect(phase()).toBe('kept');
});

test('alone refuses in words while nothing can be saved', async () => {
  const server = fakeServer();
  server.isCut = true;
  const { saver } = openTab(server);
  saver.changed(content(400));
  await pass(700);
  const call = vi.fn();
  const refused = expect(saver.alone(call)).rejects.toThrow(/no connection.*held in this browser/i);
  await pass(200);
  await refused;
  expect(call).not.toHaveBeenCalled();
});

test('a browser that refuses to hold is said', async () => {
  const server = fakeServer();
  const saver = new WorkingCopySaver(content(500), { version: 5, mark: contentMark(content(500)) }, [], null, {
    write: (sent, version) => server.write(sent, version),
    read: () => server.read(),
    isSignedOut: () => false,
    hold: () => false,
  });
  saver.changed(content(400));
  await pass(60);
  expect(saver.get().isHeld).toBe(false);
  await pass(1000);
  expect(server.writes).toEqual([400]);
});
