import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { expect, field, openDesk, test } from './quiet-page.ts';

test.describe.configure({ timeout: 180_000 });

const RULES = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];

async function violations(page: Page, without: string[] = []): Promise<string[]> {
  const { violations: found } = await new AxeBuilder({ page }).withTags(RULES).disableRules(without).analyze();
  return found.flatMap(({ id, nodes }) =>
    nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')} ${failureSummary}`),
  );
}

for (const colorScheme of ['light', 'dark'] as const) {
  test.describe(colorScheme, () => {
    test.use({ colorScheme });

    test('the landing page has no violations', async ({ page }) => {
      await page.goto('/');
      await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
      expect(await violations(page)).toEqual([]);
    });

    test('the desk has no violations, with all sections open, a baseline, a change and an error', async ({ page }) => {
      await openDesk(page);
      await page.getByRole('button', { name: 'Keep as baseline', exact: true }).click();
      for (const name of ['Inlet', 'Boost', 'Cell', 'Cooling'])
        await page.getByRole('heading', { name, exact: true }).click();
      const more = page.getByRole('button', { name: /more inputs?$/ });
      while ((await more.count()) > 0) await more.first().click();
      await field(page, 'Charge current, most').fill('350');
      await field(page, 'Hot limit to').fill('30');
      await expect(field(page, 'Hot limit to')).toHaveAttribute('aria-invalid', 'true');
      expect(await violations(page)).toEqual([]);
    });

    test('menus and dialogs have no violations', async ({ page }) => {
      await openDesk(page);
      await page.getByRole('button', { name: 'Examples', exact: true }).click();
      await expect(page.getByRole('menu')).toBeVisible();
      // An open menu stands at the end of the document, outside its landmarks, and takes the focus there.
      expect(await violations(page, ['region'])).toEqual([]);
      await page.keyboard.press('Escape');
      await page.keyboard.press('?');
      await expect(page.getByRole('dialog')).toBeVisible();
      expect(await violations(page)).toEqual([]);
    });
  });
}

test.describe('on a telephone', () => {
  test.use({ viewport: { width: 390, height: 844 } });

  test('the desk has no violations on either side and nothing scrolls sideways', async ({ page }) => {
    await openDesk(page);
    expect(await violations(page)).toEqual([]);
    const parts = page.getByRole('group', { name: 'Part of the desk' });
    await parts.getByRole('button', { name: 'Inputs' }).click();
    await expect(field(page, 'Current, most')).toBeVisible();
    expect((await field(page, 'Current, most').locator('..').boundingBox())!.height).toBeGreaterThanOrEqual(44);
    expect(await violations(page)).toEqual([]);
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
  });
});
