/**
 * A screen in a state that only a whole path reaches: axe finds nothing and nothing runs past the edge.
 * With SHOTS=folder the screen is also photographed at both widths in both themes, to be looked at.
 */
import AxeBuilder from '@axe-core/playwright';
import { expect, type Page } from '@playwright/test';

const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

async function photograph(page: Page, name: string, folder: string): Promise<void> {
  const before = page.viewportSize();
  const dark = await page.evaluate(() => matchMedia('(prefers-color-scheme: dark)').matches);
  for (const width of [360, 1440]) {
    for (const colorScheme of ['light', 'dark'] as const) {
      await page.setViewportSize({ width, height: width === 360 ? 780 : 900 });
      await page.emulateMedia({ colorScheme });
      await page.screenshot({ path: `${folder}/${name}-${width}-${colorScheme}.png`, fullPage: true });
    }
  }
  await page.emulateMedia({ colorScheme: dark ? 'dark' : 'light' });
  if (before) await page.setViewportSize(before);
}

export async function look(page: Page, name: string): Promise<void> {
  const folder = process.env.SHOTS;
  if (folder) await photograph(page, name, folder);
  const { violations } = await new AxeBuilder({ page }).withTags(TAGS).analyze();
  expect(
    violations.map((one) => `${one.id}: ${one.nodes.map((node) => node.target.join(' ')).join(', ')}`),
    name,
  ).toEqual([]);
  const overflow = await page.evaluate(
    () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
  );
  expect(overflow, `${name} runs past the edge`).toBe(0);
}
