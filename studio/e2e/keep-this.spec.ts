import { expect, field, openDesk, test } from './quiet-page.ts';
import { signUp, titleCell } from './team.ts';

test('a guest’s study is carried into the account through signing in, with what waits and with undo', async ({
  page,
  browser,
}) => {
  const somewhereElse = await (await browser.newContext()).newPage();
  const { email } = await signUp(somewhereElse, 'Inés Quispe');
  await somewhereElse.context().close();

  await openDesk(page);
  await field(page, 'Current, most').fill('345');
  await field(page, 'Hot limit to').fill('30');
  await page.getByRole('link', { name: 'Keep this' }).click();
  await page.getByRole('textbox', { name: 'E-mail' }).fill(email);
  await page.getByRole('textbox', { name: 'Password' }).fill('a long enough one');
  await page.getByRole('main').getByRole('button', { name: 'Sign in', exact: true }).click();

  const dialog = page.getByRole('dialog', { name: 'Keep this study' });
  await dialog.getByRole('button', { name: 'Keep in this workspace' }).click();
  await expect(page.getByText('Session study No. 001')).toBeVisible();
  await expect(field(page, 'Current, most')).toHaveValue('345');
  await expect(field(page, 'Hot limit to')).toHaveValue('30.0');
  await expect(titleCell(page, 'Kept')).toContainText('just now');
  await page.getByRole('button', { name: 'Undo Hot limit to' }).click();
  await expect(field(page, 'Hot limit to')).toHaveValue('42.0');
});
