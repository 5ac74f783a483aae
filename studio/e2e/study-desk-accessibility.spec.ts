import AxeBuilder from '@axe-core/playwright';
import type { Page } from '@playwright/test';
import { expect, field, test } from './quiet-page.ts';
import { call, caller, exampleStudy, makeStudy, openStudy, signUp } from './team.ts';

test.describe.configure({ timeout: 240_000 });
test.use({ expectedErrors: /status of 412/ });

const RULES = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];

async function violations(page: Page): Promise<string[]> {
  const { violations: found } = await new AxeBuilder({ page }).withTags(RULES).analyze();
  return found.flatMap(({ id, nodes }) =>
    nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')} ${failureSummary}`),
  );
}

type Copy = { working: { version: number; inputs: { session: object } } };

/** A study with a station of the library that has moved on. */
async function studyOnDesk(page: Page) {
  const team = await signUp(page, 'Inés Quispe');
  const inputs = exampleStudy();
  const library = `/workspaces/${team.workspaceId}/library`;
  const common = { name: 'Salar Tola 500 A', notes: '', source: 'invented' };
  const item = await call<{ id: string }>(caller(page), 'post', library, {
    body: { kind: 'station', ...common, body: inputs.station! },
  });
  await call(caller(page), 'post', `${library}/${item.id}/revisions`, {
    body: { ...common, body: { ...inputs.station, currentMaxA: 400 } },
    ifMatch: '"r1"',
  });
  const { id } = await makeStudy(page, team, inputs, [{ part: 'station', itemId: item.id, revision: 1 }]);
  await openStudy(page, team, id);
  return { address: `/workspaces/${team.workspaceId}/studies/${id}` };
}

/** Somebody else saves the study before the desk does. */
async function meetConflict(page: Page, address: string) {
  const { working } = await call<Copy>(caller(page), 'get', address);
  const inputs = { ...working.inputs, session: { ...working.inputs.session, ambientC: 12 } };
  await call(caller(page), 'put', `${address}/working`, { body: { inputs }, ifMatch: `"w${working.version}"` });
  await field(page, 'Current, most').fill('333');
}

for (const colorScheme of ['light', 'dark'] as const) {
  test.describe(colorScheme, () => {
    test.use({ colorScheme });

    test('a study on the desk, its dialogs, its history and a conflict have no violations', async ({ page }) => {
      const { address } = await studyOnDesk(page);
      await expect(page.getByRole('group', { name: 'Station', exact: true })).toContainText('Revision 2 exists');
      expect(await violations(page)).toEqual([]);

      await page.getByRole('button', { name: 'From the library: station' }).click();
      await expect(page.getByRole('button', { name: /^Salar Tola 500 A/ })).toBeVisible();
      expect(await violations(page)).toEqual([]);
      await page.keyboard.press('Escape');

      await field(page, 'Current, most').fill('350');
      await page.getByRole('button', { name: 'Save revision' }).click();
      await expect(page.getByRole('dialog').getByRole('table')).toBeVisible();
      expect(await violations(page)).toEqual([]);
      await page.keyboard.press('Escape');

      await page.getByRole('button', { name: 'History' }).click();
      await page.getByRole('button', { name: 'What changed' }).click();
      await expect(page.getByRole('region', { name: 'History' }).getByRole('table')).toBeVisible();
      expect(await violations(page)).toEqual([]);

      await meetConflict(page, address);
      await expect(page.getByRole('dialog', { name: 'Changed in two places' })).toBeVisible();
      expect(await violations(page)).toEqual([]);
    });
  });
}

test.describe('on a telephone', () => {
  test.use({ viewport: { width: 390, height: 844 } });

  test('nothing scrolls sideways, and what is pressed is large enough', async ({ page }) => {
    await studyOnDesk(page);
    await page.getByRole('button', { name: 'Inputs' }).click();
    const take = page.getByRole('button', { name: /^Take revision 2/ });
    await expect(take).toBeVisible();
    expect((await take.boundingBox())!.height).toBeGreaterThanOrEqual(44);
    await page.getByRole('button', { name: 'History', exact: true }).first().click();
    await page.getByRole('group', { name: 'Part of the desk' }).getByRole('button', { name: 'History' }).click();
    expect((await page.getByRole('button', { name: 'What changed' }).boundingBox())!.height).toBeGreaterThanOrEqual(44);
    expect(await violations(page)).toEqual([]);
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
  });
});
