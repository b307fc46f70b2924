import type { Page } from 'playwright-core';
import { product } from './visitor.ts';

/** Opens the newest message to an address in the local mailbox, waiting until it has arrived. */
export async function openMail(page: Page, to: string, subject: RegExp): Promise<void> {
  await page.goto(product('/mailbox'));
  await page.getByRole('link', { name: subject }).filter({ hasText: to }).first().click();
  await page.getByRole('article').getByRole('heading', { name: subject }).waitFor();
}

/** The address behind the one link of a message that leads to the given path. */
export async function linkIn(page: Page, path: string): Promise<string> {
  const link = page.getByRole('article').locator(`a[href*="${path}"]`).first();
  return (await link.getAttribute('href')) ?? '';
}
