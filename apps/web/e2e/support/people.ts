import type { Page } from 'playwright-core';
import { product } from './visitor.ts';

interface Account {
  name: string;
  email: string;
  password: string;
}

/** The accounts that `npm start` prints. */
export const DEMO = {
  admin: { name: 'Ines Hollin', email: 'ines@millrace-electric.example', password: 'admin-at-millrace' },
  contractor: {
    name: 'Tobin Ashgrove',
    email: 'tobin@millrace-electric.example',
    password: 'contractor-at-millrace',
  },
  estimator: {
    name: 'Maren Quill',
    email: 'maren@millrace-electric.example',
    password: 'estimator-at-millrace',
  },
} satisfies Record<string, Account>;

/** Somebody whom no earlier run has met. */
export function newcomer(name: string): Account {
  const mark = Math.random().toString(36).slice(2, 10);
  const email = `${name.toLowerCase().replaceAll(' ', '.')}.${mark}@osier-quay.example`;
  return { name, email, password: `word of ${name} ${mark}` };
}

export async function signIn(page: Page, { email, password }: Account): Promise<void> {
  await page.goto(product('/sign-in'));
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByRole('heading', { name: /^Jobs/ }).waitFor();
}

export async function signUp(page: Page, account: Account, firm: string): Promise<void> {
  await page.goto(product('/sign-up'));
  await page.getByLabel('Name of the firm').fill(firm);
  await page.getByLabel('Your name').fill(account.name);
  await page.getByLabel('E-mail').fill(account.email);
  await page.getByLabel('Password').fill(account.password);
  await page.getByRole('button', { name: 'Set up the firm' }).click();
  await page.getByRole('heading', { name: 'No job yet' }).waitFor();
}

/** Opens one of the demo jobs from the list. */
export async function openDemoJob(page: Page, name: string): Promise<void> {
  await page.getByRole('link', { name, exact: true }).click();
  await page.waitForURL(/\/schedule/);
}

/** The address of a place of the job that is open. */
export function placeOf(page: Page, place: string): string {
  return page.url().replace(/(\/jobs\/[^/]+)\/.*$/, `$1/${place}`);
}
