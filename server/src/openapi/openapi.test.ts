import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { endpoints } from '../contract/endpoints.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { checkAnswer } from '../testing/check-answer.ts';
import { mailboxEndpoints } from '../contract/mailbox.ts';
import { accountEndpoints } from '../contract/account.ts';

let server: TestServer;
beforeAll(async () => {
  server = await startTestServer();
});
afterAll(() => server.close());

describe('GET /api/v1/openapi.json', () => {
  it('describes every endpoint in OpenAPI 3.1, and every reference leads somewhere', async () => {
    const text = await (await fetch(`${server.address}/api/v1/openapi.json`)).text();
    const document = JSON.parse(text) as {
      openapi: string;
      paths: Record<string, Record<string, { operationId: string }>>;
      components: { schemas: object };
    };
    expect(document.openapi).toMatch(/^3\.1\./);
    const ids = Object.values(document.paths).flatMap((item) =>
      Object.values(item).map(({ operationId }) => operationId),
    );
    expect(ids.sort()).toEqual(endpoints.map(({ id }) => id).sort());
    const references = [...text.matchAll(/"#\/components\/schemas\/(\w+)"/g)].map(([, name]) => name ?? '');
    expect(references.length).toBeGreaterThan(50);
    for (const name of references) expect(document.components.schemas).toHaveProperty(name);
  });

  it('names the fields of a person, all of them required', async () => {
    const document = (await (await fetch(`${server.address}/api/v1/openapi.json`)).json()) as {
      components: { schemas: Record<string, unknown> };
    };
    expect(document.components.schemas.Person).toMatchObject({
      type: 'object',
      required: ['id', 'email', 'name', 'hasPassword'],
      additionalProperties: false,
    });
  });
});

describe('GET /api/docs', () => {
  it('shows every endpoint on a page without scripts', async () => {
    const response = await fetch(`${server.address}/api/docs`);
    const page = await response.text();
    expect(response.headers.get('content-type')).toContain('text/html');
    for (const { id } of endpoints) expect(page).toContain(`<article id="${id}">`);
    expect(page).not.toMatch(/<script|\son\w+=|undefined|\[object/);
    for (const [, name] of page.matchAll(/href="#(schema-\w+)"/g)) expect(page).toContain(`id="${name}"`);
  });
});

describe('GET /api/v1/dev/mailbox', () => {
  it('is a page for a browser, and shows what others wrote as text', async () => {
    await server.core.post.send(server.core.db, {
      to: 'a@b.example',
      subject: 'Hi <b>you</b>',
      text: 'https://x.example/#t "<i>"\n',
    });
    await server.mailTo('a@b.example');
    const page = await (
      await fetch(`${server.address}/api/v1/dev/mailbox`, { headers: { Accept: 'text/html' } })
    ).text();
    expect(page).toContain('Hi &lt;b&gt;you&lt;/b&gt;');
    expect(page).toContain('<a href="https://x.example/#t">https://x.example/#t</a>');
    expect(page).not.toContain('<i>');
  });
});

describe('GET /api/v1/dev/mailbox through a reverse proxy', () => {
  it.each(['X-Forwarded-For', 'Forwarded'])('answers that there is none: %s', async (header) => {
    const headers = { [header]: '192.0.2.7' };
    const answer = await server.browser().call(mailboxEndpoints.readMailbox, { headers });
    expect(answer.body).toMatchObject({ status: 404, code: 'NOT_FOUND' });
  });
});

describe('checkAnswer', () => {
  const ok = { contentType: 'application/json', status: 200 };
  const options = { provider: null, mailboxUrl: null };

  it('takes an answer as described, and none that differs from it', () => {
    const check = (answer: object) => () => {
      checkAnswer(accountEndpoints.signInOptions, { ...ok, text: JSON.stringify(options), ...answer });
    };
    expect(check({})).not.toThrow();
    expect(check({ text: JSON.stringify({ ...options, more: 1 }) })).toThrow('against its schema');
    expect(check({ text: '{"provider":null}' })).toThrow('against its schema');
    expect(check({ status: 201 })).toThrow('does not list');
    expect(check({ contentType: 'text/plain' })).toThrow('does not list');
  });
});
