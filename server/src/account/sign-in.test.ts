import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { accountEndpoints as account, type Device } from '../contract/account.ts';
import type { Problem } from '../contract/problem.ts';
import { type TestServer, startTestServer, tokenIn } from '../testing/test-server.ts';

const MINUTE_MS = 60_000;
const DAY_MS = 24 * 60 * MINUTE_MS;
const PASSWORD = 'a windy plateau';

let server: TestServer;
let serial = 0;

beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());

async function newPerson() {
  serial += 1;
  const email = `person-${serial}@puna.example`;
  const browser = server.browser();
  const name = `Person ${serial}`;
  const answer = await browser.call(account.signUp, {
    body: { email, name, password: PASSWORD, workspaceName: 'Puna' },
  });
  return { email, browser, answer };
}

describe('sign-up', () => {
  it('makes an account that owns a workspace, and signs in', async () => {
    const { email, browser, answer } = await newPerson();
    expect(answer.status).toBe(201);
    expect(answer.body.person).toMatchObject({ email, hasPassword: true });
    expect(answer.body.workspaces).toEqual([
      { workspaceId: expect.stringMatching(/^[0-9a-z]{26}$/), workspaceName: 'Puna', role: 'owner' },
    ]);
    const me = await browser.call(account.readMe);
    expect(me.body).toEqual(answer.body);
  });

  it('gives cookies that scripts cannot read and other sites cannot send', async () => {
    const { answer } = await newPerson();
    const [access, refresh, csrf] = answer.setCookies;
    expect(access).toMatch(/^voltiplano_access=.*; Path=\/api; .*HttpOnly; SameSite=Lax/);
    expect(refresh).toMatch(/^voltiplano_refresh=.*; Path=\/api\/v1\/auth; .*HttpOnly; SameSite=Strict/);
    expect(csrf).toMatch(/^voltiplano_csrf=.*; Path=\/; .*SameSite=Strict/);
    expect(csrf).not.toContain('HttpOnly');
  });

  it('stores the password as Argon2id and secrets as hashes only', async () => {
    const { email, browser } = await newPerson();
    const row = await server.core.db
      .selectFrom('people')
      .selectAll()
      .where('email', '=', email)
      .executeTakeFirstOrThrow();
    expect(row.passwordHash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    const tokens = await server.core.db.selectFrom('refreshTokens').select('tokenHash').execute();
    expect(tokens.map(({ tokenHash }) => tokenHash)).not.toContain(browser.cookies.get('voltiplano_refresh'));
  });

  it('refuses an e-mail that is taken, in whatever case', async () => {
    const { email } = await newPerson();
    const body = { email: email.toUpperCase(), name: 'Other', password: PASSWORD, workspaceName: 'X' };
    const answer = await server.browser().call(account.signUp, { body });
    expect(answer.body).toMatchObject({ status: 409, code: 'EMAIL_TAKEN' });
  });

  it('names every wrong field', async () => {
    const body = { email: 'nobody', name: ' ', password: 'short', workspaceName: 'X' };
    const answer = await server.browser().call(account.signUp, { body });
    expect(answer.status).toBe(422);
    expect((answer.body as Problem).errors?.map(({ path }) => path)).toEqual([
      'body.email',
      'body.name',
      'body.password',
    ]);
  });
});

describe('sign-in', () => {
  it('takes the right password, and says no more than that they do not fit', async () => {
    const { email } = await newPerson();
    const right = await server
      .browser()
      .call(account.signIn, { body: { email: email.toUpperCase(), password: PASSWORD } });
    expect(right.status).toBe(200);
    const wrong = await server.browser().call(account.signIn, { body: { email, password: 'another one' } });
    const nobody = await server
      .browser()
      .call(account.signIn, { body: { email: 'no@one.example', password: PASSWORD } });
    for (const answer of [wrong, nobody]) {
      expect(answer.body).toMatchObject({ status: 401, code: 'WRONG_CREDENTIALS' });
      expect(answer.setCookies).toEqual([]);
    }
    expect(wrong.body.detail).toBe(nobody.body.detail);
  });

  it('writes neither password nor token into the log', async () => {
    const { browser } = await newPerson();
    await browser.call(account.refresh);
    const log = server.logged.join('');
    expect(log).toContain('/api/v1/auth/refresh');
    for (const secret of [PASSWORD, ...browser.cookies.values()]) expect(log).not.toContain(secret);
  });
});

describe('refresh', () => {
  it('turns an expired access token into a new one', async () => {
    const { browser } = await newPerson();
    server.clock.now += 11 * MINUTE_MS;
    expect((await browser.call(account.readMe)).body).toMatchObject({ status: 401, code: 'ACCESS_EXPIRED' });
    const before = browser.cookies.get('voltiplano_refresh');
    expect((await browser.call(account.refresh)).status).toBe(204);
    expect(browser.cookies.get('voltiplano_refresh')).not.toBe(before);
    expect((await browser.call(account.readMe)).status).toBe(200);
  });

  it('ends the whole family when a spent token comes back, also for who has the newest', async () => {
    const { browser } = await newPerson();
    const thief = server.browser();
    thief.cookies.set('voltiplano_refresh', browser.cookies.get('voltiplano_refresh') ?? '');
    await browser.call(account.refresh);
    expect((await thief.call(account.refresh)).body).toMatchObject({ status: 401, code: 'REFRESH_REUSED' });
    expect((await browser.call(account.readMe)).body).toMatchObject({ status: 401, code: 'SESSION_ENDED' });
    expect((await browser.call(account.refresh)).body).toMatchObject({ status: 401, code: 'SESSION_ENDED' });
  });

  it('leaves the other devices of the person alone when one family ends', async () => {
    const { email, browser } = await newPerson();
    const second = server.browser();
    await second.call(account.signIn, { body: { email, password: PASSWORD } });
    const spent = browser.cookies.get('voltiplano_refresh') ?? '';
    await browser.call(account.refresh);
    browser.cookies.set('voltiplano_refresh', spent);
    await browser.call(account.refresh);
    expect((await second.call(account.readMe)).status).toBe(200);
  });

  it('lets one of two exchanges at the same moment win, not both', async () => {
    const { browser } = await newPerson();
    const twin = server.browser();
    twin.cookies.set('voltiplano_refresh', browser.cookies.get('voltiplano_refresh') ?? '');
    const answers = await Promise.all([browser.call(account.refresh), twin.call(account.refresh)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([204, 401]);
  });

  it('ends after 30 days without use', async () => {
    const { browser } = await newPerson();
    server.clock.now += 31 * DAY_MS;
    expect((await browser.call(account.refresh)).body).toMatchObject({ status: 401, code: 'SESSION_ENDED' });
  });

  it('remembers spent tokens for 30 days and no longer', async () => {
    const { answer, browser } = await newPerson();
    const spentTokens = async () => {
      const rows = server.core.db.selectFrom('refreshTokens').innerJoin('sessions', 'sessions.id', 'sessionId');
      const own = rows.where('personId', '=', String(answer.body.person.id)).where('spentAt', 'is not', null);
      return (await own.select('tokenHash').execute()).length;
    };
    await browser.call(account.refresh);
    server.clock.now += 29 * DAY_MS;
    await browser.call(account.refresh);
    expect(await spentTokens()).toBe(2);
    server.clock.now += 2 * DAY_MS;
    await browser.call(account.refresh);
    expect(await spentTokens()).toBe(2);
    expect((await browser.call(account.readMe)).status).toBe(200);
  });

  it('refuses who has no token, and one it never gave', async () => {
    const browser = server.browser();
    expect((await browser.call(account.refresh)).body).toMatchObject({ status: 401, code: 'NOT_SIGNED_IN' });
    browser.cookies.set('voltiplano_refresh', 'made-up');
    expect((await browser.call(account.refresh)).body).toMatchObject({ status: 401, code: 'NOT_SIGNED_IN' });
  });
});

describe('an access token', () => {
  it('is refused when its signature or algorithm was tampered with', async () => {
    const { browser } = await newPerson();
    const [head = '', claims = '', signature = ''] = (browser.cookies.get('voltiplano_access') ?? '').split('.');
    const none = Buffer.from('{"alg":"none"}').toString('base64url');
    const turned = signature.startsWith('A') ? `B${signature.slice(1)}` : `A${signature.slice(1)}`;
    for (const forged of [`${head}.${claims}.${turned}`, `${none}.${claims}.`, 'nonsense']) {
      browser.cookies.set('voltiplano_access', forged);
      expect((await browser.call(account.readMe)).body).toMatchObject({ status: 401, code: 'NOT_SIGNED_IN' });
    }
  });
});

describe('requests from other sites', () => {
  it('are refused by their Origin, also before anybody is signed in', async () => {
    const headers = { Origin: 'https://elsewhere.example' };
    const body = { email: 'a@b.example', password: PASSWORD };
    const answer = await server.browser().call(account.signIn, { body, headers });
    expect(answer.body).toMatchObject({ status: 403, code: 'ORIGIN_REFUSED' });
    const { browser } = await newPerson();
    expect((await browser.call(account.signOutEverywhere, { headers })).body).toMatchObject({ code: 'ORIGIN_REFUSED' });
    expect((await browser.call(account.readMe)).status).toBe(200);
  });

  it.each([{ 'X-CSRF-Token': '' }, { 'X-CSRF-Token': 'guessed' }])(
    'are refused without the token: %j',
    async (headers) => {
      const { browser } = await newPerson();
      const answer = await browser.call(account.renameMe, { body: { name: 'Mallory' }, headers });
      expect(answer.body).toMatchObject({ status: 403, code: 'CSRF_REFUSED' });
    },
  );

  it("are refused with another session's token", async () => {
    const [one, two] = [await newPerson(), await newPerson()];
    const headers = { 'X-CSRF-Token': two.browser.cookies.get('voltiplano_csrf') ?? '' };
    const answer = await one.browser.call(account.renameMe, { body: { name: 'Mallory' }, headers });
    expect(answer.body).toMatchObject({ status: 403, code: 'CSRF_REFUSED' });
  });
});

describe('sign-out', () => {
  it('ends the session on the server and takes the cookies', async () => {
    const { browser } = await newPerson();
    const access = browser.cookies.get('voltiplano_access') ?? '';
    expect((await browser.call(account.signOut)).status).toBe(204);
    expect(browser.cookies.size).toBe(0);
    browser.cookies.set('voltiplano_access', access);
    expect((await browser.call(account.readMe)).body).toMatchObject({ code: 'SESSION_ENDED' });
  });
});

describe('password reset', () => {
  it('mails a link that works once, signs every device out and takes the new password', async () => {
    const { email, browser } = await newPerson();
    expect((await server.browser().call(account.askReset, { body: { email } })).status).toBe(202);
    const token = tokenIn(await server.mailTo(email));
    const body = { token, password: 'another plateau' };
    expect((await server.browser().call(account.resetPassword, { body })).status).toBe(204);
    expect((await browser.call(account.readMe)).body).toMatchObject({ code: 'SESSION_ENDED' });
    const signIn = await server.browser().call(account.signIn, { body: { email, password: 'another plateau' } });
    expect(signIn.status).toBe(200);
    expect((await server.browser().call(account.signIn, { body: { email, password: PASSWORD } })).status).toBe(401);
    expect((await server.browser().call(account.resetPassword, { body })).body).toMatchObject({ code: 'LINK_INVALID' });
  });

  it('answers the same for an unknown e-mail and mails nobody', async () => {
    const email = 'nobody@puna.example';
    const answer = await server.browser().call(account.askReset, { body: { email } });
    expect(answer.status).toBe(202);
    expect(await server.core.db.selectFrom('outbox').select('id').where('recipient', '=', email).execute()).toEqual([]);
  });

  it('ends after an hour, and when a newer link is asked for', async () => {
    const { email } = await newPerson();
    await server.browser().call(account.askReset, { body: { email } });
    const first = tokenIn(await server.mailTo(email));
    server.clock.now += 61 * MINUTE_MS;
    const late = await server.browser().call(account.resetPassword, { body: { token: first, password: PASSWORD } });
    expect(late.body).toMatchObject({ status: 410, code: 'LINK_INVALID' });
  });
});

describe('e-mail change', () => {
  it('takes the new address only by the link mailed there, and tells the old one', async () => {
    const { email, browser } = await newPerson();
    const newEmail = `new-${email}`;
    const asked = await browser.call(account.askEmailChange, { body: { newEmail, password: PASSWORD } });
    expect(asked.status).toBe(202);
    expect((await browser.call(account.readMe)).body.person.email).toBe(email);
    const token = tokenIn(await server.mailTo(newEmail));
    expect((await server.browser().call(account.confirmEmail, { body: { token } })).status).toBe(204);
    expect((await browser.call(account.readMe)).body.person.email).toBe(newEmail);
    expect((await server.mailTo(email)).text).toContain(newEmail);
  });

  it('needs the password, and an address that is free', async () => {
    const [one, two] = [await newPerson(), await newPerson()];
    const wrong = await one.browser.call(account.askEmailChange, {
      body: { newEmail: 'x@y.example', password: 'wrong' },
    });
    expect(wrong.body).toMatchObject({ status: 403, code: 'WRONG_PASSWORD' });
    const taken = await one.browser.call(account.askEmailChange, { body: { newEmail: two.email, password: PASSWORD } });
    expect(taken.body).toMatchObject({ status: 409, code: 'EMAIL_TAKEN' });
  });

  it('does not take a reset link for a change, nor the other way round', async () => {
    const { email } = await newPerson();
    await server.browser().call(account.askReset, { body: { email } });
    const token = tokenIn(await server.mailTo(email));
    expect((await server.browser().call(account.confirmEmail, { body: { token } })).body).toMatchObject({
      code: 'LINK_INVALID',
    });
  });
});

describe('devices', () => {
  it('are listed, and signed out one by one or all at once', async () => {
    const { email, browser } = await newPerson();
    const second = server.browser();
    await second.call(account.signIn, { body: { email, password: PASSWORD } });
    const { items } = (await browser.call(account.listDevices)).body as { items: Device[] };
    expect(items.map(({ isThisOne }) => isThisOne).sort()).toEqual([false, true]);
    const params = { deviceId: items.find(({ isThisOne }) => !isThisOne)?.id ?? '' };
    expect((await browser.call(account.signOutDevice, { params })).status).toBe(204);
    expect((await second.call(account.readMe)).body).toMatchObject({ code: 'SESSION_ENDED' });
    expect((await browser.call(account.signOutDevice, { params })).status).toBe(404);
    expect((await browser.call(account.signOutEverywhere)).status).toBe(204);
    expect(browser.cookies.size).toBe(0);
  });

  it('of another person cannot be signed out', async () => {
    const [one, two] = [await newPerson(), await newPerson()];
    const [device] = (await two.browser.call(account.listDevices)).body.items;
    expect((await one.browser.call(account.signOutDevice, { params: { deviceId: device.id } })).status).toBe(404);
    expect((await two.browser.call(account.readMe)).status).toBe(200);
  });

  it('other than this one are signed out by a new password', async () => {
    const { email, browser } = await newPerson();
    const second = server.browser();
    await second.call(account.signIn, { body: { email, password: PASSWORD } });
    const body = { presentPassword: PASSWORD, newPassword: 'a third plateau' };
    expect((await browser.call(account.changePassword, { body })).status).toBe(204);
    expect((await browser.call(account.readMe)).status).toBe(200);
    expect((await second.call(account.readMe)).body).toMatchObject({ code: 'SESSION_ENDED' });
    expect((await browser.call(account.changePassword, { body })).body).toMatchObject({ code: 'WRONG_PASSWORD' });
  });
});
