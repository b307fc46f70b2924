import { AxeBuilder } from '@axe-core/playwright';
import type { Page } from 'playwright-core';
import { expect } from 'vitest';
import { DESK, PHONE } from './visitor.ts';

const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];

/** The rules whose outcome hangs on the theme; the rest see the same document in both. */
const OF_COLOUR = ['color-contrast', 'link-in-text-block'];

/** What axe finds in the page as it stands, in words. */
async function violations(page: Page, scope: 'all' | 'colour'): Promise<string[]> {
  const there = await page.evaluate(() => 'axe' in window);
  const axe = new AxeBuilder({ page, ...(there ? { axeSource: ';' } : {}) }).setLegacyMode();
  const chosen = scope === 'all' ? axe.withTags(TAGS) : axe.withRules(OF_COLOUR);
  const { violations: found } = await chosen.analyze();
  return found.flatMap(({ id, nodes }) =>
    nodes.map((node) => `${id} at ${node.target.join(' ')}: ${node.failureSummary ?? ''}`),
  );
}

const sideways = (page: Page): Promise<number> =>
  page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);

/** Until the page is drawn in this size and theme: the browser takes both over behind the back of whoever asks. */
async function drawnAs(page: Page, width: number, colorScheme: 'light' | 'dark'): Promise<void> {
  await page.waitForFunction(
    ({ width, dark }) =>
      window.innerWidth === width && matchMedia('(prefers-color-scheme: dark)').matches === dark,
    { width, dark: colorScheme === 'dark' },
  );
  await page.evaluate(
    () => new Promise((resolve) => requestAnimationFrame(() => requestAnimationFrame(resolve))),
  );
}

/** Holds a screen to the rules at both widths, light and dark, and leaves it as it was. */
export async function checkScreen(page: Page, name: string): Promise<void> {
  for (const viewport of [PHONE, DESK]) {
    await page.setViewportSize(viewport);
    for (const [colorScheme, scope] of [
      ['dark', 'colour'],
      ['light', 'all'],
    ] as const) {
      await page.emulateMedia({ colorScheme });
      await drawnAs(page, viewport.width, colorScheme);
      const where = `${name}, ${viewport.width} px, ${colorScheme}`;
      expect(await violations(page, scope), where).toEqual([]);
    }
    expect(await sideways(page), `${name}, ${viewport.width} px: pixels to scroll sideways`).toBe(0);
  }
}
