import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { endpoints } from '../contract/endpoints.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { checkAnswer } from '../testing/check-answer.ts';
import { mailboxEndpoints } from '../contract/mailbox.ts';
import { accountEndpoints } from '../contract/account.ts';
import { libraryEndpoints } from '../contract/library.ts';

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

  it('lists If-Match and its problems where a change names its version', async () => {
    const document = (await (await fetch(`${server.address}/api/v1/openapi.json`)).json()) as {
      paths: Record<string, Record<string, { operationId: string; parameters: object[]; responses: object }>>;
    };
    const operations = Object.values(document.paths).flatMap((item) => Object.values(item));
    const revise = operations.find(({ operationId }) => operationId === 'reviseLibraryItem');
    expect(revise?.parameters).toContainEqual(
      expect.objectContaining({ name: 'If-Match', in: 'header', required: true }),
    );
    expect(revise?.responses).toMatchObject({
      412: { description: expect.stringContaining('EDIT_CONFLICT') as string },
      428: { description: expect.stringContaining('IF_MATCH_MISSING') as string },
    });
    const read = operations.find(({ operationId }) => operationId === 'readLibraryItem');
    expect(read?.responses).not.toHaveProperty('428');
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
    expect(page).toContain('<th scope="row">header <code>If-Match</code></th>');
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

  const item = {
    id: '0123456789abcdefghjkmnpqrs',
    kind: 'cell',
    name: 'Suri cell',
    notes: '',
    source: '',
    body: { name: 'Suri cell' },
    revision: 1,
    changedAt: '2026-03-01T08:00:00.000Z',
    changedBy: { id: '0123456789abcdefghjkmnpqrs', name: 'Ines' },
    archivedAt: null,
    studyCount: 0,
  };

  it.each([
    ['a missing field', { name: undefined }, "must have required property 'name'"],
    ['a field too many', { colour: 'red' }, 'must NOT have additional properties'],
    ['another type', { revision: '1' }, 'revision must be integer'],
    ['a number out of range', { revision: 0 }, 'revision must be >= 1'],
    ['a word that is none of the list', { kind: 'engine' }, 'kind must be equal to one of the allowed values'],
    ['an id that is none', { id: '1' }, 'id must match pattern'],
    ['a moment that is none', { changedAt: '2026-13-41T08:00:00.000Z' }, 'changedAt must match format "date-time"'],
    ['something wrong behind a reference', { changedBy: { id: 'x' } }, 'changedBy must'],
  ])('refuses %s', (_what, wrong, message) => {
    const check = (one: object) => () => {
      checkAnswer(libraryEndpoints.listLibrary, {
        ...ok,
        text: JSON.stringify({ items: [item, one], nextCursor: null, total: 2 }),
      });
    };
    expect(check(item)).not.toThrow();
    expect(check({ ...item, ...wrong })).toThrow(message);
  });

  it('refuses a problem with a code that nobody described, and a status that the endpoint does not have', () => {
    const problem = { type: 'about:blank', title: 'x', status: 404, detail: 'x', code: 'NOT_FOUND', requestId: '' };
    const check = (answer: object, status: number) => () => {
      const text = JSON.stringify(answer);
      checkAnswer(libraryEndpoints.listLibrary, { contentType: 'application/problem+json', status, text });
    };
    expect(check(problem, 404)).not.toThrow();
    expect(check({ ...problem, code: 'GONE_FISHING' }, 404)).toThrow('code must be equal to one of');
    expect(check(problem, 412)).toThrow('does not list');
  });
});
