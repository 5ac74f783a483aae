import { expect, field, minutesOf, numberOf, openDesk, test } from './quiet-page.ts';

test('the desk can be worked with keys alone', async ({ page }) => {
  await openDesk(page);
  // From the top of the page to the station's current.
  await page.keyboard.press('Tab');
  await expect(page.getByRole('link', { name: 'To the content' })).toBeFocused();
  const reached = async (name: string) => {
    for (let i = 0; i < 80; i++) {
      if (await field(page, name).evaluate((input) => input === document.activeElement)) return;
      await page.keyboard.press('Tab');
    }
    throw new Error(`Tab does not reach ${name}`);
  };
  await reached('Current, most');
  const before = await numberOf(page, '10–80 %');
  await page.keyboard.press('Alt+b');
  for (let i = 0; i < 3; i++) await page.keyboard.press('Shift+ArrowDown');
  await expect(field(page, 'Current, most')).toHaveValue('350');
  await expect.poll(() => numberOf(page, '10–80 %')).toBeGreaterThan(before);
  await page.keyboard.press('Control+z');
  await expect(field(page, 'Current, most')).toHaveValue('500');
  await expect.poll(() => numberOf(page, '10–80 %')).toBe(before);
  await page.keyboard.press('Control+Shift+z');
  await expect(field(page, 'Current, most')).toHaveValue('350');

  // A ledge is moved, and one deleted, from within its cells.
  await reached('Current, ledge 2');
  const rows = page.getByRole('textbox', { name: /^Current, ledge/ });
  const count = await rows.count();
  const value = await field(page, 'Current, ledge 2').inputValue();
  await page.keyboard.press('Alt+ArrowUp');
  await expect(field(page, 'Current, ledge 1')).toHaveValue(value);
  await expect(field(page, 'Current, ledge 1')).toBeFocused();
  await page.keyboard.press('Control+z');
  await page.keyboard.press('Alt+Delete');
  await expect(rows).toHaveCount(count - 1);
  await page.keyboard.press('Control+z');
  await expect(rows).toHaveCount(count);
  expect(await minutesOf(page, 'station current')).toBeGreaterThan(10);
});

test('the list of keys opens with a question mark and closes with Escape', async ({ page }) => {
  await openDesk(page);
  await page.keyboard.press('?');
  await expect(page.getByRole('dialog', { name: 'Keys' })).toBeVisible();
  await page.keyboard.press('Escape');
  await expect(page.getByRole('dialog', { name: 'Keys' })).toHaveCount(0);
});

test('a label opens its help, and Escape leads back to it', async ({ page }) => {
  await openDesk(page);
  const label = page.getByRole('button', { name: 'Current, most', exact: true });
  await label.focus();
  await page.keyboard.press('Enter');
  await expect(page.getByRole('dialog', { name: 'Current, most' })).toContainText('Most current of the station');
  await page.keyboard.press('Escape');
  await expect(label).toBeFocused();
});
