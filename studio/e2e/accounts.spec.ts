import AxeBuilder from '@axe-core/playwright';
import type { BrowserContext, Page } from '@playwright/test';
import { expect, test } from '@playwright/test';
import { mailedToken } from './team.ts';

test.describe.configure({ timeout: 120_000 });

const PASSWORD = 'five plain words here';
let count = 0;

/** An address of nobody else in this run, so that nothing depends on what the database holds. */
function newEmail(name: string): string {
  count += 1;
  return `${name}.${Date.now()}.${count}@puna.example`;
}

async function signUp(page: Page, { name, email, workspace }: { name: string; email: string; workspace: string }) {
  await page.goto('/sign-up');
  await page.getByLabel('Your name').fill(name);
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(PASSWORD);
  await page.getByLabel('Workspace').fill(workspace);
  await page.getByRole('button', { name: 'Make the account' }).click();
  await expect(page).toHaveURL(/\/w\/\w+\//);
  return new URL(page.url()).pathname.split('/')[2]!;
}

async function signIn(page: Page, email: string, password = PASSWORD) {
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
}

async function fromMenu(page: Page, menu: string, item: string) {
  await page.getByRole('button', { name: menu, exact: true }).click();
  await page.getByRole('menuitem', { name: item, exact: true }).click();
}

/** Somebody else's browser. */
async function otherBrowser(context: BrowserContext): Promise<Page> {
  const other = await context.browser()!.newContext({ baseURL: test.info().project.use.baseURL!, locale: 'en-GB' });
  return other.newPage();
}

const ines = () => ({ name: 'Inés Quispe', email: newEmail('ines'), workspace: 'Puna Mobility' });

test('an owner invites by mail, the invited joins, and is signed out everywhere by their own hand', async ({
  page,
  context,
  request,
}) => {
  const owner = ines();
  await signUp(page, owner);
  await fromMenu(page, owner.workspace, 'Team');
  const invited = newEmail('rosa');
  const form = page.getByRole('form', { name: 'Invite' });
  await form.getByLabel('E-mail').fill(invited);
  await form.getByLabel('Role').selectOption('analyst');
  await form.getByRole('button', { name: 'Invite' }).click();
  const open = page.getByRole('table', { name: 'Open invitations' });
  await expect(open.getByRole('row', { name: invited })).toContainText('analyst');

  const rosa = await otherBrowser(context);
  await rosa.goto(`/join#${await mailedToken(request, invited, 'join')}`);
  await expect(rosa.getByText('Invited by')).toBeVisible();
  await expect(rosa.getByText(owner.name)).toBeVisible();
  await rosa.getByLabel('Your name').fill('Rosa Mamani');
  await rosa.getByLabel('Password', { exact: true }).fill(PASSWORD);
  await rosa.getByRole('button', { name: 'Make the account and join' }).click();
  await fromMenu(rosa, owner.workspace, 'Team');
  const own = rosa.getByRole('row', { name: /Rosa Mamani/ });
  await expect(own).toContainText('analyst');
  await expect(rosa.getByRole('form', { name: 'Invite' })).toHaveCount(0);

  await page.reload();
  await page.getByRole('combobox', { name: 'Role of Rosa Mamani' }).selectOption('engineer');
  await expect(page.getByRole('status').filter({ hasText: 'Rosa Mamani is engineer now.' })).toBeVisible();
  await rosa.reload();
  await expect(own).toContainText('engineer');
  await fromMenu(page, owner.workspace, 'Activity');
  await expect(page.getByText('Inés Quispe changed Rosa Mamani from analyst to engineer')).toBeVisible();

  const second = await otherBrowser(context);
  await second.goto('/sign-in');
  await signIn(second, invited);
  await expect(second.getByRole('button', { name: owner.workspace })).toBeVisible();
  await fromMenu(rosa, 'Rosa Mamani', 'Account');
  await expect(rosa.getByRole('table', { name: 'Devices' }).getByRole('row')).toHaveCount(3);
  await rosa.getByRole('button', { name: 'Sign out everywhere' }).click();
  await rosa.getByRole('alertdialog').getByRole('button', { name: 'Sign out everywhere' }).click();
  await expect(rosa.getByRole('heading', { name: 'Sign in' })).toBeVisible();
  await second.reload();
  await expect(second.getByRole('heading', { name: 'Sign in' })).toBeVisible();
  await rosa.context().close();
  await second.context().close();
});

test('a deep link survives signing in, with what stands behind ? and #', async ({ page, context }) => {
  const owner = ines();
  const id = await signUp(page, owner);
  const guest = await otherBrowser(context);
  await guest.goto(`/w/${id}/activity?from=mail#today`);
  await expect(guest.getByRole('heading', { name: 'Sign in' })).toBeVisible();
  await signIn(guest, owner.email, 'not the password');
  await expect(guest.getByRole('alert')).toContainText('do not belong together');
  await expect(guest.getByLabel('E-mail')).toHaveValue(owner.email);
  await signIn(guest, owner.email);
  await expect(guest.getByRole('heading', { name: 'Activity' })).toBeVisible();
  expect(guest.url()).toContain(`/w/${id}/activity?from=mail#today`);
  await guest.context().close();
});

test('a session that ends under a page is taken up again over it, and nothing typed is lost', async ({
  page,
  context,
}) => {
  const owner = ines();
  await signUp(page, owner);
  await fromMenu(page, owner.workspace, 'Workspace settings');
  const name = page.getByLabel('Name of the workspace');
  await name.fill('Puna Mobility, vans');

  const other = await otherBrowser(context);
  await other.goto('/sign-in');
  await signIn(other, owner.email);
  await fromMenu(other, owner.name, 'Account');
  await other
    .getByRole('table', { name: 'Devices' })
    .getByRole('button', { name: /^Sign out/ })
    .click();
  await expect(other.getByRole('status').filter({ hasText: 'is signed out' })).toBeVisible();
  await other.context().close();

  await page.getByRole('button', { name: 'Rename' }).click();
  const dialog = page.getByRole('dialog', { name: 'Signed out on this device' });
  await expect(dialog.getByLabel('E-mail')).toHaveValue(owner.email);
  await expect(dialog.getByLabel('Password', { exact: true })).toBeFocused();
  await dialog.getByLabel('Password', { exact: true }).fill(PASSWORD);
  await dialog.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(dialog).toHaveCount(0);
  await expect(name).toHaveValue('Puna Mobility, vans');
  await page.getByRole('button', { name: 'Rename' }).click();
  await expect(page.getByRole('button', { name: 'Puna Mobility, vans' })).toBeVisible();
});

test('a forgotten password is set anew by mail, once', async ({ page, context, request }) => {
  const owner = ines();
  await signUp(page, owner);
  const guest = await otherBrowser(context);
  await guest.goto('/sign-in');
  await guest.getByRole('link', { name: 'Forgot the password' }).click();
  await guest.getByLabel('E-mail').fill(owner.email);
  await guest.getByRole('button', { name: 'Mail the link' }).click();
  await expect(guest.getByText(`If an account has the e-mail ${owner.email}`)).toBeVisible();
  const address = `/reset-password#${await mailedToken(request, owner.email, 'reset-password')}`;
  await guest.goto(address);
  await guest.getByLabel('New password', { exact: true }).fill('short');
  await guest.getByRole('button', { name: 'Set the password' }).click();
  await expect(guest.getByText('At least 10 characters', { exact: true })).toBeVisible();
  await expect(guest.getByLabel('New password', { exact: true })).toBeFocused();
  await guest.getByLabel('New password', { exact: true }).fill('five other words here');
  await guest.getByRole('button', { name: 'Set the password' }).click();
  await guest.getByRole('link', { name: 'Sign in' }).click();
  await signIn(guest, owner.email, 'five other words here');
  await expect(guest.getByRole('button', { name: owner.workspace })).toBeVisible();
  await guest.goto(address);
  await guest.reload();
  await guest.getByLabel('New password', { exact: true }).fill('a third time around');
  await guest.getByRole('button', { name: 'Set the password' }).click();
  await expect(guest.getByRole('alert')).toContainText(/used|expired/);
  await guest.context().close();
});

test('a viewer is offered no invitation, no role and no settings, and the API refuses them', async ({
  page,
  context,
  request,
}) => {
  const owner = ines();
  const id = await signUp(page, owner);
  await page.goto(`/w/${id}/team`);
  const invited = newEmail('tomas');
  const form = page.getByRole('form', { name: 'Invite' });
  await form.getByLabel('E-mail').fill(invited);
  await form.getByLabel('Role').selectOption('viewer');
  await form.getByRole('button', { name: 'Invite' }).click();
  const viewer = await otherBrowser(context);
  await viewer.goto(`/join#${await mailedToken(request, invited, 'join')}`);
  await viewer.getByLabel('Your name').fill('Tomás Apaza');
  await viewer.getByLabel('Password', { exact: true }).fill(PASSWORD);
  await viewer.getByRole('button', { name: 'Make the account and join' }).click();
  await fromMenu(viewer, owner.workspace, 'Team');
  await expect(viewer.getByRole('row', { name: /Tomás Apaza/ })).toContainText('viewer');
  await expect(viewer.getByRole('combobox')).toHaveCount(0);
  await expect(viewer.getByRole('heading', { name: 'Invitations' })).toHaveCount(0);
  await viewer.getByRole('button', { name: owner.workspace }).click();
  await expect(viewer.getByRole('menuitem', { name: 'Activity' })).toBeVisible();
  await expect(viewer.getByRole('menuitem', { name: 'Workspace settings' })).toHaveCount(0);
  const refused = await viewer.evaluate(async (workspaceId) => {
    const csrf = /voltiplano_csrf=([^;]+)/.exec(document.cookie)![1]!;
    const answer = await fetch(`/api/v1/workspaces/${workspaceId}/invitations`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', 'x-csrf-token': csrf },
      body: JSON.stringify({ email: 'a@puna.example', role: 'viewer' }),
    });
    return [answer.status, ((await answer.json()) as { code: string }).code];
  }, id);
  expect(refused).toEqual([403, 'FORBIDDEN']);
  await viewer.context().close();
});

test('an invitation for somebody else is explained, and a workspace of others leads back to the own', async ({
  page,
  context,
  request,
}) => {
  const owner = ines();
  const id = await signUp(page, owner);
  await page.goto(`/w/${id}/team`);
  const invited = newEmail('mateo');
  await page.getByRole('form', { name: 'Invite' }).getByLabel('E-mail').fill(invited);
  await page.getByRole('button', { name: 'Invite' }).click();
  const token = await mailedToken(request, invited, 'join');
  const other = await otherBrowser(context);
  const lucia = { name: 'Lucía Choque', email: newEmail('lucia'), workspace: 'Salar network' };
  await signUp(other, lucia);
  await other.goto(`/join#${token}`);
  await expect(other.getByRole('alert')).toContainText(`This invitation is for ${invited}`);
  await other.goto(`/w/${id}/team`);
  await expect(other.getByRole('heading', { name: 'No workspace here for you' })).toBeVisible();
  await other.getByRole('main').getByRole('link', { name: lucia.workspace }).click();
  await expect(other).toHaveURL(/\/w\/(?!.*\/team)/);
  await other.context().close();
});

test('the account takes a new e-mail by its mailed link, and a token for scripts is shown once', async ({
  page,
  request,
}) => {
  const owner = ines();
  const id = await signUp(page, owner);
  await page.goto('/account');
  const newAddress = newEmail('ines.quispe');
  const email = page.getByRole('form', { name: 'E-mail' });
  await email.getByLabel('New e-mail').fill(newAddress);
  await email.getByLabel('Present password', { exact: true }).fill('not the password');
  await email.getByRole('button', { name: 'Mail a link to it' }).click();
  await expect(email.getByLabel('Present password', { exact: true })).toHaveAttribute('aria-invalid', 'true');
  await expect(email.getByLabel('New e-mail')).toHaveValue(newAddress);
  await email.getByLabel('Present password', { exact: true }).fill(PASSWORD);
  await email.getByRole('button', { name: 'Mail a link to it' }).click();
  await expect(page.getByText(`A link is on its way to ${newAddress}`)).toBeVisible();

  const form = page.getByRole('form', { name: 'New API token' });
  await form.getByLabel('What it is for').fill('Night sweeps');
  await form.getByLabel('Days until it expires').fill('0');
  await form.getByRole('button', { name: 'Make a token' }).click();
  await expect(form.getByLabel('Days until it expires')).toBeFocused();
  await form.getByLabel('Days until it expires').fill('30');
  await form.getByRole('button', { name: 'Make a token' }).click();
  const secret = await page.getByLabel('Secret of Night sweeps').innerText();
  const asScript = () =>
    request.get(`/api/v1/workspaces/${id}`, { headers: { authorization: `Bearer ${secret}` } }).then((a) => a.status());
  expect(await asScript()).toBe(200);
  await page.reload();
  await expect(page.getByRole('table', { name: 'API tokens' })).toContainText('Night sweeps');
  await expect(page.getByText(secret)).toHaveCount(0);
  await page.getByRole('button', { name: 'Revoke Night sweeps' }).click();
  await page.getByRole('alertdialog').getByRole('button', { name: 'Revoke' }).click();
  await expect(page.getByText('No token yet.')).toBeVisible();
  expect(await asScript()).toBe(401);

  await page.goto(`/confirm-email#${await mailedToken(request, newAddress, 'confirm-email')}`);
  await page.getByRole('button', { name: 'Take the new e-mail' }).click();
  await page.getByRole('link', { name: 'Open the account' }).click();
  await expect(page.getByText(newAddress, { exact: true })).toBeVisible();
});

test('signing in through the company leads to the page that was asked for; where it fails, that is said', async ({
  page,
}) => {
  await page.goto('/sign-in?problem=EMAIL_NOT_VERIFIED');
  await expect(page.getByRole('alert')).toContainText('has not confirmed the e-mail');
  await page.goto('/account?from=mail#devices');
  await page.getByRole('link', { name: /^Sign in with/ }).click();
  const address = newEmail('mateo');
  await page.getByLabel('E-mail').fill(address);
  await page.getByLabel('Name').fill('Mateo Condori');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByRole('heading', { name: 'Account', level: 1 })).toBeVisible();
  expect(page.url()).toContain('/account?from=mail#devices');
  await expect(page.getByText('You sign in through your company.')).toBeVisible();
  await fromMenu(page, 'Mateo Condori', 'Sign out');
  await expect(page.getByRole('link', { name: 'Sign in' })).toBeVisible();
});

for (const colorScheme of ['light', 'dark'] as const) {
  test.describe(colorScheme, () => {
    test.use({ colorScheme });

    test('pages about accounts and teams have no violations, and nothing scrolls sideways at 390 px', async ({
      page,
      context,
    }) => {
      const owner = ines();
      const id = await signUp(page, owner);
      const guest = await otherBrowser(context);
      await guest.emulateMedia({ colorScheme });
      const guestPages = ['sign-in', 'sign-up', 'forgot-password', 'reset-password#x', 'confirm-email#x', 'join'];
      for (const path of guestPages) await look(guest, `/${path}`);
      for (const path of ['/account', '/new-workspace', '/w/nowhere']) await look(page, path);
      for (const path of ['team', 'activity', 'settings']) await look(page, `/w/${id}/${path}`);
      await page.getByRole('button', { name: 'Delete the workspace' }).click();
      await expect(page.getByRole('dialog')).toBeVisible();
      expect(await violations(page)).toEqual([]);
      await guest.context().close();
    });
  });
}

/** Opens a page wide and narrow. */
async function look(page: Page, path: string) {
  await page.setViewportSize({ width: 1440, height: 900 });
  await page.goto(path);
  await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
  await expect(page.locator('.awaited')).toHaveCount(0);
  expect(await violations(page), path).toEqual([]);
  await page.setViewportSize({ width: 390, height: 844 });
  expect(await violations(page), `${path} at 390 px`).toEqual([]);
  expect(await page.evaluate(() => document.documentElement.scrollWidth), path).toBeLessThanOrEqual(390);
}

async function violations(page: Page): Promise<string[]> {
  const tags = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];
  const { violations: found } = await new AxeBuilder({ page }).withTags(tags).analyze();
  return found.flatMap(({ id, nodes }) =>
    nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')} ${failureSummary}`),
  );
}
