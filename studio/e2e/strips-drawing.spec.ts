import type { Page } from '@playwright/test';
import { expect, field, openDesk, test } from './quiet-page.ts';

type Lines = Record<string, string>;
type Moved = { lines: Lines; ground: string; byHand: boolean };
type Watched = { firstData: unknown; lines: () => Lines; moved: Promise<Moved> };
type PlotElement = HTMLElement & { data: unknown };

/** Watches Plotly's lines: what they are in the very turn in which the next result moves them, and who moved them. */
async function watchLines(page: Page): Promise<void> {
  await page.evaluate(() => {
    const plot = document.querySelector<PlotElement>('.js-plotly-plot')!;
    const lines = () =>
      Object.fromEntries(
        [...plot.querySelectorAll('.scatterlayer .trace')].map((trace) => [
          [...trace.classList].find((name) => /^trace(live|baseline)-/.test(name))!,
          trace.querySelector('.js-line')!.getAttribute('d')!,
        ]),
      );
    const firstData = plot.data;
    const moved = new Promise<Moved>((resolve) => {
      const observer = new MutationObserver(() => {
        observer.disconnect();
        const ground = document.querySelector('.strips-sheet > svg g[clip-path] > path')!.getAttribute('d')!;
        // Plotly takes over new data whenever it draws; as long as it holds the old, the lines were moved in place.
        resolve({ lines: lines(), ground, byHand: plot.data === firstData });
      });
      observer.observe(plot, { subtree: true, attributes: true, attributeFilter: ['d'] });
    });
    (window as unknown as { watched: Watched }).watched = { firstData, lines, moved };
  });
}

const movedLines = (page: Page) => page.evaluate(() => (window as unknown as { watched: Watched }).watched.moved);

/** The lines once Plotly has drawn them itself. */
async function plotlysLines(page: Page): Promise<Lines> {
  await page.waitForFunction(() => {
    const { watched } = window as unknown as { watched: Watched };
    return document.querySelector<PlotElement>('.js-plotly-plot')!.data !== watched.firstData;
  });
  return page.evaluate(() => (window as unknown as { watched: Watched }).watched.lines());
}

const pointsOf = (path: string) => [...path.matchAll(/-?[\d.]+/g)].map(([number]) => Number(number));

test('lines moved in place are the lines Plotly draws, over time and over soc, with and without a baseline', async ({
  page,
}) => {
  await openDesk(page);
  for (const { axis, ampere, keep } of [
    { axis: 'over time', ampere: '495', keep: false },
    { axis: 'over time', ampere: '490', keep: true },
    { axis: 'over soc', ampere: '485', keep: false },
  ]) {
    await page.getByRole('radio', { name: axis }).click();
    if (keep) await page.getByRole('button', { name: 'Keep as baseline', exact: true }).click();
    // Whatever the last step started is drawn.
    await page.waitForTimeout(1000);
    await watchLines(page);
    await field(page, 'Current, most').fill(ampere);
    const moved = await movedLines(page);
    expect(moved.byHand).toBe(true);
    expect(Object.keys(moved.lines).length).toBeGreaterThanOrEqual(9);
    expect(await plotlysLines(page)).toEqual(moved.lines);
  }
});

test('the ground under the power line moves in the same turn as the line', async ({ page }) => {
  await openDesk(page);
  await page.waitForTimeout(1000);
  await watchLines(page);
  await field(page, 'Current, most').fill('495');
  const { lines, ground } = await movedLines(page);
  const line = pointsOf(lines['tracelive-stationKw']!);
  // The ground is drawn on the whole sheet, the line in its strip: they differ by the strip's place and by rounding.
  const apart = pointsOf(ground)
    .slice(0, line.length)
    .map((at, i) => at - line[i]!);
  const [left, top] = apart as [number, number];
  expect(left).toBeGreaterThan(0);
  apart.forEach((distance, i) => expect(Math.abs(distance - (i % 2 === 0 ? left : top))).toBeLessThan(0.13));
});
