import { AxeBuilder } from '@axe-core/playwright';
import type { Page } from 'playwright-core';
import { expect } from 'vitest';
import { DESK, PHONE } from './visitor.ts';

const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];

/** The rules whose outcome hangs on the theme; the rest see the same document in both. */
const OF_COLOUR = ['color-contrast', 'link-in-text-block'];

/** What axe finds in the page as it stands, in words. */
async function violations(page: Page, scope: 'all' | 'colour'): Promise<string[]> {
  const axe = new AxeBuilder({ page }).setLegacyMode();
  const chosen = scope === 'all' ? axe.withTags(TAGS) : axe.withRules(OF_COLOUR);
  const { violations: found } = await chosen.analyze();
  return found.flatMap(({ id, nodes }) =>
    nodes.map((node) => `${id} at ${node.target.join(' ')}: ${node.failureSummary ?? ''}`),
  );
}

const sideways = (page: Page): Promise<number> =>
  page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);

/** Holds a screen to the rules at both widths, light and dark, and leaves it as it was. */
export async function checkScreen(page: Page, name: string): Promise<void> {
  for (const viewport of [PHONE, DESK]) {
    await page.setViewportSize(viewport);
    for (const [colorScheme, scope] of [
      ['dark', 'colour'],
      ['light', 'all'],
    ] as const) {
      await page.emulateMedia({ colorScheme });
      const where = `${name}, ${viewport.width} px, ${colorScheme}`;
      expect(await violations(page, scope), where).toEqual([]);
    }
    expect(await sideways(page), `${name}, ${viewport.width} px: pixels to scroll sideways`).toBe(0);
  }
}
