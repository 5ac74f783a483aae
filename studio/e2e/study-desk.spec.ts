import type { Page } from '@playwright/test';
import { expect, field, test } from './quiet-page.ts';
import {
  call,
  caller,
  exampleStudy,
  join,
  makeStudy,
  openStudy,
  PASSWORD,
  signUp,
  titleCell,
  type Team,
} from './team.ts';

// The browser names failed calls; these journeys cut the connection, end sessions and meet conflicts on purpose.
test.use({ expectedErrors: /ERR_INTERNET_DISCONNECTED|status of (401|412)/ });

const kept = (page: Page) => titleCell(page, 'Kept');
const current = (page: Page) => field(page, 'Current, most');

/** Comes back to a window that was left. */
const lookAt = (page: Page) => page.evaluate(() => window.dispatchEvent(new Event('focus')));

/** Current of the station in the working copy that the server has. */
async function savedCurrent(page: Page, team: Team, studyId: string): Promise<number> {
  const address = `/workspaces/${team.workspaceId}/studies/${studyId}`;
  const study = await call<{ working: { inputs: { station: { currentMaxA: number } } } }>(caller(page), 'get', address);
  return study.working.inputs.station.currentMaxA;
}

async function opened(page: Page) {
  const team = await signUp(page, 'Inés Quispe');
  const { id } = await makeStudy(page, team, exampleStudy());
  await openStudy(page, team, id);
  return { team, id };
}

test('what is typed reaches the server by itself and is there after a reload, with what waits and with undo', async ({
  page,
}) => {
  const { team, id } = await opened(page);
  await expect(page.getByText('Session study No. 001')).toBeVisible();
  await expect(titleCell(page, 'Revision')).toHaveText('1, draft');
  await expect(titleCell(page, 'Owner')).toHaveText('Inés Quispe');
  await current(page).fill('350');
  await expect(kept(page)).toContainText('just now');
  expect(await savedCurrent(page, team, id)).toBe(350);
  await expect(titleCell(page, 'Changed')).toHaveText('1 input since 1');
  await field(page, 'Hot limit to').fill('30');
  await page.reload();
  await expect(current(page)).toHaveValue('350');
  await expect(field(page, 'Hot limit to')).toHaveValue('30.0');
  await page.getByRole('button', { name: 'Undo Hot limit to' }).click();
  await page.getByRole('button', { name: 'Undo Current, most' }).click();
  await expect(current(page)).toHaveValue('500');
  await expect.poll(() => savedCurrent(page, team, id)).toBe(500);
});

test('without a connection edits are held in this browser, and saved when it is back', async ({ page, context }) => {
  const { team, id } = await opened(page);
  await context.setOffline(true);
  await current(page).fill('360');
  await expect(kept(page)).toContainText('Not kept: no connection. Your changes are held in this browser.');
  expect(await savedCurrent(page, team, id)).toBe(500);
  await context.setOffline(false);
  await expect(kept(page)).toContainText('just now', { timeout: 30_000 });
  expect(await savedCurrent(page, team, id)).toBe(360);
});

test('edits of a tab that was closed without a connection are found and sent by the next', async ({
  page,
  context,
}) => {
  const { team, id } = await opened(page);
  await context.setOffline(true);
  await current(page).fill('365');
  await expect(kept(page)).toContainText('Not kept');
  await page.close();
  await context.setOffline(false);
  const next = await context.newPage();
  await next.goto(`/w/${team.workspaceId}/studies/${id}`);
  await expect(next.getByText('Found in this browser')).toBeVisible();
  await expect(current(next)).toHaveValue('365');
  await expect.poll(() => savedCurrent(next, team, id)).toBe(365);
});

test('a session ended from another device asks for the password over the desk, and what was typed is saved', async ({
  page,
  browser,
}) => {
  const { team, id } = await opened(page);
  const other = await (await browser.newContext()).newPage();
  await call(caller(other), 'post', '/auth/sign-in', { body: { email: team.email, password: PASSWORD } });
  await other.goto('/account');
  await other.getByRole('button', { name: 'Sign out everywhere' }).click();
  await other.getByRole('alertdialog').getByRole('button', { name: 'Sign out everywhere' }).click();
  await expect(other).toHaveURL(/\/sign-in/);
  await other.context().close();

  await current(page).fill('370');
  const dialog = page.getByRole('dialog', { name: 'Signed out on this device' });
  await expect(dialog).toContainText('What you typed on this page is still here');
  await expect(kept(page)).toContainText('Not kept: signed out. Your changes are held in this browser.');
  await dialog.getByRole('textbox', { name: 'Password' }).fill(PASSWORD);
  await dialog.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(dialog).toHaveCount(0);
  await expect(kept(page)).toContainText('just now');
  await expect(current(page)).toHaveValue('370');
  expect(await savedCurrent(page, team, id)).toBe(370);
});

test.describe('two people change one study', () => {
  /** Mateo's desk with an edit that meets Inés's, which was saved before it. */
  async function conflicting(page: Page, other: Page) {
    const { team, id } = await opened(page);
    await join(page, other, team, 'Mateo Condori', 'engineer');
    await openStudy(other, team, id);
    await current(page).fill('450');
    await expect(kept(page)).toContainText('just now');
    await current(other).fill('400');
    const dialog = other.getByRole('dialog', { name: 'Changed in two places' });
    await expect(dialog).toContainText('by Inés Quispe');
    await expect(dialog.getByRole('row').filter({ hasText: 'Current, most' })).toHaveText(/400 A\s*450 A/);
    expect(await savedCurrent(page, team, id)).toBe(450);
    return { team, id, dialog };
  }

  const undo = (page: Page) => page.getByRole('button', { name: /^Undo / }).click();

  test('mine is written over theirs, which stays under undo', async ({ page, browser }) => {
    const other = await (await browser.newContext()).newPage();
    const { team, id, dialog } = await conflicting(page, other);
    await dialog.getByRole('button', { name: 'Keep mine' }).click();
    await expect(kept(other)).toContainText('just now');
    expect(await savedCurrent(page, team, id)).toBe(400);
    await undo(other);
    await expect(current(other)).toHaveValue('450');
    await expect.poll(() => savedCurrent(page, team, id)).toBe(450);
    await other.context().close();
  });

  test('theirs is taken, and mine stays under undo; the first desk follows when it is looked at', async ({
    page,
    browser,
  }) => {
    const other = await (await browser.newContext()).newPage();
    const { team, id, dialog } = await conflicting(page, other);
    await dialog.getByRole('button', { name: 'Take theirs' }).click();
    await expect(current(other)).toHaveValue('450');
    await undo(other);
    await expect(current(other)).toHaveValue('400');
    await expect.poll(() => savedCurrent(page, team, id)).toBe(400);

    await lookAt(page);
    await expect(page.getByText('Taken: changes by Mateo Condori, just now')).toBeVisible();
    await expect(current(page)).toHaveValue('400');
    await undo(page);
    await expect(current(page)).toHaveValue('450');
    await other.context().close();
  });

  test('both are kept: mine becomes a study of its own, theirs stays', async ({ page, browser }) => {
    const other = await (await browser.newContext()).newPage();
    const { team, id, dialog } = await conflicting(page, other);
    await dialog.getByRole('button', { name: 'Keep both' }).click();
    await expect(other.getByText('Session study No. 002')).toBeVisible();
    await expect(current(other)).toHaveValue('400');
    await expect(field(other, 'Title')).toHaveValue(/, copy$/);
    expect(await savedCurrent(page, team, id)).toBe(450);
    await other.context().close();
  });
});

test('a revision is saved with a message, looked at in the history, compared and brought back', async ({ page }) => {
  await opened(page);
  await current(page).fill('350');
  await page.keyboard.press('Control+s');
  const dialog = page.getByRole('dialog', { name: 'Save revision 2' });
  await expect(dialog.getByRole('row').filter({ hasText: 'Current, most' })).toHaveText(/500 A\s*350 A/);
  await dialog.getByRole('button', { name: 'Save revision' }).click();
  await expect(dialog.getByText('Say in a few words what this revision is')).toBeVisible();
  await dialog.getByRole('textbox', { name: 'What this revision is' }).fill('Station current down to 350 A');
  await dialog.getByRole('button', { name: 'Save revision' }).click();
  await expect(titleCell(page, 'Revision')).toHaveText('2, draft');
  await expect(titleCell(page, 'Changed')).toHaveText('nothing');

  await page.getByRole('button', { name: 'History' }).click();
  const history = page.getByRole('region', { name: 'History' });
  const second = history.getByRole('listitem').filter({ hasText: 'Station current down to 350 A' });
  await expect(second).toContainText(/10–80 % [\d.]+ min [\d.]+ slower/);
  const activity = history.getByRole('region', { name: 'Activity' }).getByRole('listitem');
  await expect(activity).toHaveText([/^Inés Quispe revised this study, revision 2/, /^Inés Quispe created this study/]);
  await second.getByRole('button', { name: 'What changed' }).click();
  await expect(second.getByRole('row').filter({ hasText: 'Current, most' })).toHaveText(/500 A\s*350 A/);
  await expect(page).toHaveURL(/revision=2/);
  await page.reload();
  await expect(second.getByRole('row').filter({ hasText: 'Current, most' })).toBeVisible();
  await history.getByRole('button', { name: 'Bring back: revision 1' }).click();
  await expect(current(page)).toHaveValue('500');
  await expect(titleCell(page, 'Changed')).toHaveText('1 input since 2');
  await page.getByRole('button', { name: 'Undo bring back revision 1' }).click();
  await expect(current(page)).toHaveValue('350');

  await page.getByRole('button', { name: 'History' }).click();
  await history.getByRole('button', { name: 'Use as baseline: revision 1' }).click();
  await expect(titleCell(page, 'Baseline')).toContainText('Revision 1');
  await expect(page.locator('.f').filter({ hasText: 'Current, most' }).first()).toContainText('was 500');
});

test('a revision is refused in words while an entry breaks a rule', async ({ page }) => {
  await opened(page);
  await field(page, 'Hot limit to').fill('30');
  await page.getByRole('button', { name: 'Save revision' }).click();
  const dialog = page.getByRole('dialog', { name: 'Save revision 2' });
  await expect(dialog).toContainText('Cannot save a revision: “Hot limit to” breaks a rule.');
  await expect(dialog.getByRole('textbox')).toHaveCount(0);
});

test('a viewer reads every input and is offered no change', async ({ page, browser }) => {
  const { team, id } = await opened(page);
  const viewer = await (await browser.newContext()).newPage();
  await join(page, viewer, team, 'Rosa Quiroga', 'viewer');
  await openStudy(viewer, team, id);
  await expect(kept(viewer)).toHaveText('Read only: viewer');
  await expect(current(viewer)).toHaveAttribute('readonly', '');
  for (const name of [/^Undo/, /^Save revision/, /^Add /, /^Delete /, /^Paste/])
    await expect(viewer.getByRole('button', { name })).toHaveCount(0);
  await expect(viewer.getByRole('textbox', { name: 'Title' })).toHaveCount(0);
  await viewer.getByRole('radio', { name: 'over soc' }).click();
  await viewer.getByRole('button', { name: 'Study', exact: true }).click();
  await expect(viewer.getByRole('menuitem', { name: 'Export the study file' })).toBeVisible();
  await expect(viewer.getByRole('menuitem', { name: 'Put into the archive' })).toHaveCount(0);
  await viewer.getByRole('menuitem', { name: 'Keep as baseline' }).click();
  await expect(titleCell(viewer, 'Baseline')).toContainText('Vicuña');

  // What others change comes onto the viewer's desk too.
  await current(page).fill('350');
  await expect(kept(page)).toContainText('just now');
  await lookAt(viewer);
  await expect(current(viewer)).toHaveValue('350');
  await viewer.context().close();
});

test('a study in the archive is read only until it is taken out', async ({ page }) => {
  await opened(page);
  await page.getByRole('button', { name: 'Study', exact: true }).click();
  await page.getByRole('menuitem', { name: 'Put into the archive' }).click();
  await page.getByRole('alertdialog').getByRole('button', { name: 'Put into the archive' }).click();
  await expect(kept(page)).toHaveText('In the archive');
  await expect(current(page)).toHaveAttribute('readonly', '');
  await page.getByRole('button', { name: 'Study', exact: true }).click();
  await page.getByRole('menuitem', { name: 'Take out of the archive' }).click();
  await expect(current(page)).not.toHaveAttribute('readonly');
});

test.describe('parts of the library', () => {
  type Item = { id: string; revision: number };
  const stationGroup = (page: Page) => page.getByRole('group', { name: 'Station', exact: true });

  async function withStation(page: Page) {
    const team = await signUp(page, 'Inés Quispe');
    const inputs = exampleStudy();
    const { station } = inputs;
    const library = `/workspaces/${team.workspaceId}/library`;
    const common = { name: 'Salar Tola 500 A', notes: '', source: 'invented' };
    const item = await call<Item>(caller(page), 'post', library, {
      body: { kind: 'station', ...common, body: station! },
    });
    const parts = [{ part: 'station', itemId: item.id, revision: 1 }];
    const { id } = await makeStudy(page, team, inputs, parts);
    const revise = (currentMaxA: number) =>
      call<Item>(caller(page), 'post', `${library}/${item.id}/revisions`, {
        body: { ...common, body: { ...station, currentMaxA }, message: 'Cable rated anew' },
        ifMatch: '"r1"',
      });
    return { team, id, revise };
  }

  test('a newer revision is offered; taking it is one step of undo, and keeping the older is remembered', async ({
    page,
  }) => {
    const { team, id, revise } = await withStation(page);
    await revise(400);
    await openStudy(page, team, id);
    const station = stationGroup(page);
    await expect(station).toContainText('Salar Tola 500 A, revision 1');
    await station.getByRole('button', { name: 'Take revision 2 of Salar Tola 500 A' }).click();
    await expect(current(page)).toHaveValue('400');
    await expect(station).toContainText('Salar Tola 500 A, revision 2');
    await expect(station).not.toContainText('exists');
    await page.getByRole('button', { name: /^Undo take Salar Tola/ }).click();
    await expect(current(page)).toHaveValue('500');
    await expect(station).toContainText('Revision 2 exists');
    await station.getByRole('button', { name: 'Keep revision 1 of Salar Tola 500 A' }).click();
    await expect(station).not.toContainText('exists');
    await expect(kept(page)).toContainText('just now');
    await page.reload();
    await expect(station).toContainText('Salar Tola 500 A, revision 1');
    await expect(station).not.toContainText('exists');
  });

  test('a part changed here is saved as a revision, and another is chosen by name', async ({ page }) => {
    const { team, id } = await withStation(page);
    await openStudy(page, team, id);
    const station = stationGroup(page);
    await current(page).fill('420');
    await expect(station).toContainText('Salar Tola 500 A, revision 1, changed here');
    await station.getByRole('button', { name: 'Save to the library: station' }).click();
    const saving = page.getByRole('dialog', { name: 'Save to the library: station' });
    await saving.getByRole('textbox', { name: 'What changed' }).fill('Cable measured');
    await saving.getByRole('button', { name: 'Save the revision' }).click();
    await expect(station).toContainText('Salar Tola 500 A, revision 2');
    await expect(station).not.toContainText('changed here');

    await current(page).fill('300');
    await station.getByRole('button', { name: 'Save to the library: station' }).click();
    await saving.getByRole('radio', { name: 'a part of its own' }).click();
    await saving.getByRole('textbox', { name: 'Name' }).fill('Salar Ocaso 300 A');
    await saving.getByRole('button', { name: 'Add to the library' }).click();
    await expect(station).toContainText('Salar Ocaso 300 A, revision 1');

    await station.getByRole('button', { name: 'From the library: station' }).click();
    const picker = page.getByRole('dialog', { name: 'From the library: station' });
    await picker.getByRole('searchbox', { name: 'Find' }).fill('tola');
    await expect(picker.getByRole('button', { name: /^Salar Ocaso/ })).toHaveCount(0);
    await picker.getByRole('button', { name: /^Salar Tola 500 A/ }).click();
    await expect(current(page)).toHaveValue('420');
    await expect(station).toContainText('Salar Tola 500 A, revision 2');
  });
});
