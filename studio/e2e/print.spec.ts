import { expect, openDesk, test } from './quiet-page.ts';

test.use({ colorScheme: 'dark' });

test('the desk prints by day, on the width of the paper, its numbers in five columns', async ({ page }) => {
  await openDesk(page);
  const widest = () =>
    page.locator('.res svg').evaluateAll((all) => Math.max(...all.map((svg) => svg.getBoundingClientRect().width)));
  const onScreen = await widest();
  const paper = () => page.evaluate(() => getComputedStyle(document.body).backgroundColor);
  const byNight = await paper();

  await page.evaluate(() => window.dispatchEvent(new Event('beforeprint')));
  await page.emulateMedia({ media: 'print', colorScheme: 'dark' });
  await page.setViewportSize({ width: 718, height: 1000 });
  expect(await widest()).toBeLessThanOrEqual(718);
  expect(await paper()).not.toBe(byNight);
  const columns = await page.locator('.heads').evaluate((heads) => getComputedStyle(heads).gridTemplateColumns);
  expect(columns.split(' ')).toHaveLength(5);
  // The line's own colour is that of the night; printed it is the token's, dark on paper.
  const line = page.locator('.tracelive-stationKw .js-line');
  expect(await line.evaluate((path) => getComputedStyle(path).stroke)).toBe('rgb(28, 34, 39)');

  await page.emulateMedia({ media: 'screen', colorScheme: 'dark' });
  await page.setViewportSize({ width: 1280, height: 720 });
  await page.evaluate(() => window.dispatchEvent(new Event('afterprint')));
  await expect.poll(widest).toBe(onScreen);
});
