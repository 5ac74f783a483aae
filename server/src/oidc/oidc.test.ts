import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accountEndpoints as account } from '../contract/account.ts';
import { insertPerson } from '../account/people-repository.ts';
import type { TestBrowser } from '../testing/test-browser.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { type LocalProvider, startLocalProvider } from './local-provider.ts';
import { providerClient } from './provider-client.ts';

let server: TestServer;
let local: LocalProvider | undefined;

beforeAll(async () => {
  server = await startTestServer({
    provider: (publicUrl) =>
      providerClient('local test provider', async () => {
        local = await startLocalProvider(`${publicUrl()}/api/v1/auth/oidc/callback`);
        return local.settings;
      }),
  });
});
afterAll(async () => {
  await server.close();
  await local?.close();
});

/** Goes to the provider, signs in there, and comes back as far as the callback's address. */
async function throughProvider(browser: TestBrowser, email: string, next?: string): Promise<URL> {
  const start = await browser.call(account.startProvider, { query: next ? { next } : {} });
  expect(start.status).toBe(302);
  const jar = new Map<string, string>();
  let address = start.headers.get('location') ?? '';
  for (let hop = 0; hop < 8 && !address.startsWith(server.address); hop += 1) {
    const isForm = new URL(address).pathname.startsWith('/interaction/');
    const response = await fetch(address, {
      redirect: 'manual',
      headers: { Cookie: [...jar].map(([name, value]) => `${name}=${value}`).join('; ') },
      ...(isForm && { method: 'POST', body: new URLSearchParams({ email, name: 'Ines Puna' }) }),
    });
    for (const line of response.headers.getSetCookie()) {
      const [, name = '', value = ''] = /^([^=]+)=([^;]*)/.exec(line) ?? [];
      jar.set(name, value);
    }
    address = new URL(response.headers.get('location') ?? '', address).href;
  }
  return new URL(address);
}

function comeBack(browser: TestBrowser, { searchParams }: URL) {
  return browser.call(account.finishProvider, { query: Object.fromEntries(searchParams) });
}

async function signInThrough(email: string, next?: string) {
  const browser = server.browser();
  const back = await comeBack(browser, await throughProvider(browser, email, next));
  return { browser, location: back.headers.get('location') };
}

describe('sign-in at the provider', () => {
  it('makes an account with a proven address at the first time, and finds it at the second', async () => {
    const first = await signInThrough('ines@puna.example', '/studies?kind=trip');
    expect(first.location).toBe('/studies?kind=trip');
    const me = (await first.browser.call(account.readMe)).body;
    expect(me).toMatchObject({
      person: { email: 'ines@puna.example', name: 'Ines Puna', hasPassword: false },
      workspaces: [],
    });
    const second = await signInThrough('ines@puna.example');
    expect(second.location).toBe('/');
    expect((await second.browser.call(account.readMe)).body.person.id).toBe(me.person.id);
  });

  it('opens an account that proved the same address', async () => {
    const person = { email: 'old@puna.example', name: 'Old', passwordHash: null, isEmailProven: true };
    const personId = await insertPerson(server.core, person);
    const { browser } = await signInThrough('old@puna.example');
    expect((await browser.call(account.readMe)).body.person.id).toBe(personId);
  });

  it('does not open an account that somebody may have made in another name', async () => {
    const person = { email: 'victim@puna.example', name: 'Mallory', passwordHash: null, isEmailProven: false };
    await insertPerson(server.core, person);
    const { browser, location } = await signInThrough('victim@puna.example');
    expect(location).toBe('/sign-in?problem=ACCOUNT_NOT_PROVEN');
    expect((await browser.call(account.readMe)).status).toBe(401);
  });

  it('does not finish in another browser than it began, nor twice', async () => {
    const browser = server.browser();
    const back = await throughProvider(browser, 'ines@puna.example');
    const other = await comeBack(server.browser(), back);
    expect(other.headers.get('location')).toBe('/sign-in?problem=PROVIDER_FAILED');
    const flow = new Map(browser.cookies);
    expect((await comeBack(browser, back)).headers.get('location')).toBe('/');
    const replay = server.browser();
    for (const [name, value] of flow) replay.cookies.set(name, value);
    expect((await comeBack(replay, back)).headers.get('location')).toBe('/sign-in?problem=PROVIDER_FAILED');
  });

  it('keeps the code and state of a sign-in out of the log', async () => {
    const browser = server.browser();
    const back = await throughProvider(browser, 'ines@puna.example');
    await comeBack(browser, back);
    const log = server.logged.join('');
    expect(log).toContain('/api/v1/auth/oidc/callback?…');
    for (const secret of [back.searchParams.get('code'), back.searchParams.get('state')]) {
      expect(secret).toMatch(/.{10,}/);
      expect(log).not.toContain(secret);
    }
  });

  it('leads back to the sign-in page when the provider is away', async () => {
    const away = await startTestServer({
      provider: () =>
        providerClient('away', () =>
          Promise.resolve({ issuer: 'http://127.0.0.1:9', clientId: 'a', clientSecret: 'b', name: 'away' }),
        ),
    });
    const answer = await away.browser().call(account.startProvider);
    expect(answer.headers.get('location')).toBe('/sign-in?problem=PROVIDER_FAILED');
    await away.close();
  });

  it('does not take the state of another sign-in', async () => {
    const browser = server.browser();
    const back = await throughProvider(browser, 'ines@puna.example');
    back.searchParams.set('state', 'another');
    expect((await comeBack(browser, back)).headers.get('location')).toBe('/sign-in?problem=PROVIDER_FAILED');
  });

  it.each(['https://elsewhere.example', '//elsewhere.example', '/\\elsewhere.example', 'studies'])(
    'does not lead on to %s',
    async (next) => {
      const answer = await server.browser().call(account.startProvider, { query: { next } });
      expect(answer.body).toMatchObject({ status: 422, errors: [{ path: 'query.next' }] });
    },
  );
});
