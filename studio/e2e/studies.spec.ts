import { readFileSync } from 'node:fs';
import path from 'node:path';
import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { expect, headline, test } from './quiet-page.ts';
import { call, caller, exampleStudy, join, makeStudy, signUp, type Team } from './team.ts';

const EXAMPLES = path.resolve(import.meta.dirname, '../../examples');
const example = (name: string) =>
  JSON.parse(readFileSync(path.join(EXAMPLES, `${name}.json`), 'utf8')) as Record<string, object>;
const RULES = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];

const rows = (page: Page) => page.locator('.row-link');
const row = (page: Page, title: string) => page.getByRole('row').filter({ hasText: title });
const search = (page: Page) => page.getByRole('searchbox', { name: 'Find a study' });
const count = (page: Page) => page.locator('.page .count');
const word = (page: Page, name: string) => page.getByRole('radio', { name, exact: true });

async function openList(page: Page, { workspaceId }: Team, search = ''): Promise<void> {
  await page.goto(`/w/${workspaceId}/studies${search}`);
  await expect(page.getByRole('heading', { name: 'Studies', exact: true })).toBeVisible();
}

/** Makes studies of one example that are cheap to run: full from the start. */
async function makeMany(page: Page, team: Team, titles: readonly string[]): Promise<void> {
  const { session, ...inputs } = exampleStudy();
  for (const title of titles)
    await makeStudy(page, team, { ...inputs, title, session: { ...session, startSoc: 0.9, targetSoc: 0.95 } });
}

async function pickFromMenu(page: Page, title: string, item: string): Promise<void> {
  await page.getByRole('button', { name: `More: ${title}` }).click();
  await page.getByRole('menuitem', { name: item, exact: true }).click();
}

const textFile = (name: string, text: string) => ({ name, mimeType: 'application/json', buffer: Buffer.from(text) });

test('an empty list says what to do next, and a study made from an example opens on its desk', async ({ page }) => {
  const team = await signUp(page, 'Inés Quispe');
  await openList(page, team);
  await expect(count(page)).toHaveText('0 in Puna Mobility, none waiting for a review');
  await expect(page.getByText('No study yet. Start from an example')).toBeVisible();
  await page.getByRole('link', { name: 'New study' }).first().click();
  await page.getByRole('radio', { name: /^Vicuña, cold morning/ }).check();
  await page.getByLabel('Title').fill('Frost at the depot');
  await page.getByRole('button', { name: 'Make the study' }).click();
  await expect(page).toHaveURL(/\/studies\/[0-9a-z]{26}$/);
  await expect(headline(page, '10–80 %')).toContainText(/\d|not reached/, { timeout: 30_000 });
  await openList(page, team);
  await expect(rows(page)).toHaveText(['Frost at the depot']);
  const made = row(page, 'Frost at the depot');
  await expect(made.getByRole('img')).toHaveAccessibleName(/^Power over [\d.]+ min, .*Held by .*cold limit [\d.]+ min/);
  await expect(made).toContainText('just now');
  await expect(made.locator('time')).toHaveAttribute('title', /\d\d:\d\d:\d\d/);
});

test('parts of the library make a study that pins their revisions; what does not fit is said before', async ({
  page,
}) => {
  const team = await signUp(page, 'Inés Quispe');
  const add = (kind: string, name: string, body: object) =>
    call(caller(page), 'post', `/workspaces/${team.workspaceId}/library`, { body: { kind, name, body } });
  const suri = example('suri-full-power');
  await add('pack', 'Suri 88', suri.pack!);
  await add('station', 'Salar Bajo', { ...suri.station, voltageMaxV: 400 });
  await add('cell', 'Narrow cell', { ...suri.cell, vMaxV: 4.0 });
  await openList(page, team);
  await page.getByRole('link', { name: 'New study' }).first().click();
  await word(page, 'parts of the library').click();
  await expect(page.getByText('These parts run together: 10–80 % in')).toBeVisible();
  await page.getByLabel('Cell').selectOption({ label: 'Narrow cell, revision 1' });
  await expect(page.getByRole('alert')).toContainText('These parts do not fit together.');
  await page.getByRole('button', { name: 'Make the study' }).click();
  await expect(page.getByText('These parts do not fit together yet: see above.')).toBeVisible();
  await page.getByLabel('Cell').selectOption({ label: 'as in the example' });
  await page.getByLabel('Pack').selectOption({ label: 'Suri 88, revision 1' });
  await page.getByLabel('Station').selectOption({ label: 'Salar Bajo, revision 1' });
  await expect(page.getByText(/It can be made, but not run: Cannot start: the pack rests at/)).toBeVisible();
  await page.getByRole('button', { name: 'Make the study' }).click();
  await expect(page).toHaveURL(/\/studies\/[0-9a-z]{26}$/);
  const id = page.url().split('/').at(-1)!;
  const address = `/workspaces/${team.workspaceId}/studies/${id}`;
  const study = await call<{ title: string; working: { parts: object[] } }>(caller(page), 'get', address);
  expect(study.title).toBe('Suri 88 at Salar Bajo');
  expect(study.working.parts).toMatchObject([
    { part: 'pack', itemName: 'Suri 88', revision: 1, isChanged: false },
    { part: 'station', itemName: 'Salar Bajo', revision: 1, isChanged: false },
  ]);
  await openList(page, team);
  await expect(row(page, 'Suri 88 at Salar Bajo')).toContainText('Cannot start: the pack rests at');
});

test('files are judged before anything is made of them', async ({ page }) => {
  const team = await signUp(page, 'Inés Quispe');
  await openList(page, team);
  await page.getByRole('button', { name: 'Import a file' }).click();
  const dialog = page.getByRole('dialog', { name: 'Import study files' });
  const wrong = { ...exampleStudy(), title: 'Wrong', session: { ...exampleStudy().session, startSoc: 1.4 } };
  await dialog
    .getByLabel('Choose files')
    .setInputFiles([
      textFile('warm.json', JSON.stringify(exampleStudy())),
      textFile('wrong.json', JSON.stringify(wrong)),
      textFile('torn.json', '{"format": "voltipl'),
      textFile('parts.json', '{"format":"voltiplano/library","version":1,"items":[{},{},{}]}'),
    ]);
  await expect(dialog.getByText('A session: “Vicuña at Salar Tola, warm arrival”')).toBeVisible();
  const fault = dialog.getByRole('row').filter({ hasText: 'session.startSoc' });
  await expect(fault).toContainText('range');
  await expect(fault).toContainText('1.4');
  await expect(dialog.getByText('Cannot read this file as JSON')).toBeVisible();
  await expect(dialog.getByText('A library file, with 3 parts. It belongs in the library')).toBeVisible();
  await expect(count(page)).toHaveText(/^0 in/);
  await dialog.getByRole('button', { name: 'Import the study' }).click();
  await expect(page.getByText('Imported “Vicuña at Salar Tola, warm arrival”.')).toBeVisible();
  await expect(dialog.getByText('Imported.', { exact: true })).toBeVisible();
  await dialog.getByRole('button', { name: 'Close' }).click();
  await expect(rows(page)).toHaveText(['Vicuña at Salar Tola, warm arrival']);
  await page.getByRole('button', { name: 'Open' }).click();
  await expect(page).toHaveURL(/\/studies\/[0-9a-z]{26}$/);
});

test('search, filters and order stand in the address and come back with it', async ({ page }) => {
  const team = await signUp(page, 'Inés Quispe');
  for (const name of ['vicuna-warm-arrival', 'suri-full-power', 'vicuna-one-leg'])
    await makeStudy(page, team, example(name));
  await openList(page, team);
  await expect(rows(page)).toHaveCount(3);
  await page.keyboard.press('/');
  await expect(search(page)).toBeFocused();
  await page.keyboard.type('vicuna');
  await expect(rows(page)).toHaveCount(2);
  await expect(page).toHaveURL(/\?q=vicuna$/);
  await expect(count(page)).toHaveText('2 of 3 in Puna Mobility, none waiting for a review');
  await word(page, 'trip').click();
  await expect(rows(page)).toHaveText([/one leg/]);
  await expect(row(page, 'one leg')).toContainText('Door to door in 1 h');
  await page.reload();
  await expect(search(page)).toHaveValue('vicuna');
  await expect(word(page, 'trip')).toBeChecked();
  await expect(rows(page)).toHaveCount(1);
  await page.goBack();
  await expect(word(page, 'all')).toBeChecked();
  await word(page, 'released').click();
  await expect(page.getByText('begin with “vicuna” and fits the filters')).toBeVisible();
  await page.getByRole('button', { name: 'Clear search and filters' }).click();
  await expect(rows(page)).toHaveCount(3);
  await expect(search(page)).toHaveValue('');
  await page.getByLabel('Owner', { exact: true }).selectOption('mine');
  await expect(page).toHaveURL(/\?owner=mine$/);
  await expect(rows(page)).toHaveCount(3);
});

test('heads sort both ways, and say so', async ({ page }) => {
  const team = await signUp(page, 'Inés Quispe');
  for (const name of ['suri-full-power', 'vicuna-warm-arrival', 'vicuna-one-leg'])
    await makeStudy(page, team, example(name));
  await openList(page, team);
  const head = (name: RegExp) => page.getByRole('columnheader', { name });
  await expect(head(/^Changed/)).toHaveAttribute('aria-sort', 'descending');
  await head(/^Study/)
    .getByRole('button')
    .click();
  await expect(rows(page)).toHaveText([/^Suri/, /^Vicuña at/, /^Vicuña, one/]);
  await expect(head(/^Study/)).toHaveAttribute('aria-sort', 'ascending');
  await head(/^Study/)
    .getByRole('button')
    .click();
  await expect(rows(page)).toHaveText([/^Vicuña, one/, /^Vicuña at/, /^Suri/]);
  await expect(page).toHaveURL(/\?sort=title&order=desc$/);
  // What has no minutes comes last in either order.
  await head(/^10–80 %/)
    .getByRole('button')
    .click();
  await expect(rows(page)).toHaveText([/^Suri/, /^Vicuña at/, /^Vicuña, one/]);
  await head(/^10–80 %/)
    .getByRole('button')
    .click();
  await expect(rows(page)).toHaveText([/^Vicuña at/, /^Suri/, /^Vicuña, one/]);
  await head(/^Hottest core/)
    .getByRole('button')
    .click();
  await expect(rows(page)).toHaveText([/^Suri/, /^Vicuña at/, /^Vicuña, one/]);
  await head(/^Owner/)
    .getByRole('button')
    .click();
  await expect(head(/^Owner/)).toHaveAttribute('aria-sort', 'ascending');
});

test('more than a page loads on, and arrow keys go from row to row', async ({ page }) => {
  const team = await signUp(page, 'Inés Quispe');
  await makeMany(
    page,
    team,
    Array.from({ length: 53 }, (_, i) => `Point ${String(i + 1).padStart(2, '0')}`),
  );
  await openList(page, team, '?sort=number&order=asc');
  await expect(rows(page)).toHaveCount(50);
  await page.getByRole('button', { name: '3 more below' }).click();
  await expect(rows(page)).toHaveCount(53);
  await expect(page.getByRole('link', { name: 'Point 51', exact: true })).toBeFocused();
  await page.keyboard.press('ArrowDown');
  await page.keyboard.press('ArrowDown');
  await expect(page.getByRole('link', { name: 'Point 53', exact: true })).toBeFocused();
  await page.keyboard.press('ArrowUp');
  await expect(page.getByRole('link', { name: 'Point 52', exact: true })).toBeFocused();
  await page.keyboard.press('Enter');
  await expect(page).toHaveURL(/\/studies\/[0-9a-z]{26}$/);
});

test('a study goes into the archive, comes back by undo, and can be taken out; a copy opens', async ({ page }) => {
  const team = await signUp(page, 'Inés Quispe');
  await makeMany(page, team, ['Kept', 'Old']);
  await openList(page, team, '?sort=title');
  await pickFromMenu(page, 'Old', 'Archive');
  await expect(rows(page)).toHaveText(['Kept']);
  await expect(page.getByRole('link', { name: 'Kept', exact: true })).toBeFocused();
  await expect(page.getByText('“Old” is in the archive.')).toBeVisible();
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect(rows(page)).toHaveText(['Kept', 'Old']);
  await pickFromMenu(page, 'Old', 'Archive');
  await expect(page.getByText('Show the archive, 1 study.')).toBeVisible();
  await page.getByRole('button', { name: 'Show the archive' }).click();
  await expect(rows(page)).toHaveText(['Old']);
  await expect(count(page)).toHaveText('1 study in the archive of Puna Mobility');
  await page.getByRole('button', { name: 'Take out: Old' }).click();
  await expect(page.getByText('The archive is empty.')).toBeVisible();
  await page.getByRole('button', { name: 'Leave the archive' }).click();
  await expect(rows(page)).toHaveCount(2);
  const download = page.waitForEvent('download');
  await pickFromMenu(page, 'Kept', 'Export file');
  const file = await download;
  expect(file.suggestedFilename()).toBe('001-kept.json');
  expect(JSON.parse(readFileSync(await file.path(), 'utf8'))).toMatchObject({
    format: 'voltiplano/study',
    title: 'Kept',
  });
  await pickFromMenu(page, 'Kept', 'Copy');
  await expect(page).toHaveURL(/\/studies\/[0-9a-z]{26}$/);
  await openList(page, team, '?sort=title');
  await expect(rows(page)).toHaveCount(3);
});

test('a viewer reads and exports, and is offered nothing else', async ({ page, browser }) => {
  const team = await signUp(page, 'Inés Quispe');
  await makeMany(page, team, ['Read only']);
  const context = await browser.newContext();
  const guest = await context.newPage();
  await join(page, guest, team, 'Rosa Mamani', 'viewer');
  await openList(guest, team);
  await expect(rows(guest)).toHaveText(['Read only']);
  await expect(guest.getByRole('button', { name: 'Import a file' })).toHaveCount(0);
  await expect(guest.getByRole('link', { name: 'New study' })).toHaveCount(0);
  await guest.getByRole('button', { name: 'More: Read only' }).click();
  await expect(guest.getByRole('menuitem')).toHaveText(['Open', 'Export file']);
  await guest.goto(`/w/${team.workspaceId}/studies/new`);
  await expect(guest).toHaveURL(/\/studies$/);
  await context.close();
});

test.describe('where calls fail on purpose', () => {
  test.use({ expectedErrors: /ERR_FAILED|status of 403/ });

  test('the list says that it cannot be read, and reads it when asked again', async ({ page }) => {
    const team = await signUp(page, 'Inés Quispe');
    await makeMany(page, team, ['There']);
    await page.route('**/studies?*', (route) => route.abort());
    await openList(page, team);
    await expect(page.getByText('The server cannot be reached.')).toBeVisible({ timeout: 30_000 });
    await page.unroute('**/studies?*');
    await page.getByRole('button', { name: 'Try again' }).click();
    await expect(rows(page)).toHaveText(['There']);
  });

  test('a row comes back where the server refuses to archive it', async ({ page }) => {
    const team = await signUp(page, 'Inés Quispe');
    await makeMany(page, team, ['Stays']);
    await openList(page, team);
    const detail = 'Your role does not allow this.';
    const json = { type: 'about:blank', title: 'Forbidden', status: 403, code: 'FORBIDDEN', detail, requestId: 'r' };
    await page.route('**/archive', (route) =>
      route.fulfill({ status: 403, json, contentType: 'application/problem+json' }),
    );
    await pickFromMenu(page, 'Stays', 'Archive');
    await expect(page.getByText(`“Stays” stays where it is. ${detail}`)).toBeVisible();
    await expect(rows(page)).toHaveText(['Stays']);
  });
});

for (const colorScheme of ['light', 'dark'] as const) {
  test.describe(colorScheme, () => {
    test.use({ colorScheme });

    test('list, archive, import and new study have no violations, also at 390 px', async ({ page }) => {
      const violations = async () => {
        const { violations: found } = await new AxeBuilder({ page }).withTags(RULES).analyze();
        return found.flatMap(({ id, nodes }) => nodes.map(({ target }) => `${id}: ${target.join(' ')}`));
      };
      const team = await signUp(page, 'Inés Quispe');
      await makeStudy(page, team, exampleStudy());
      const { station, ...rest } = example('suri-full-power');
      await makeStudy(page, team, { ...rest, title: 'Refused', station: { ...station, voltageMaxV: 400 } });
      const { id } = await makeStudy(page, team, example('vicuna-one-leg'));
      await openList(page, team);
      await expect(rows(page)).toHaveCount(3);
      expect(await violations()).toEqual([]);
      await page.getByRole('button', { name: 'Import a file' }).click();
      await page.getByLabel('Choose files').setInputFiles([textFile('a.json', '{'), textFile('b.json', '{}')]);
      await expect(page.getByText('Cannot be imported').first()).toBeVisible();
      expect(await violations()).toEqual([]);
      await call(caller(page), 'post', `/workspaces/${team.workspaceId}/studies/${id}/archive`);
      await page.setViewportSize({ width: 390, height: 844 });
      for (const search of ['', '?archive=yes']) {
        await openList(page, team, search);
        await expect(rows(page)).toHaveCount(search ? 1 : 2);
        expect(await violations()).toEqual([]);
        expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBe(390);
      }
      for (const from of ['example', 'file']) {
        await page.goto(`/w/${team.workspaceId}/studies/new?from=${from}`);
        await expect(page.getByRole('heading', { name: 'New study' })).toBeVisible();
        expect(await violations()).toEqual([]);
      }
    });
  });
}
