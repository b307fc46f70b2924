import type { Locator, Page } from 'playwright-core';

/** What stands at the top of every page of a job. */
export const titleBlock = (page: Page): Locator => page.getByRole('region', { name: 'Title block' });

/** How many circuits are over, as the title block says it. */
export async function overCount(page: Page): Promise<number> {
  const said = await titleBlock(page)
    .getByRole('listitem')
    .filter({ hasText: /\d+ over/ })
    .textContent();
  return Number(/\d+/.exec(said ?? '')?.[0]);
}

/** The row of a circuit in the grid of its panel. */
export const circuitRow = (page: Page, serves: string | RegExp): Locator =>
  page.getByRole('grid').getByRole('row').filter({ hasText: serves });

const missing = (page: Page): Locator => page.getByRole('button', { name: /missing, next/ }).first();

/** Goes from empty length to empty length by the link that names the next, and types each. Says how many there were. */
export async function fillLengths(page: Page, textOf: (index: number) => string): Promise<number> {
  await page.getByRole('grid').waitFor();
  let filled = 0;
  for (; await missing(page).isVisible(); filled += 1) {
    const said = (await missing(page).textContent()) ?? '';
    await missing(page).click();
    await page.locator('[role=gridcell]:focus', { hasText: 'length' }).waitFor();
    await page.keyboard.type(textOf(filled));
    await page.keyboard.press('Enter');
    await page.getByRole('button', { name: said, exact: true }).first().waitFor({ state: 'detached' });
  }
  return filled;
}
