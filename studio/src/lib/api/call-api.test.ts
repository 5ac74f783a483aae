import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { accountEndpoints } from '../../../../server/src/contract/account.ts';
import type { ProblemCode } from '../../../../server/src/contract/problem.ts';

/** A browser's locks: held by one at a time, whichever tab asks. */
class FakeLocks {
  private last: Promise<unknown> = Promise.resolve();
  request<T>(_name: string, work: () => Promise<T>): Promise<T> {
    const turn = this.last.then(work, work);
    this.last = turn.catch(() => undefined);
    return turn;
  }
}

const json = (status: number, body: unknown, headers = {}) =>
  new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/json', ...headers } });
const problem = (status: number, code: ProblemCode, headers = {}) =>
  json(status, { type: 'about:blank', title: '', status, detail: `It is ${code}.`, code, requestId: 'r' }, headers);
const patience = () => new Promise((resolve) => setTimeout(resolve, 5));

/** One server for all tabs: a refresh token that is spent while another refresh is under way ends the session. */
class FakeServer {
  refreshes = 0;
  isFresh = false;
  hasEnded = false;
  private refreshing = false;

  async answer(address: string): Promise<Response> {
    if (address.endsWith('/auth/refresh')) return this.refresh();
    const state = { ended: this.hasEnded, fresh: this.isFresh };
    await patience();
    if (state.ended) return problem(401, 'SESSION_ENDED');
    return state.fresh ? json(200, { person: { name: 'Inés' }, workspaces: [] }) : problem(401, 'ACCESS_EXPIRED');
  }

  private async refresh(): Promise<Response> {
    this.refreshes += 1;
    if (this.refreshing) return problem(401, 'REFRESH_REUSED');
    this.refreshing = true;
    await patience();
    this.refreshing = false;
    this.isFresh = true;
    return new Response(null, { status: 204 });
  }
}

/** The modules as a tab of its own has them. */
async function openTab() {
  vi.resetModules();
  const { callApi } = await import('./call-api.ts');
  const { sessionEnd } = await import('./session-end.ts');
  return { callApi, sessionEnd };
}

let server: FakeServer;

beforeEach(() => {
  server = new FakeServer();
  vi.stubGlobal('fetch', (address: string) => server.answer(address));
  vi.stubGlobal('navigator', { locks: new FakeLocks() });
  vi.stubGlobal('document', { cookie: 'voltiplano_csrf=abc' });
});
afterEach(() => vi.unstubAllGlobals());

describe('callApi', () => {
  test('two tabs whose access has expired refresh once between them', async () => {
    const [one, other] = [await openTab(), await openTab()];
    const answers = await Promise.all([one, other, one].map(({ callApi }) => callApi(accountEndpoints.readMe)));
    expect(answers.map(({ person }) => person.name)).toEqual(['Inés', 'Inés', 'Inés']);
    expect(server.refreshes).toBe(1);
  });

  test('tells once the session has ended, of calls that need one only', async () => {
    const { callApi, sessionEnd } = await openTab();
    server.hasEnded = true;
    await expect(callApi(accountEndpoints.signInOptions)).rejects.toMatchObject({ code: 'SESSION_ENDED' });
    expect(sessionEnd.get()).toBe(false);
    await expect(callApi(accountEndpoints.readMe)).rejects.toMatchObject({ code: 'SESSION_ENDED' });
    expect(sessionEnd.get()).toBe(true);
  });

  test('an answer that is not the server’s counts as none', async () => {
    const { callApi } = await openTab();
    vi.stubGlobal('fetch', () => Promise.resolve(new Response('<html>', { status: 502 })));
    await expect(callApi(accountEndpoints.readMe)).rejects.toMatchObject({ name: 'Unreachable' });
  });

  test('takes an answer without a body where the contract has none, and nowhere else', async () => {
    const { callApi } = await openTab();
    vi.stubGlobal('fetch', () => Promise.resolve(new Response(null, { status: 202 })));
    expect(await callApi(accountEndpoints.askReset, { body: { email: 'ines@puna.example' } })).toBeUndefined();
    await expect(callApi(accountEndpoints.readMe)).rejects.toMatchObject({ name: 'Unreachable' });
    vi.stubGlobal('fetch', () => Promise.resolve(new Response('<html>', { status: 200 })));
    await expect(callApi(accountEndpoints.signOut)).rejects.toMatchObject({ name: 'Unreachable' });
  });

  test('too many tries say how long to wait', async () => {
    const { callApi } = await openTab();
    const { problemSentence } = await import('./api-problem.ts');
    vi.stubGlobal('fetch', () => Promise.resolve(problem(429, 'TOO_MANY_REQUESTS', { 'retry-after': '610' })));
    const error: unknown = await callApi(accountEndpoints.signInOptions).catch((reason: unknown) => reason);
    expect(problemSentence(error)).toBe('Too many tries. Try again in 11 min.');
  });
});
