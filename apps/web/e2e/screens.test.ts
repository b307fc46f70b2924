import { expect, test } from 'vitest';
import { DEMO, signIn } from './support/people.ts';
import { checkScreen } from './support/screen.ts';
import { product, visitor, withBrowser } from './support/visitor.ts';

withBrowser();

test('the pages outside a firm keep to the rules of accessibility, light and dark, on desk and phone', async () => {
  const { page } = await visitor();
  const screens: [path: string, heading: RegExp][] = [
    ['/', /far lug/],
    ['/about/method', /Method/],
    ['/about/tables', /Tables/],
    ['/about/limits', /Limits of use/],
    ['/sign-in', /Sign in/],
    ['/sign-up', /Set up a firm/],
    ['/forgotten', /Forgot the password/],
    ['/reset', /no longer works/],
    ['/invitation', /no longer works/],
    ['/i', /no longer opens the report/],
    ['/mailbox', /Local mailbox/],
    ['/nowhere', /Nothing is drawn here/],
  ];
  for (const [path, heading] of screens) {
    await page.goto(product(path));
    await page.getByRole('heading', { name: heading }).first().waitFor();
    await checkScreen(page, path);
    expect(page.url()).toContain(path);
  }
});

test('so do the pages of a firm', async () => {
  const { page } = await visitor();
  await signIn(page, DEMO.admin);
  await page.getByRole('link', { name: 'Tannery Row workshop' }).waitFor();
  await checkScreen(page, 'jobs');
  await page.getByRole('link', { name: 'New job' }).click();
  await page.getByRole('button', { name: 'Make the job' }).click();
  await page.getByText('Enter a name for the job').waitFor();
  await checkScreen(page, 'new job, with what is missing');
  const firm = page.url().replace(/\/jobs.*/, '');
  await page.goto(`${firm}/jobs/upload`);
  await page.getByRole('heading', { name: 'Upload a job file' }).waitFor();
  await checkScreen(page, 'upload of a job file');
  const parts: [part: string, heading: string][] = [
    ['people', 'People'],
    ['limits', 'Limit presets'],
    ['defaults', 'Starting defaults'],
    ['wording', 'Report and notices'],
    ['conductors', 'Own conductors'],
    ['audit', 'Audit trail'],
  ];
  for (const [part, heading] of parts) {
    await page.goto(`${firm}/firm/${part}`);
    await page.getByRole('heading', { name: heading, exact: true }).waitFor();
    await checkScreen(page, part);
  }
  await page.goto(product('/account'));
  await page.getByRole('heading', { name: DEMO.admin.name }).waitFor();
  await checkScreen(page, 'account');
});
