import AxeBuilder from '@axe-core/playwright';
import { readFileSync } from 'node:fs';
import type { Page } from '@playwright/test';
import { expect, field, test } from './quiet-page.ts';
import { call, caller, exampleStudy, join, makeStudy, signUp, titleCell, type Team } from './team.ts';

// The browser names failed calls; these journeys meet conflicts and missing parts on purpose.
test.use({ expectedErrors: /status of 4(04|12)/ });

const RULES = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];

async function violations(page: Page): Promise<string[]> {
  const { violations: found } = await new AxeBuilder({ page }).withTags(RULES).analyze();
  return found.flatMap(({ id, nodes }) =>
    nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')} ${failureSummary}`),
  );
}

type Item = { id: string; revision: number };

/** Adds a part of the example study through the API. */
function addPart(page: Page, { workspaceId }: Team, kind: string, name: string, change: object = {}): Promise<Item> {
  const body = { kind, name, body: { ...exampleStudy()[kind], ...change } };
  return call(caller(page), 'post', `/workspaces/${workspaceId}/library`, { body });
}

const openList = (page: Page, { workspaceId }: Team, search = '') => page.goto(`/w/${workspaceId}/library${search}`);

async function openPart(page: Page, { workspaceId }: Team, { id }: Item): Promise<void> {
  await page.goto(`/w/${workspaceId}/library/${id}`);
  await expect(page.getByRole('group', { name: 'Inputs' })).toBeVisible();
}

async function saveRevision(page: Page, message: string): Promise<void> {
  await page.getByRole('button', { name: 'Save revision' }).click();
  await page.getByRole('textbox', { name: 'What changed' }).fill(message);
  await page.getByRole('dialog').getByRole('button', { name: 'Save', exact: true }).click();
  await expect(page.getByRole('dialog')).toBeHidden();
}

const rows = (page: Page) => page.getByRole('table', { name: 'Parts of the library' }).locator('tbody tr');

test('an engineer adds a station, edits it with what the desk shows, and saves it', async ({ page }) => {
  const team = await signUp(page, 'Inés Quispe');
  await openList(page, team);
  await expect(page.getByText('No parts yet. Add one with “New”, or import a file.')).toBeVisible();
  await page.getByRole('button', { name: 'New', exact: true }).click();
  await page.getByRole('menuitem', { name: 'Station' }).click();
  await page.getByRole('button', { name: 'Add', exact: true }).click();
  await expect(page.getByText('A name is needed')).toBeVisible();
  await page.getByRole('textbox', { name: 'Name' }).fill('Salar Tola 150');
  await page.getByRole('button', { name: 'Add', exact: true }).click();
  await expect(page.getByRole('textbox', { name: 'Name of the part' })).toHaveValue('Salar Tola 150');
  await expect(page.getByRole('button', { name: 'Save revision' })).toHaveAttribute('aria-disabled', 'true');
  await expect(page.locator('.part-preview .say')).toContainText(/of its|ends/, { timeout: 30_000 });

  await field(page, 'Power, most').fill('15o');
  await expect(page.getByText('Must be a number, but is “15o”.', { exact: false })).toBeVisible();
  await expect(page.getByText('Mend what waits first')).toBeVisible();
  await page.reload();
  await expect(field(page, 'Power, most')).toHaveValue('15o');
  await field(page, 'Power, most').fill('150');
  await page.getByRole('textbox', { name: 'Source' }).fill('Plate of the cabinet');
  await expect(titleCell(page, 'Your changes')).toHaveText('kept in this browser');
  await saveRevision(page, '150 kW cabinet');
  await expect(titleCell(page, 'Revision')).toHaveText('2');
  await expect(titleCell(page, 'Your changes')).toHaveText('none');
  await expect(page.getByText('150 kW cabinet')).toBeVisible();

  await openList(page, team);
  await expect(rows(page)).toHaveCount(1);
  await expect(rows(page).first()).toContainText('Salar Tola 150');
  await expect(rows(page).first()).toContainText('150 kW, 500 A, 200 to 920 V');
});

test('a pack is revised, compared, restored and archived; its studies are named', async ({ page }) => {
  const team = await signUp(page, 'Inés Quispe');
  const pack = await addPart(page, team, 'pack', 'Vicuña 110');
  await makeStudy(page, team, exampleStudy(), [{ part: 'pack', itemId: pack.id, revision: 1 }]);
  await openPart(page, team, pack);
  await expect(page.getByRole('heading', { name: 'In 1 study' })).toBeVisible();
  await field(page, 'Charge current, most').fill('470');
  await saveRevision(page, 'Weaker fuses');
  await expect(page.getByText('holds revision 1', { exact: true })).toBeVisible();

  await page.getByRole('button', { name: 'Compare revision 1 with the newest' }).click();
  await expect(page).toHaveURL(/compare=1\.\.2/);
  const differences = page.getByRole('table', { name: 'What differs between revisions 1 and 2' });
  await expect(differences.locator('tbody tr')).toHaveCount(1);
  await expect(differences).toContainText('500 A');
  await expect(differences).toContainText('470 A');
  await page.reload();
  await expect(differences).toContainText('470 A');

  await page.getByRole('button', { name: 'Restore revision 1' }).click();
  await page.getByRole('alertdialog').getByRole('button', { name: 'Restore' }).click();
  await expect(titleCell(page, 'Revision')).toHaveText('3');
  await expect(field(page, 'Charge current, most')).toHaveValue('500');

  await page.getByRole('button', { name: 'Archive', exact: true }).click();
  await expect(page.getByText('One study uses it and keeps what it took.', { exact: false })).toBeVisible();
  await page.getByRole('alertdialog').getByRole('button', { name: 'Archive' }).click();
  await expect(titleCell(page, 'Revision')).toHaveText('3, in the archive');
  await expect(field(page, 'Charge current, most')).toHaveAttribute('readonly');
  await openList(page, team);
  await expect(page.getByText('No parts yet', { exact: false })).toBeVisible();
  await page.getByRole('button', { name: 'Show the archive' }).click();
  await expect(page).toHaveURL(/archived=yes/);
  await rows(page).getByRole('link', { name: 'Vicuña 110' }).click();
  await page.getByRole('button', { name: 'Take out of the archive' }).click();
  await expect(titleCell(page, 'Revision')).toHaveText('3');
  await expect(field(page, 'Charge current, most')).not.toHaveAttribute('readonly');
});

test('the address holds what is listed', async ({ page }) => {
  const team = await signUp(page, 'Inés Quispe');
  await addPart(page, team, 'pack', 'Vicuña 110');
  await addPart(page, team, 'station', 'Salar Tola 150');
  await addPart(page, team, 'station', 'Salar Cima 350');
  await openList(page, team);
  await page.getByRole('radio', { name: 'stations' }).click();
  await expect(rows(page)).toHaveCount(2);
  await page.getByRole('searchbox').fill('cim');
  await expect(rows(page)).toHaveCount(1);
  await expect(page).toHaveURL(/kind=station&q=cim/);
  await page.reload();
  await expect(rows(page)).toHaveCount(1);
  await expect(page.getByText('1 station in Puna Mobility found for “cim”')).toBeVisible();
  await page.getByRole('searchbox').fill('nowhere');
  await page.getByRole('button', { name: 'Show all parts' }).click();
  await expect(rows(page)).toHaveCount(3);
  await page.getByRole('button', { name: 'Name' }).click();
  await expect(rows(page).first()).toContainText('Vicuña 110');
  await expect(page).toHaveURL(/order=desc/);
});

test('parts are exported and imported into another workspace; a wrong file says where', async ({ page }, info) => {
  const first = await signUp(page, 'Inés Quispe');
  await addPart(page, first, 'station', 'Salar Tola 150');
  await addPart(page, first, 'strategy', 'Vicuña ledges 7');
  await openList(page, first);
  await page.getByRole('button', { name: 'Export' }).click();
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('menuitem', { name: 'All parts' }).click(),
  ]);
  const path = info.outputPath('library.json');
  await download.saveAs(path);
  const file = JSON.parse(readFileSync(path, 'utf8')) as { items: { body: Record<string, unknown> }[] };
  expect(file.items).toHaveLength(2);

  const second = await signUp(page, 'Rosa Mamani');
  await addPart(page, second, 'station', 'Salar Tola 150', { powerMaxKw: 90 });
  await openList(page, second);
  const chosen = page.getByLabel('Library file');
  const wrong = structuredClone(file);
  wrong.items[0]!.body.powerMaxKw = -1;
  const json = (value: object) => ({
    name: 'library.json',
    mimeType: 'application/json',
    buffer: Buffer.from(JSON.stringify(value)),
  });
  await chosen.setInputFiles(json(wrong));
  const issues = page.getByRole('table', { name: 'What is wrong with the file' });
  await expect(issues).toContainText('Station “Salar Tola 150”');
  await expect(issues).toContainText('powerMaxKw must be above 0, but is -1');
  await page.keyboard.press('Escape');

  await chosen.setInputFiles(json(file));
  const plan = page.getByRole('table', { name: 'What will become of each part' });
  await expect(plan.getByRole('row', { name: /Salar Tola 150/ })).toContainText('gets a revision');
  await expect(plan.getByRole('row', { name: /Vicuña ledges 7/ })).toContainText('will be added');
  await page.getByRole('radio', { name: 'leave it' }).click();
  await expect(plan.getByRole('row', { name: /Salar Tola 150/ })).toContainText('stays as it is');
  await page.getByRole('radio', { name: 'save a revision of it' }).click();
  await page.getByRole('button', { name: 'Import', exact: true }).click();
  await expect(page.getByText('Imported: 1 added, 1 revised, 0 left as they are.')).toBeVisible();
  await expect(rows(page)).toHaveCount(2);
});

test('two tabs change one part: both are shown, and either can be kept', async ({ page, context }) => {
  const team = await signUp(page, 'Inés Quispe');
  const station = await addPart(page, team, 'station', 'Salar Tola 150');
  await openPart(page, team, station);
  await field(page, 'Power, most').fill('140');
  // The same person elsewhere: what one tab keeps, the other would find.
  const { id } = station;
  const body = { ...exampleStudy().station, name: 'Salar Tola 150', currentMaxA: 400 };
  const theirs = { name: 'Salar Tola 150', notes: '', source: '', body, message: 'Thinner cable' };
  const revisions = `/workspaces/${team.workspaceId}/library/${id}/revisions`;
  await call(caller(page), 'post', revisions, { body: theirs, ifMatch: '"r1"' });
  await page.getByRole('button', { name: 'Save revision' }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Save', exact: true }).click();
  const conflict = page.getByRole('region', { name: 'Two people changed this part' });
  await expect(conflict).toContainText('saved revision 2');
  const changed = (by: string) => conflict.getByRole('table', { name: by });
  await expect(changed('Changed by you')).toContainText('140 kW');
  await expect(changed('Changed by you')).not.toContainText('400 A');
  await expect(changed('Changed in revision 2')).toContainText('400 A');
  expect(await violations(page)).toEqual([]);

  await conflict.getByRole('button', { name: 'Take theirs' }).click();
  await expect(field(page, 'Current, most')).toHaveValue('400');
  await expect(field(page, 'Power, most')).not.toHaveValue('140');
  await page.getByRole('button', { name: 'Bring my changes back' }).click();
  await expect(field(page, 'Power, most')).toHaveValue('140');
  await page.getByRole('button', { name: 'Discard changes' }).click();
  await field(page, 'Power, most').fill('145');
  await call(caller(page), 'post', revisions, { body: { ...theirs, notes: 'x', message: '' }, ifMatch: '"r2"' });
  await page.getByRole('button', { name: 'Save revision' }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Save', exact: true }).click();
  await conflict.getByRole('button', { name: 'Keep mine on top of theirs' }).click();
  await expect(field(page, 'Power, most')).toHaveValue('145');
  await expect(page.getByRole('textbox', { name: 'Notes' })).toHaveValue('x');
  await saveRevision(page, 'Both');
  await expect(titleCell(page, 'Revision')).toHaveText('4');

  const other = await context.newPage();
  await openPart(other, team, station);
  await expect(field(other, 'Power, most')).toHaveValue('145');
});

test('a page with changes is left only knowingly, and they are there on the way back', async ({ page }) => {
  const team = await signUp(page, 'Inés Quispe');
  const pack = await addPart(page, team, 'pack', 'Vicuña 110');
  await openPart(page, team, pack);
  await field(page, 'Cells in series').fill('100');
  await page.getByRole('link', { name: 'Library' }).click();
  const question = page.getByRole('alertdialog');
  await question.getByRole('button', { name: 'Stay' }).click();
  await expect(field(page, 'Cells in series')).toHaveValue('100');
  await page.getByRole('link', { name: 'Library' }).click();
  await question.getByRole('button', { name: 'Leave' }).click();
  await rows(page).getByRole('link', { name: 'Vicuña 110' }).click();
  await expect(field(page, 'Cells in series')).toHaveValue('100');
});

test('a vehicle and a route are edited, with undo and with stations of the library', async ({ page }) => {
  const team = await signUp(page, 'Inés Quispe');
  await addPart(page, team, 'station', 'Salar Tola 150');
  for (const kind of ['Vehicle', 'Route']) {
    await openList(page, team);
    await page.getByRole('button', { name: 'New', exact: true }).click();
    await page.getByRole('menuitem', { name: kind }).click();
    await page.getByRole('textbox', { name: 'Name' }).fill(`${kind} of the plain`);
    await page.getByRole('button', { name: 'Add', exact: true }).click();
    await expect(page.getByRole('textbox', { name: 'Name of the part' })).toHaveValue(`${kind} of the plain`);
    if (kind === 'Route') break;
    await field(page, 'Mass').fill('3100');
    await page.getByRole('textbox', { name: 'Cabin, row 1' }).fill('5000');
    await page.getByRole('button', { name: 'Undo row 1, cabin' }).click();
    await expect(page.getByText('was 2950')).toBeVisible();
    await saveRevision(page, 'Loaded');
  }
  await page.getByRole('combobox', { name: 'After leg 2' }).selectOption({ label: 'Salar Tola 150, of the library' });
  await page.getByRole('textbox', { name: 'Distance, leg 1' }).fill('0');
  await expect(page.getByText(/Leg 1, distance: Must be above 0 km, but is 0 km/)).toBeVisible();
  await page.getByRole('textbox', { name: 'Distance, leg 1' }).fill('130');
  await page.getByRole('combobox', { name: 'Depart' }).last().selectOption('At a soc');
  await field(page, 'Depart at').last().fill('70');
  await saveRevision(page, 'A stop at the end');
  await page.getByRole('button', { name: 'Compare revision 1 with the newest' }).click();
  const differences = page.getByRole('table', { name: 'What differs between revisions 1 and 2' });
  await expect(differences).toContainText('Salar Tola 150');
  await expect(differences).toContainText('at 70 %');
});

test('a viewer is offered no edit and reads everything', async ({ page, browser }) => {
  const team = await signUp(page, 'Inés Quispe');
  const pack = await addPart(page, team, 'pack', 'Vicuña 110');
  const guest = await (await browser.newContext()).newPage();
  await join(page, guest, team, 'Tomás Apaza', 'viewer');
  await openList(guest, team);
  await expect(rows(guest)).toHaveCount(1);
  await expect(guest.getByRole('button', { name: 'New', exact: true })).toHaveCount(0);
  await expect(guest.getByRole('button', { name: 'Import a file' })).toHaveCount(0);
  await openPart(guest, team, pack);
  await expect(guest.getByRole('heading', { name: 'Vicuña 110', level: 1 })).toBeVisible();
  await expect(field(guest, 'Charge current, most')).toHaveValue('500');
  await expect(field(guest, 'Charge current, most')).toHaveAttribute('readonly');
  for (const name of ['Save revision', 'Archive', 'Restore revision 1', 'Add a ledge', /^Undo/])
    await expect(guest.getByRole('button', { name })).toHaveCount(0);
  await expect(guest.getByRole('button', { name: 'Export' })).toBeVisible();
  await guest.goto(`/w/${team.workspaceId}/library/${'0'.repeat(26)}`);
  await expect(guest.getByRole('heading', { name: 'No such part' })).toBeVisible();
  await guest.context().close();
});

for (const colorScheme of ['light', 'dark'] as const) {
  test.describe(colorScheme, () => {
    test.use({ colorScheme });

    test('the library and its parts have no violations', async ({ page }) => {
      const team = await signUp(page, 'Inés Quispe');
      const strategy = await addPart(page, team, 'strategy', 'Vicuña ledges 7');
      await openList(page, team);
      await expect(rows(page)).toHaveCount(1);
      expect(await violations(page)).toEqual([]);
      await openPart(page, team, strategy);
      await field(page, 'End current').fill('12');
      await saveRevision(page, 'Longer end');
      await page.getByRole('button', { name: 'Compare revision 1 with the newest' }).click();
      await field(page, 'Hot limit to').fill('3o');
      await expect(page.getByRole('table', { name: /What differs/ })).toBeVisible();
      expect(await violations(page)).toEqual([]);
    });
  });
}

test.describe('on a telephone', () => {
  test.use({ viewport: { width: 390, height: 844 } });

  test('the library and a part have no violations and nothing scrolls sideways', async ({ page }) => {
    const team = await signUp(page, 'Inés Quispe');
    const strategy = await addPart(page, team, 'strategy', 'Vicuña ledges 7');
    const width = () => page.evaluate(() => document.documentElement.scrollWidth);
    await openList(page, team);
    await expect(page.getByRole('link', { name: 'Vicuña ledges 7' })).toBeVisible();
    expect(await violations(page)).toEqual([]);
    expect(await width()).toBeLessThanOrEqual(390);
    await openPart(page, team, strategy);
    expect(await violations(page)).toEqual([]);
    expect(await width()).toBeLessThanOrEqual(390);
  });
});
