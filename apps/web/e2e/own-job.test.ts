import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { expect, test } from 'vitest';
import { circuitRow, fillLengths, overCount, titleBlock } from './support/job.ts';
import { newcomer, signUp } from './support/people.ts';
import { checkScreen } from './support/screen.ts';
import { visitor, withBrowser } from './support/visitor.ts';

withBrowser();

const upload = (name: string): string =>
  fileURLToPath(new URL(`../../../fixtures/uploads/${name}`, import.meta.url));

test('a firm makes a job of its own, uploads a schedule, fills in the lengths and reads the verdicts', async () => {
  const { page } = await visitor();
  await signUp(page, newcomer('Jory Tallow'), 'Tallow Electric');
  await checkScreen(page, 'no job yet');
  await page.getByRole('link', { name: 'Start a job' }).click();
  await page.getByLabel('Name', { exact: true }).fill('Dye house loft');
  await page.getByLabel('Address').fill('9 Tannery Row, Emberwick');
  await page.getByLabel('Adopted code and edition').fill('NEC 2023');
  await page.getByLabel('Permit number').fill('E-0518');
  await page.getByLabel('Nominal volts, line to line').fill('208 V');
  await page.getByLabel('Three-phase fault current').fill('10 kA');
  await page.getByLabel('X/R').fill('4');
  expect(await page.getByLabel('Ground: clause or house rule').inputValue()).toMatch(/210\.19/);
  await page.getByRole('button', { name: 'Make the job' }).click();

  await page.getByRole('button', { name: 'Upload a schedule' }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByLabel('Choose a schedule').setInputFiles(upload('loft-panel.csv'));
  await dialog.getByText('13 new circuits').waitFor();
  await dialog.getByLabel('Fed from').selectOption({ label: 'service, 208Y/120 V' });
  await checkScreen(page, 'preview of an upload');
  await dialog.getByRole('button', { name: /^Write 16 rows into LP-5/ }).click();
  await dialog.getByText('16 rows written in one step').waitFor();
  await dialog.getByRole('button', { name: 'Show LP-5' }).click();

  await titleBlock(page).getByText('0 judged').waitFor();
  await page.getByRole('button', { name: 'More about the panel' }).click();
  await page.getByRole('menuitem', { name: 'Change LP-5 and its feeder' }).click();
  await dialog.getByLabel('Length, one way').fill('27 m');
  await dialog.getByLabel('Size of the lines').fill('4/0');
  await dialog.getByRole('button', { name: 'Save the panel' }).click();
  await titleBlock(page)
    .getByText(/^6 judged/)
    .waitFor();

  expect(await fillLengths(page, (index) => `${35 + 5 * index} ft`)).toBe(7);
  await titleBlock(page)
    .getByText(/^13 judged, 0 left out/)
    .waitFor();
  const before = await overCount(page);
  expect(before).toBeGreaterThan(0);

  const tea = circuitRow(page, 'Tea point');
  const length = tea.getByRole('gridcell').nth(5);
  await length.dblclick();
  await page.keyboard.press('ControlOrMeta+A');
  await page.keyboard.type('as long as it takes');
  await page.keyboard.press('Enter');
  await tea.getByRole('alert').waitFor();
  await length.dblclick();
  await page.keyboard.press('ControlOrMeta+A');
  await page.keyboard.type('260 ft');
  await page.keyboard.press('Enter');
  await tea.getByText('over', { exact: true }).waitFor();
  expect(await overCount(page)).toBe(before + 1);
  await page.keyboard.press('ControlOrMeta+Z');
  await page.keyboard.press('ControlOrMeta+Z');
  await tea.getByText('over', { exact: true }).waitFor({ state: 'detached' });

  await page.reload();
  await titleBlock(page)
    .getByText(/^13 judged, 0 left out/)
    .waitFor();

  await page.getByRole('button', { name: 'More about the panel' }).click();
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('menuitem', { name: 'Download the job file' }).click(),
  ]);
  const file = JSON.parse(readFileSync(await download.path(), 'utf8'));
  expect(file).toMatchObject({ format: 'farlug-job/1', name: 'Dye house loft' });
  await page.getByRole('link', { name: 'Jobs', exact: true }).click();
  await page.getByRole('link', { name: 'Upload a job file' }).click();
  await page.getByLabel('Choose a job file').setInputFiles(await download.path());
  await page.getByRole('button', { name: 'Make this job' }).click();
  await titleBlock(page)
    .getByText(/^13 judged, 0 left out/)
    .waitFor();
});

test('a faulty schedule is reported cell by cell, and nothing of it is written', async () => {
  const { page, provokes } = await visitor();
  provokes(415);
  await signUp(page, newcomer('Sunniva Weld'), 'Weld and Wire');
  await page.getByRole('button', { name: 'Take the demo job' }).click();
  await titleBlock(page)
    .getByText(/138 judged/)
    .waitFor();
  await page.getByRole('button', { name: 'Upload', exact: true }).click();
  const dialog = page.getByRole('dialog');
  const choose = (name: string) => dialog.getByLabel('Choose a schedule').setInputFiles(upload(name));
  const write = dialog.getByRole('button', { name: /^Write/ });
  const another = dialog.getByRole('button', { name: 'Another file' });
  await choose('not-a-workbook.xlsx');
  await dialog.getByText('This is text without columns').waitFor();
  for (const name of ['two-hundred-columns.csv', 'formulas.xlsx', 'duplicate-circuits.csv']) {
    await choose(name);
    await dialog.getByRole('heading', { name }).waitFor();
    expect(await write.getAttribute('aria-disabled'), name).toBe('true');
    if (name !== 'duplicate-circuits.csv') await another.click();
  }
  await dialog.getByText(/Space 1 holds .* already/).waitFor();
  await checkScreen(page, 'refused rows of an upload');
  await page.keyboard.press('Escape');
  await titleBlock(page)
    .getByText(/138 judged/)
    .waitFor();
});
