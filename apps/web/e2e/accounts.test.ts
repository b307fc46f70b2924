import { expect, test } from 'vitest';
import { linkIn, openMail } from './support/mail.ts';
import { DEMO, newcomer, signIn, signUp } from './support/people.ts';
import { product, visitor, withBrowser } from './support/visitor.ts';

withBrowser();

test('a new firm signs up, an administrator invites an estimator, and the estimator comes in', async () => {
  const wilma = newcomer('Wilma Corde');
  const { page } = await visitor();
  await signUp(page, wilma, 'Corde and Daughters');
  await page.getByRole('link', { name: 'Firm', exact: true }).click();
  const invited = newcomer('Odile Marsh');
  await page.getByLabel('E-mail').fill(invited.email);
  await page.getByLabel('Role', { exact: true }).selectOption('estimator');
  await page.getByRole('button', { name: 'Send the invitation' }).click();
  await page.getByText('An invitation is on its way').waitFor();

  const { page: other } = await visitor();
  await openMail(other, invited.email, /Corde and Daughters/);
  await other.goto(await linkIn(other, '/invitation'));
  await other.getByRole('heading', { name: 'Corde and Daughters invites you' }).waitFor();
  expect(other.url()).toBe(product('/invitation'));
  await other.getByLabel('Your name').fill(invited.name);
  await other.getByLabel('Choose a password').fill(invited.password);
  await other.getByRole('button', { name: 'Accept' }).click();
  await other.getByRole('heading', { name: /^Jobs/ }).waitFor();
  await other.getByText(`${invited.name}, estimator`).waitFor();

  await page.reload();
  await page.getByRole('rowheader', { name: invited.name }).waitFor();
  await page.getByText('Not accepted yet').waitFor({ state: 'detached' });
});

test('a forgotten password is chosen anew by the mailed link, which works once', async () => {
  const pia = newcomer('Pia Rook');
  const { page, provokes } = await visitor();
  await signUp(page, pia, 'Rook Wiring');
  await page.getByRole('button', { name: 'Sign out' }).click();
  await page.getByRole('link', { name: 'Forgot the password' }).click();
  await page.getByRole('heading', { name: 'Forgot the password' }).waitFor();
  await page.getByLabel('E-mail').fill(pia.email);
  await page.getByRole('button', { name: 'Mail me a link' }).click();
  await page.getByText('a link is on its way').waitFor();

  await openMail(page, pia.email, /password/i);
  const link = await linkIn(page, '/reset');
  await page.goto(link);
  const password = `${pia.password}, anew`;
  await page.getByLabel('New password', { exact: true }).fill(password);
  await page.getByRole('button', { name: 'Save the password' }).click();
  await page.getByText('holds from now on').waitFor();
  await signIn(page, { ...pia, password });

  provokes(410);
  await page.goto(product('/'));
  await page.goto(link);
  await page.getByLabel('New password', { exact: true }).fill(`${password}, again`);
  await page.getByRole('button', { name: 'Save the password' }).click();
  await page.getByRole('heading', { name: 'This link no longer works' }).waitFor();
});

test('a wrong password is refused in words, and what was typed stays', async () => {
  const { page, provokes } = await visitor();
  provokes(401);
  await page.goto(product('/sign-in'));
  await page.getByLabel('E-mail').fill(DEMO.contractor.email);
  await page.getByLabel('Password').fill('not this one');
  await page.keyboard.press('Enter');
  await page.getByRole('alert').waitFor();
  expect(await page.getByLabel('E-mail').inputValue()).toBe(DEMO.contractor.email);
  await page.getByLabel('Password').fill(DEMO.contractor.password);
  await page.keyboard.press('Enter');
  await page.getByRole('link', { name: 'Tannery Row workshop' }).waitFor();
});
