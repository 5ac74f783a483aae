import { QueryClient } from '@tanstack/react-query';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import type { Me } from '../../../../server/src/contract/account.ts';
import { sessionEnd } from '../api/session-end.ts';
import { meQuery, setMe, setSignedOut } from './me-query.ts';

const { readMe } = vi.hoisted(() => ({ readMe: vi.fn<() => Promise<Me | null>>() }));
vi.mock('./read-me.ts', () => ({ readMe }));

const me = (id: string): Me => ({
  person: { id, email: `${id}@puna.example`, name: id, hasPassword: true },
  workspaces: [],
});
const page = { cookie: '' };
let client: QueryClient;

beforeEach(() => {
  client = new QueryClient();
  readMe.mockReset();
  page.cookie = 'voltiplano_csrf=abc';
  vi.stubGlobal('document', page);
  sessionEnd.resume();
});
afterEach(() => vi.unstubAllGlobals());

test('meQuery asks nothing for a guest', async () => {
  page.cookie = '';
  expect(await client.fetchQuery(meQuery)).toBeNull();
  expect(readMe).not.toHaveBeenCalled();
});

test('meQuery takes a session that had ended before the page opened for none, and asks no more', async () => {
  readMe.mockResolvedValue(null);
  expect(await client.fetchQuery(meQuery)).toBeNull();
  expect(sessionEnd.get()).toBe(false);
  expect(page.cookie).toMatch(/Max-Age=0/);
});

test('meQuery keeps the person whose session ends under the page, and tells', async () => {
  setMe(client, me('ines'));
  readMe.mockResolvedValue(null);
  expect((await client.fetchQuery(meQuery))?.person.id).toBe('ines');
  expect(sessionEnd.get()).toBe(true);
});

test('meQuery does not hand the page to another person who signed in in another tab', async () => {
  setMe(client, me('ines'));
  readMe.mockResolvedValue(me('rosa'));
  expect((await client.fetchQuery(meQuery))?.person.id).toBe('ines');
  expect(sessionEnd.get()).toBe(true);
  readMe.mockResolvedValue(me('ines'));
  await client.fetchQuery(meQuery);
  expect(sessionEnd.get()).toBe(false);
});

test('setMe and setSignedOut leave nothing of the person before', () => {
  setMe(client, me('ines'));
  client.setQueryData(['w', 'a', 'members'], { items: [] });
  setMe(client, me('ines'));
  expect(client.getQueryData(['w', 'a', 'members'])).toBeDefined();
  setMe(client, me('rosa'));
  expect(client.getQueryData(['w', 'a', 'members'])).toBeUndefined();
  client.setQueryData(['w', 'a', 'members'], { items: [] });
  setSignedOut(client);
  expect(client.getQueryData(['w', 'a', 'members'])).toBeUndefined();
  expect(client.getQueryData(meQuery.queryKey)).toBeNull();
});
