import path from 'node:path';
import type { Page } from 'playwright-core';

/** Keeps a picture for the documents, where FARLUG_PICTURES names the folder that takes them. */
export async function picture(page: Page, name: string): Promise<void> {
  const folder = process.env.FARLUG_PICTURES;
  if (folder) await page.screenshot({ path: path.join(folder, `${name}.png`) });
}
