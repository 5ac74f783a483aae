import { expect, test } from '@playwright/test';
import { field, headline } from './quiet-page.ts';

test('a worker that cannot be started is reported, and “Try again” mends it', async ({ page }) => {
  await page.route('**/session-worker*', (route) => route.abort());
  await page.goto('/try');
  const alert = page.getByRole('alert');
  await expect(alert).toContainText('The run broke off', { timeout: 30_000 });
  await page.unroute('**/session-worker*');
  await alert.getByRole('button', { name: 'Try again' }).click();
  await expect(headline(page, '10–80 %')).toContainText(/\d/, { timeout: 30_000 });
  await expect(alert).toHaveCount(0);
  await field(page, 'Current, most').fill('350');
  await expect(headline(page, '10–80 %')).toContainText(/\d/);
});
