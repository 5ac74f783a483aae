import { readFileSync } from 'node:fs';
import path from 'node:path';
import type { APIRequestContext, BrowserContext, Page } from '@playwright/test';
import { expect, headline } from './quiet-page.ts';

const EXAMPLE = path.resolve(import.meta.dirname, '../../examples/vicuna-warm-arrival.json');

/** The study that journeys begin with. */
export const exampleStudy = () => JSON.parse(readFileSync(EXAMPLE, 'utf8')) as Record<string, object>;

type Caller = { request: APIRequestContext; context: BrowserContext };

/** A call of the API as the person signed in to a browser. */
export async function call<T>(
  { request, context }: Caller,
  method: 'get' | 'post' | 'put',
  address: string,
  { body, ifMatch }: { body?: object; ifMatch?: string } = {},
): Promise<T> {
  const csrf = (await context.cookies()).find(({ name }) => name === 'voltiplano_csrf')?.value;
  const answer = await request[method](`/api/v1${address}`, {
    ...(body ? { data: body } : {}),
    headers: { ...(csrf ? { 'X-CSRF-Token': csrf } : {}), ...(ifMatch ? { 'If-Match': ifMatch } : {}) },
  });
  expect(answer.ok(), `${method} ${address}: ${await answer.text()}`).toBe(true);
  return (answer.status() === 204 ? undefined : await answer.json()) as T;
}

export type Team = { workspaceId: string; email: string };

/** Everybody's password. */
export const PASSWORD = 'a long enough one';

let people = 0;

/** Signs somebody up with a workspace of their own; the page's browser is then signed in. */
export async function signUp(page: Page, name: string): Promise<Team> {
  const email = `person${++people}.${Date.now()}@puna.example`;
  const me = await call<{ workspaces: { workspaceId: string }[] }>(caller(page), 'post', '/auth/sign-up', {
    body: { email, name, password: PASSWORD, workspaceName: 'Puna Mobility' },
  });
  return { workspaceId: me.workspaces[0]!.workspaceId, email };
}

/** Invites a member by mail and joins as that person in another browser. */
export async function join(owner: Page, guest: Page, team: Team, name: string, role: string): Promise<void> {
  const { email } = await signUp(guest, name);
  await call(caller(owner), 'post', `/workspaces/${team.workspaceId}/invitations`, { body: { email, role } });
  const token = await mailedToken(owner.request, email, 'join');
  await call(caller(guest), 'post', '/invitations/accept', { body: { token } });
}

/** The secret behind the # of the newest link to a page that was mailed to somebody. */
export async function mailedToken(request: APIRequestContext, to: string, page: string): Promise<string> {
  const link = new RegExp(`/${page}#(\\S+)`);
  let token: string | undefined;
  const look = async () => {
    const answer = await request.get('/api/v1/dev/mailbox', {
      params: { to },
      headers: { accept: 'application/json' },
    });
    const { items } = (await answer.json()) as { items: { text: string }[] };
    token = items.map(({ text }) => link.exec(text)?.[1]).find((found) => found !== undefined);
    return token;
  };
  await expect.poll(look, { message: `a mail with a link to ${page} for ${to}` }).toBeTruthy();
  return token!;
}

export type MadeStudy = { id: string; working: { version: number } };

/** Makes a study through the API. */
export function makeStudy(page: Page, { workspaceId }: Team, inputs: object, parts: object[] = []): Promise<MadeStudy> {
  return call(caller(page), 'post', `/workspaces/${workspaceId}/studies`, { body: { inputs, parts } });
}

export const caller = (page: Page): Caller => ({ request: page.request, context: page.context() });

/** A study on its desk, with its first result. */
export async function openStudy(page: Page, { workspaceId }: Team, studyId: string): Promise<void> {
  await page.goto(`/w/${workspaceId}/studies/${studyId}`);
  await expect(headline(page, '10–80 %')).toContainText(/\d/, { timeout: 30_000 });
}

/** The cell of the title block with a label. */
export const titleCell = (page: Page, label: string) =>
  page
    .locator('.title-block dl > div')
    .filter({ has: page.locator('dt', { hasText: label }) })
    .locator('dd');
