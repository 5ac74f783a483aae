import { expect, test as base, type Page } from '@playwright/test';

/** Errors of the page and its console; a journey that leaves any behind has failed. */
export const test = base.extend<{ expectedErrors: RegExp | null; quiet: void }>({
  /** What the browser says of calls that a journey means to fail. */
  expectedErrors: [null, { option: true }],
  quiet: [
    async ({ page, expectedErrors }, use) => {
      const heard: string[] = [];
      page.on('console', (message) => {
        if (message.type() === 'error') heard.push(message.text());
      });
      page.on('pageerror', (error) => heard.push(error.message));
      await use();
      expect(heard.filter((line) => !expectedErrors?.test(line))).toEqual([]);
    },
    { auto: true },
  ],
});

export { expect };

/** Plotly is 4.5 MB, and a busy machine takes its time to read it. */
const FIRST_DRAWING_MS = 30_000;

/** The desk with its first result drawn. */
export async function openDesk(page: Page): Promise<void> {
  await page.goto('/try');
  await expect(headline(page, '10–80 %')).toContainText(/\d/, { timeout: FIRST_DRAWING_MS });
  await expect(page.locator('.js-plotly-plot').first()).toBeVisible({ timeout: FIRST_DRAWING_MS });
}

/** One of the ten numbers, by its caption. */
export function headline(page: Page, caption: string) {
  return page
    .locator('.heads > div')
    .filter({ has: page.getByText(caption, { exact: true }) })
    .locator('.v');
}

/** A headline number as a number. */
export async function numberOf(page: Page, caption: string): Promise<number> {
  return Number.parseFloat(await headline(page, caption).innerText());
}

export const field = (page: Page, name: string) => page.getByRole('textbox', { name, exact: true });

export async function loadExample(page: Page, title: RegExp): Promise<void> {
  await page.getByRole('button', { name: 'Examples', exact: true }).click();
  await page.getByRole('menuitem', { name: title }).click();
}

/** Minutes that a limit held, from the list under the strips; 0 where it is not listed. */
export async function minutesOf(page: Page, limit: string): Promise<number> {
  const row = page.getByLabel('Minutes per limit').locator('div').filter({ hasText: limit });
  return (await row.count()) === 0 ? 0 : Number.parseFloat(await row.locator('.num').first().innerText());
}
