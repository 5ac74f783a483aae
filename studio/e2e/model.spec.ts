import AxeBuilder from '@axe-core/playwright';
import { expect, test } from './quiet-page.ts';

test('the model page says the engine’s equations, its contents lead to their headings, without violations', async ({
  page,
}) => {
  await page.goto('/');
  await page.getByRole('link', { name: 'Read the model' }).click();
  await expect(page.getByRole('heading', { level: 1, name: 'The model' })).toBeVisible();
  await page.getByRole('link', { name: 'What limits the current' }).click();
  await expect(page.getByRole('heading', { name: '6. What limits the current' })).toBeInViewport();
  expect((await new AxeBuilder({ page }).analyze()).violations.map(({ id }) => id)).toEqual([]);
});

test('a model that cannot be loaded says so, and “Try again” mends it', async ({ browser }) => {
  const page = await browser.newPage();
  await page.route('**/model.md', (route) => route.abort());
  await page.goto('/model');
  await expect(page.getByText('The model could not be loaded')).toBeVisible();
  await page.unroute('**/model.md');
  await page.getByRole('button', { name: 'Try again' }).click();
  await expect(page.getByRole('heading', { level: 1, name: 'The model' })).toBeVisible();
});
