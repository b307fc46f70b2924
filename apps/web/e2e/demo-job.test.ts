import type { Page } from 'playwright-core';
import { expect, test } from 'vitest';
import { circuitRow, fillLengths, overCount, titleBlock } from './support/job.ts';
import { linkIn, openMail } from './support/mail.ts';
import { DEMO, newcomer, openDemoJob, placeOf, signIn } from './support/people.ts';
import { picture } from './support/picture.ts';
import { checkScreen } from './support/screen.ts';
import { PHONE, product, visitor, withBrowser } from './support/visitor.ts';

withBrowser();

/** A report of some dozens of pages is printed in the background. */
const PRINTING = { timeout: 90_000 };

const judged = (page: Page) =>
  titleBlock(page)
    .getByText(/^\d{3} judged/)
    .waitFor();

test('a contractor fixes a run of the demo job and issues a report, and an inspector decides on it', async () => {
  const { page } = await visitor();
  await signIn(page, DEMO.contractor);
  await openDemoJob(page, 'Tannery Row workshop');
  await judged(page);
  const over = await overCount(page);
  expect(over).toBeGreaterThan(0);

  const scenario = titleBlock(page).getByLabel('Scenario');
  await scenario.selectOption({ label: 'Design demand' });
  await expect.poll(() => overCount(page)).toBeLessThan(over);
  await scenario.selectOption({ label: 'Each circuit full' });
  await expect.poll(() => overCount(page)).toBe(over);

  await page.getByRole('radio', { name: 'Worst first' }).click();
  await page.getByRole('table', { name: 'Loads, worst first' }).getByRole('link').first().click();
  const sheet = page.getByRole('complementary');
  await sheet.getByRole('heading', { name: /Roof deck receptacles/ }).waitFor();
  await sheet.getByText('Over.').waitFor();

  await page.getByRole('link', { name: /^LP-2/ }).click();
  await circuitRow(page, 'Plotter and press bench').getByText('Plotter and press bench').click();
  await sheet.getByRole('heading', { name: /Plotter and press bench/ }).waitFor();
  const use = sheet.getByRole('button', { name: /^Use / });
  await use.waitFor();
  await checkScreen(page, 'schedule of the demo job, a circuit open');
  await picture(page, 'schedule');
  await use.click();
  await expect.poll(() => overCount(page)).toBe(over - 1);
  await sheet.getByText('Over.').waitFor({ state: 'detached' });
  await page.getByRole('button', { name: 'More about the panel' }).click();
  await page.getByRole('menuitem', { name: /^Undo/ }).click();
  await expect.poll(() => overCount(page)).toBe(over);

  await sheet.getByRole('link', { name: 'All sizes' }).click();
  await page.getByRole('button', { name: /^Use 8 AWG Cu/ }).waitFor();
  await checkScreen(page, 'sizes of a run');
  await picture(page, 'sizes');
  await page.getByRole('button', { name: /^Use 8 AWG Cu/ }).click();
  await expect.poll(() => overCount(page)).toBe(over - 1);
  await page.getByRole('button', { name: /^Undo: / }).click();
  await expect.poll(() => overCount(page)).toBe(over);
  await page.getByRole('link', { name: 'Equations' }).click();
  await page.getByText('Kirchhoff’s current law closes').waitFor();
  await checkScreen(page, 'equations of a panel');
  await page.getByRole('link', { name: 'Schedule' }).click();
  await judged(page);

  await fillLengths(page, (index) => `${40 + 5 * index} ft`);
  await titleBlock(page)
    .getByText(/ 0 left out$/)
    .waitFor();
  await titleBlock(page).getByRole('link', { name: 'Issue report' }).click();
  await page.getByRole('button', { name: 'Issue a report' }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByLabel('Note to the reader').fill('Lengths of the attic are measured on site.');
  await dialog.getByRole('button', { name: 'Issue', exact: true }).click();
  const issued = /Revision ([A-Z]+) is issued/;
  const letter = issued.exec((await page.getByText(issued).textContent()) ?? '')?.[1] ?? '';
  const revision = page.getByRole('region', { name: `Revision ${letter}`, exact: true });
  const pdf = await revision.getByRole('link', { name: 'Open the PDF' }).getAttribute('href', PRINTING);
  expect((await (await page.request.get(product(pdf ?? ''))).body()).subarray(0, 5).toString()).toBe('%PDF-');

  const inspector = newcomer('Dele Moss');
  await revision.getByRole('button', { name: 'Send to an inspector' }).click();
  await dialog.getByLabel('Name of the inspector').fill(inspector.name);
  await dialog.getByLabel('E-mail').fill(inspector.email);
  await dialog.getByLabel('Message').fill('Please look at LP-2 first.');
  await dialog.getByRole('button', { name: 'Send', exact: true }).click();
  await revision
    .getByRole('row', { name: new RegExp(inspector.name) })
    .getByText('sent', { exact: true })
    .waitFor(PRINTING);

  const { page: theirs } = await visitor({ viewport: PHONE });
  await openMail(theirs, inspector.email, /Tannery Row workshop/);
  await theirs.getByText('Please look at LP-2 first.').waitFor();
  const attached = await theirs
    .getByRole('list', { name: 'Attachments' })
    .getByRole('link')
    .getAttribute('href');
  expect((await (await theirs.request.get(product(attached ?? ''))).body()).subarray(0, 5).toString()).toBe(
    '%PDF-',
  );
  await checkScreen(theirs, 'mail with a report');
  await theirs.setViewportSize(PHONE);
  await theirs.goto(await linkIn(theirs, '/i#'));
  await theirs.getByRole('button', { name: 'Record' }).waitFor();
  expect(theirs.url()).toBe(product('/inspection'));
  await checkScreen(theirs, 'inspection');
  await theirs.setViewportSize(PHONE);
  await picture(theirs, 'inspection-phone');
  await theirs.getByText(/^\d+ of 142 exceed\.$/).waitFor();
  await theirs.getByRole('button', { name: 'Comment on LP-2-20' }).click();
  await theirs.keyboard.type('Measure the route to the roof deck.');
  await theirs.getByRole('radio', { name: 'Corrections needed' }).click();
  await theirs.getByLabel('Title or office').fill('inspector');
  await theirs.getByRole('button', { name: 'Record' }).click();
  await theirs.getByText(`on record against revision ${letter}`).waitFor();

  await page.reload();
  await revision.getByRole('rowheader', { name: 'Corrections needed' }).waitFor();
  await revision.getByText('Measure the route to the roof deck.').waitFor();
  await checkScreen(page, 'reports with a delivery and a decision');
  await picture(page, 'reports');
  await page.getByRole('link', { name: 'Job settings' }).click();
  await page.getByRole('heading', { name: 'Job settings' }).waitFor();
  await checkScreen(page, 'job settings');
});

test('an estimator reads the reports, is offered nothing to issue, and the server refuses to', async () => {
  const { page, provokes } = await visitor();
  await signIn(page, DEMO.estimator);
  await openDemoJob(page, 'Tannery Row workshop');
  await judged(page);
  expect(await titleBlock(page).getByRole('link', { name: 'Issue report' }).count()).toBe(0);
  await page.goto(placeOf(page, 'reports'));
  await page.getByText('An estimator reads reports').waitFor();
  expect(await page.getByRole('button', { name: /^(Issue|Send|Enter)/ }).count()).toBe(0);
  provokes(403);
  const answer = await page.evaluate(async () => {
    const { csrfToken } = await (await fetch('/api/session')).json();
    const revisions = window.location.pathname.replace('/reports', '/revisions');
    const response = await fetch(`/api${revisions}`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', 'x-csrf-token': csrfToken },
      body: JSON.stringify({
        revision: crypto.randomUUID(),
        seq: 0,
        scenario: 'each-circuit',
        paper: 'letter',
        equationsPanel: null,
        note: '',
      }),
    });
    return { status: response.status, code: (await response.json()).error.code };
  });
  expect(answer).toEqual({ status: 403, code: 'forbidden' });
});
