import { readFile } from 'node:fs/promises';
import type { Download, Page } from '@playwright/test';
import { expect, field, headline, loadExample, minutesOf, numberOf, openDesk, test } from './quiet-page.ts';

const studyMenu = async (page: Page, item: string) => {
  await page.getByRole('button', { name: 'Study', exact: true }).click();
  await page.getByRole('menuitem', { name: item }).click();
};

async function saved(page: Page, act: () => Promise<void>): Promise<{ download: Download; text: string }> {
  const waiting = page.waitForEvent('download');
  await act();
  const download = await waiting;
  return { download, text: await readFile(await download.path(), 'utf8') };
}

test('a weaker station moves the limit band and the minutes, against a kept baseline', async ({ page }) => {
  await openDesk(page);
  await loadExample(page, /^Vicuña, warm arrival/);
  await expect(field(page, 'Current, most')).toHaveValue('500');
  const before = await numberOf(page, '10–80 %');
  const heldBefore = await minutesOf(page, 'station current');
  await page.getByRole('button', { name: 'Keep as baseline', exact: true }).click();

  await field(page, 'Current, most').fill('350');
  await expect.poll(() => numberOf(page, '10–80 %')).not.toBe(before);
  const after = await numberOf(page, '10–80 %');
  expect(after).toBeGreaterThan(before);
  expect(await minutesOf(page, 'station current')).toBeGreaterThan(heldBefore + 5);

  // The baseline stays beside it, and the difference is said in words.
  const number = headline(page, '10–80 %').locator('..');
  await expect(number).toContainText(before.toFixed(1));
  await expect(number).toContainText(`${(after - before).toFixed(1)} slower`);
  await expect(page.locator('.f').filter({ hasText: 'Current, most' }).first()).toContainText('was 500');
  await expect(page.getByText('1 input', { exact: true })).toBeVisible();
});

test('CSV has units and cautions; a saved study opens with the same numbers', async ({ page }) => {
  await openDesk(page);
  await field(page, 'Current, most').fill('350');
  await expect(page.getByText('just now')).toBeVisible();
  const minutes = await numberOf(page, '10–80 %');

  await page.getByRole('button', { name: 'Export', exact: true }).click();
  const csv = await saved(page, () => page.getByRole('menuitem', { name: 'Series as CSV' }).click());
  expect(csv.download.suggestedFilename()).toBe('vicuna-at-salar-tola-warm-arrival-series.csv');
  expect(csv.text).toMatch(/^\uFEFF?# Vicuña/);
  expect(csv.text).toContain('A simulation is not a test.');
  expect(csv.text).toContain('time [s],soc [-],pack current [A]');

  const study = await saved(page, () => studyMenu(page, 'Save the study'));
  expect(JSON.parse(study.text)).toMatchObject({ format: 'voltiplano/study', station: { currentMaxA: 350 } });

  await loadExample(page, /^Suri, full power/);
  await expect.poll(() => numberOf(page, '10–80 %')).not.toBe(minutes);
  const picking = page.waitForEvent('filechooser');
  await studyMenu(page, 'Open a study file');
  await (await picking).setFiles(await study.download.path());
  await expect(field(page, 'Current, most')).toHaveValue('350');
  await expect.poll(() => numberOf(page, '10–80 %')).toBe(minutes);
  const again = await saved(page, () => studyMenu(page, 'Save the study'));
  expect(again.text).toBe(study.text);
});

test('a file that is no study is answered with path, rule and value, and nothing is lost', async ({ page }) => {
  await openDesk(page);
  await field(page, 'Current, most').fill('351');
  const bad = JSON.stringify({ format: 'voltiplano/study', version: 1, kind: 'session', station: { currentMaxA: -3 } });
  await page.getByLabel('Study file').setInputFiles({
    name: 'bad.json',
    mimeType: 'application/json',
    buffer: Buffer.from(bad),
  });
  const dialog = page.getByRole('dialog', { name: 'Not opened' });
  await expect(dialog.getByRole('row').filter({ hasText: 'station.currentMaxA' })).toContainText('-3');
  await page.keyboard.press('Escape');
  await expect(field(page, 'Current, most')).toHaveValue('351');
});

test('an invalid input says why and keeps the last good curves', async ({ page }) => {
  await openDesk(page);
  const minutes = await headline(page, '0–100 %').innerText();
  await field(page, 'Hot limit to').fill('30');
  await expect(field(page, 'Hot limit to')).toHaveAttribute('aria-invalid', 'true');
  await expect(
    page.getByText('Must lie above “Hot limit from” (34 °C), but is 30 °C. The curves still use 42.0.'),
  ).toBeVisible();
  await expect(
    page.getByRole('status').filter({ hasText: 'keep the last good value of “Hot limit to”' }),
  ).toBeVisible();
  expect(await headline(page, '0–100 %').innerText()).toBe(minutes);
  await field(page, 'Hot limit to').fill('44');
  await expect(field(page, 'Hot limit to')).not.toHaveAttribute('aria-invalid');
  await expect.poll(() => headline(page, '0–100 %').innerText()).not.toBe(minutes);
});

test('a session that cannot start says so and leaves the last result in sight', async ({ page }) => {
  await openDesk(page);
  await field(page, 'Voltage, highest').fill('250');
  await expect(page.getByRole('alert')).toContainText(/Cannot start/);
  await expect(headline(page, '10–80 %')).toContainText(/\d/);
  await page.keyboard.press('Control+z');
  await expect(page.getByRole('alert')).toHaveCount(0);
});

test('a reload keeps study, what waits, baseline, undo and what is shown', async ({ page }) => {
  await openDesk(page);
  await page.getByRole('button', { name: 'Keep as baseline', exact: true }).click();
  await field(page, 'Current, most').fill('350');
  await field(page, 'Anode margin').fill('28x');
  await page.getByRole('radio', { name: 'over soc' }).click();
  await page.getByRole('button', { name: 'anode', exact: true }).click();
  await page.reload();
  await expect(field(page, 'Current, most')).toHaveValue('350');
  await expect(field(page, 'Anode margin')).toHaveValue('28x');
  await expect(page.getByRole('radio', { name: 'over soc' })).toBeChecked();
  await expect(page.getByRole('button', { name: 'anode', exact: true })).toHaveAttribute('aria-pressed', 'false');
  await expect(page.locator('.f').filter({ hasText: 'Current, most' }).first()).toContainText('was 500');
  await page.getByRole('button', { name: /^Undo / }).click();
  await expect(field(page, 'Anode margin')).toHaveValue('28');
  await page.getByRole('button', { name: /^Undo / }).click();
  await expect(field(page, 'Current, most')).toHaveValue('500');
});

test('a copied link opens the same study elsewhere', async ({ page, context, browser }) => {
  await context.grantPermissions(['clipboard-read', 'clipboard-write']);
  await openDesk(page);
  await field(page, 'Current, most').fill('345');
  await studyMenu(page, 'Copy a link');
  await expect(page.getByText('Link copied.', { exact: false })).toBeVisible();
  const link = await page.evaluate(() => navigator.clipboard.readText());
  const elsewhere = await (await browser.newContext()).newPage();
  await elsewhere.goto(link);
  await expect(field(elsewhere, 'Current, most')).toHaveValue('345');
  expect(new URL(elsewhere.url()).hash).toBe('');
});

test('a table pasted from a spreadsheet replaces the ledges, and a bad cell is named', async ({ page, context }) => {
  await context.grantPermissions(['clipboard-read', 'clipboard-write']);
  await openDesk(page);
  await page.evaluate(() => navigator.clipboard.writeText('soc\tA\n0\t400,5\n50\tabc\n80\t120'));
  await field(page, 'From soc, ledge 1').focus();
  await page.keyboard.press('Control+v');
  await expect(field(page, 'Current, ledge 1')).toHaveValue('400.5');
  await expect(page.getByText('Ledge 2, current: Must be a number, but is “abc”.')).toBeVisible();
  await field(page, 'Current, ledge 2').fill('250');
  await expect(page.getByText('Must be a number')).toHaveCount(0);
  await expect(field(page, 'From soc, ledge 4')).toHaveCount(0);
});

test('strips and ledger are saved as drawings that stand alone', async ({ page }) => {
  await openDesk(page);
  const exported = (item: string) =>
    saved(page, async () => {
      await page.getByRole('button', { name: 'Export', exact: true }).click();
      await page.getByRole('menuitem', { name: item }).click();
    });
  const strips = await exported('Strips as SVG');
  expect(strips.download.suggestedFilename()).toBe('vicuna-at-salar-tola-warm-arrival-strips.svg');
  expect(strips.text).toContain('A simulation is not a test');
  expect(strips.text).not.toContain('var(--');
  const ledger = await exported('Ledger as PNG');
  const signature = (await readFile(await ledger.download.path())).subarray(1, 4).toString();
  expect(signature).toBe('PNG');
});

test('degrees Fahrenheit are for the eye alone: the study keeps its Celsius', async ({ page }) => {
  await openDesk(page);
  await page.getByRole('button', { name: 'Display' }).click();
  await page.getByRole('menuitemradio', { name: '°F' }).click();
  await page.keyboard.press('Escape');
  await expect(field(page, 'Hot limit from')).toHaveValue('93.2');
  await field(page, 'Ambient').fill('77');
  await expect(page.getByText('just now')).toBeVisible();
  const { text } = await saved(page, () => studyMenu(page, 'Save the study'));
  expect(JSON.parse(text)).toMatchObject({
    session: { ambientC: 25 },
    strategy: { hotDerate: { fromC: 34, toC: 42 } },
  });
});
