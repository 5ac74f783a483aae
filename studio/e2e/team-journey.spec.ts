import type { Browser, Page } from '@playwright/test';
import { expect, field, test } from './quiet-page.ts';
import { call, caller, exampleStudy, join, mailedToken, makeStudy, openStudy, signUp, titleCell } from './team.ts';

// The browser names failed calls; one tab meets the other's change on purpose.
test.use({ expectedErrors: /status of 412/ });

const newPage = async (browser: Browser) => (await browser.newContext({ locale: 'en-GB' })).newPage();
const kept = (page: Page) => titleCell(page, 'Kept');
const packSection = (page: Page) => page.getByRole('group', { name: 'Pack', exact: true });

/** Invites by the page of the team; gives the e-mail that the invitation went to. */
async function invite(owner: Page, workspaceId: string, role: string): Promise<string> {
  const email = `invited.${Date.now()}@puna.example`;
  await owner.goto(`/w/${workspaceId}/team`);
  const form = owner.getByRole('form', { name: 'Invite' });
  await form.getByLabel('E-mail').fill(email);
  await form.getByLabel('Role').selectOption(role);
  await form.getByRole('button', { name: 'Invite' }).click();
  await expect(owner.getByRole('table', { name: 'Open invitations' })).toContainText(email);
  return email;
}

async function joinByMail(owner: Page, guest: Page, email: string, name: string): Promise<void> {
  await guest.goto(`/join#${await mailedToken(owner.request, email, 'join')}`);
  await guest.getByLabel('Your name').fill(name);
  await guest.getByLabel('Password', { exact: true }).fill('five plain words here');
  await guest.getByRole('button', { name: 'Make the account and join' }).click();
  await expect(guest.getByRole('button', { name: 'Puna Mobility', exact: true })).toBeVisible();
}

test('a pack revised by an invited engineer reaches an analyst’s study, and two tabs of it lose nothing', async ({
  page,
  browser,
}) => {
  test.setTimeout(300_000);
  const team = await signUp(page, 'Inés Quispe');
  const [rosa, mateo, tomas] = [await newPage(browser), await newPage(browser), await newPage(browser)];
  await joinByMail(page, rosa, await invite(page, team.workspaceId, 'engineer'), 'Rosa Mamani');
  await join(page, mateo, team, 'Mateo Condori', 'analyst');
  await join(page, tomas, team, 'Tomás Apaza', 'viewer');
  const library = `/workspaces/${team.workspaceId}/library`;
  const inputs = exampleStudy();
  const pack = await call<{ id: string }>(caller(page), 'post', library, {
    body: { kind: 'pack', name: 'Vicuña 110', body: inputs['pack']! },
  });
  const { id } = await makeStudy(mateo, team, inputs, [{ part: 'pack', itemId: pack.id, revision: 1 }]);

  await rosa.goto(`/w/${team.workspaceId}/library/${pack.id}`);
  await field(rosa, 'Charge current, most').fill('460');
  await rosa.getByRole('button', { name: 'Save revision' }).click();
  await rosa.getByRole('textbox', { name: 'What changed' }).fill('Fuse of 460 A');
  await rosa.getByRole('dialog').getByRole('button', { name: 'Save', exact: true }).click();
  await expect(titleCell(rosa, 'Revision')).toHaveText('2');

  await openStudy(mateo, team, id);
  await expect(packSection(mateo)).toContainText('Revision 2 exists');
  await packSection(mateo).getByRole('button', { name: 'Take revision 2 of Vicuña 110' }).click();
  await expect(field(mateo, 'Charge current, most')).toHaveValue('460');
  await expect(kept(mateo)).toContainText('just now');

  const second = await mateo.context().newPage();
  await openStudy(second, team, id);
  await field(mateo, 'Current, most').fill('450');
  await expect(kept(mateo)).toContainText('just now');
  await field(second, 'Power, most').fill('180');
  const dialog = second.getByRole('dialog', { name: 'Changed in two places' });
  await expect(dialog.getByRole('row').filter({ hasText: 'Current, most' })).toHaveText(/500 A\s*450 A/);
  await expect(dialog.getByRole('row').filter({ hasText: 'Power, most' })).toHaveText(/180 kW\s*250 kW/);
  await dialog.getByRole('button', { name: 'Take theirs' }).click();
  await expect(field(second, 'Current, most')).toHaveValue('450');
  await second.getByRole('button', { name: /^Undo / }).click();
  await expect(field(second, 'Power, most')).toHaveValue('180');
  await expect(kept(second)).toContainText('just now');

  await openStudy(tomas, team, id);
  await expect(kept(tomas)).toHaveText('Read only: viewer');
  await expect(tomas.getByRole('button', { name: /^(Save revision|Take revision|From the library)/ })).toHaveCount(0);
  await tomas.goto(`/w/${team.workspaceId}/library/${pack.id}`);
  await expect(field(tomas, 'Charge current, most')).toHaveAttribute('readonly', '');
  await expect(tomas.getByRole('button', { name: 'Save revision' })).toHaveCount(0);
  const csrf = (await tomas.context().cookies()).find(({ name }) => name === 'voltiplano_csrf')!.value;
  const headers = { 'X-CSRF-Token': csrf, 'If-Match': '"r2"' };
  const refusedPart = await tomas.request.post(`/api/v1${library}/${pack.id}/revisions`, {
    headers,
    data: { name: 'Vicuña 110', notes: '', source: '', body: inputs['pack'] },
  });
  expect(refusedPart.status()).toBe(403);
  const refusedStudy = await tomas.request.put(`/api/v1/workspaces/${team.workspaceId}/studies/${id}/working`, {
    headers: { ...headers, 'If-Match': '"w1"' },
    data: { inputs },
  });
  expect(refusedStudy.status()).toBe(403);
  for (const one of [rosa, mateo, tomas]) await one.context().close();
});
