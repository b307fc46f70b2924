import { applyEdit, type Edit, invertEdit } from '@farlug/contract/edit';
import type { JobRows } from '@farlug/contract/rows';
import { scheduleView } from '@farlug/contract/schedule';
import { cleanup, configure, render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useRef, useState } from 'react';
import { afterEach, expect, test, vi } from 'vitest';
import { FIRM, fakeServer, refusal, SIGNED_IN } from '../../../testing/fake-server.ts';
import { ScheduleUpload } from './schedule-upload.tsx';
import { demoRows, sampleSheet } from './testing/sample-sheet.ts';

// Whole dialogs under a busy machine: a slow answer is not a wrong one.
configure({ asyncUtilTimeout: 10_000 });

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const READ = `POST /api/firms/${FIRM}/schedule-files`;
const SESSION = 'GET /api/session';
const answers = (cells: string[][], fileName = 'sheet.csv') => ({
  [SESSION]: SIGNED_IN,
  [READ]: { fileName, sheets: [{ name: 'CSV', cells }] },
});
const rows = demoRows('tannery-row.json');
const panelId = (now: JobRows, code: string) =>
  scheduleView(now).panels.find((panel) => panel.code === code)!.id;
const panelOf = (now: JobRows, code: string) => scheduleView(now).panels.find((panel) => panel.code === code);

let latest = rows;
function Job({ from = null, open = true }: { from?: string | null; open?: boolean }) {
  const [now, setNow] = useState(rows);
  const done = useRef<Edit[]>([]);
  latest = now;
  const make = (edit: Edit): string | null => {
    const outcome = applyEdit(now, edit);
    if (!outcome.ok) return JSON.stringify(outcome);
    setNow(outcome.rows);
    return null;
  };
  return (
    <ScheduleUpload
      open={open}
      firm={FIRM}
      rows={now}
      panelId={from}
      apply={(edit) => {
        done.current.push(edit);
        return make(edit);
      }}
      undo={() => make(invertEdit(done.current.pop()!, 'Undo'))}
      onClose={() => {}}
    />
  );
}
const file = (name = 'sheet.csv', bytes = 'x') => new File([bytes], name, { type: 'text/csv' });
const choose = async (given = file()) => {
  const user = userEvent.setup({ applyAccept: false });
  await user.upload(screen.getByLabelText('Choose a schedule', { selector: 'input' }), given);
  return user;
};
const preview = () => within(screen.getByRole('table', { name: 'Rows of the sheet as they are read' }));
const rowOf = (text: string) => preview().getByText(text).closest('tr')!;

test('a schedule from drawings is read, confirmed, written as one edit, and taken back', async () => {
  fakeServer(answers(sampleSheet('loft-panel.csv'), 'loft-panel.csv'));
  render(<Job />);
  const user = await choose(file('loft-panel.csv'));
  const go = await screen.findByRole('button', { name: 'Write 16 rows into LP-5' });
  expect(screen.getByText('Nothing is written until you confirm.')).toBeDefined();
  expect((screen.getByLabelText('Column B holds') as HTMLSelectElement).value).toBe('description');
  expect((screen.getByLabelText('Column M holds') as HTMLSelectElement).value).toBe('length');
  expect((screen.getByLabelText('Main breaker, A') as HTMLInputElement).value).toBe('225');
  expect(within(rowOf('Roof unit RU-5')).getByText('13,15,17')).toBeDefined();
  expect(latest).toBe(rows);

  await user.selectOptions(screen.getByLabelText('Fed from'), `panel:${panelId(rows, 'DP-L')}`);
  await user.click(go);
  const panel = panelOf(latest, 'LP-5')!;
  expect(panel.circuits).toHaveLength(16);
  expect(panel.fedFromText).toMatch(/^DP-L/);
  expect(screen.getByText('16 rows written in one step.')).toBeDefined();
  expect(screen.getByText(/7 circuits without a length/)).toBeDefined();

  await user.click(screen.getByRole('button', { name: 'Undo the upload' }));
  expect(panelOf(latest, 'LP-5')).toBeUndefined();
  expect(latest.run.size).toBe(rows.run.size);
  expect(await screen.findByRole('button', { name: 'Write 16 rows into LP-5' })).toBeDefined();
});

test('every faulty cell is named, nothing is written while one is left, and rows can be left out', async () => {
  fakeServer(answers(sampleSheet('duplicate-circuits.csv')));
  render(<Job />);
  const user = await choose();
  const name = await screen.findByLabelText('Its name');
  await user.type(name, 'LP-8');
  const go = await screen.findByRole('button', { name: /into LP-8$/ });
  expect(go.getAttribute('aria-disabled')).toBe('true');
  for (const cell of ['A4', 'A6', 'C7', 'D8', 'E9'])
    expect(
      screen.getByText((_, element) => element?.tagName === 'B' && element.textContent!.startsWith(cell)),
    ).toBeDefined();
  expect(screen.getByText(/Right would be 20, 20\/2 or 100A\/3P\./)).toBeDefined();
  await user.click(go);
  expect(latest).toBe(rows);

  await user.click(screen.getByRole('button', { name: 'Leave the 5 refused rows out' }));
  expect(await screen.findByText(/3 new circuits, 5 left out\./)).toBeDefined();
  expect(screen.getByLabelText('Leave row 9 out').getAttribute('aria-checked')).toBe('true');
  await user.click(screen.getByRole('button', { name: 'Write 3 rows into LP-8' }));
  expect(panelOf(latest, 'LP-8')!.circuits.map((one) => one.spaces.join(','))).toEqual(['1', '3,5', '7']);
});

test('a circuit that stands in the space already is named, and nothing of it is lost', async () => {
  fakeServer(
    answers([
      ['Ckt', 'Description', 'Breaker', 'Wire', 'Length (ft)', 'Load (VA)'],
      ['1', 'Kettle', '20', '#12', '40', '900'],
    ]),
  );
  render(<Job from={panelId(rows, 'LP-2')} />);
  await choose();
  const held = panelOf(rows, 'LP-2')!.circuits.find((one) => one.spaces.includes(1))!;
  expect(
    await screen.findByText(new RegExp(`Space 1 holds “${held.circuit.description}” already`)),
  ).toBeDefined();
  expect(screen.getByRole('button', { name: /into LP-2$/ }).getAttribute('aria-disabled')).toBe('true');
});

test('columns can be said otherwise, and the preview follows', async () => {
  fakeServer(
    answers([
      ['No', 'What', 'Fuse', 'Remark'],
      ['1', 'Loom 3', '20', '85'],
    ]),
  );
  render(<Job />);
  const user = await choose();
  await user.type(await screen.findByLabelText('Its name'), 'LP-9');
  await user.selectOptions(screen.getByLabelText('Column D holds'), 'length');
  await user.selectOptions(screen.getByLabelText('Column B holds'), 'description');
  expect(await within(rowOf('Loom 3')).findByText('85 ft')).toBeDefined();
  await user.selectOptions(screen.getByLabelText('Unit of column D'), 'm');
  expect(await within(rowOf('Loom 3')).findByText('85 m')).toBeDefined();
  await user.selectOptions(screen.getByLabelText('Headings stand in'), '');
  expect(await screen.findAllByText('no heading')).toHaveLength(4);
});

test('a refused file leaves the open one and its columns as they were', async () => {
  let calls = 0;
  fakeServer({
    [SESSION]: SIGNED_IN,
    [READ]: () =>
      calls++ === 0
        ? { fileName: 'a.csv', sheets: [{ name: 'CSV', cells: sampleSheet('mixed-units.csv') }] }
        : refusal('unsupported_file', 415, 'This is a PDF, not a schedule in cells.'),
  });
  render(<Job />);
  const user = await choose();
  await user.selectOptions(await screen.findByLabelText('Column B holds'), 'room');
  await user.click(screen.getByRole('button', { name: 'Another file' }));
  await choose(file('plan.pdf'));
  expect((await screen.findByRole('alert')).textContent).toMatch(
    /plan.pdf: This is a PDF.*Nothing was written/,
  );
  await user.click(screen.getByRole('button', { name: 'Back to the open file' }));
  expect(((await screen.findByLabelText('Column B holds')) as HTMLSelectElement).value).toBe('room');
});

test('a file beyond the bound is refused before it is sent', async () => {
  const sent = fakeServer({});
  render(<Job />);
  await choose(file('huge.csv', 'x'.repeat(5 * 1024 * 1024 + 1)));
  expect((await screen.findByRole('alert')).textContent).toMatch(/at most 5\.0 MB/);
  expect(sent).toEqual([]);
});

test('rows that are pasted are read at once', async () => {
  const sent = fakeServer(answers(sampleSheet('mixed-units.csv')));
  render(<Job />);
  const user = userEvent.setup();
  await user.click(screen.getByLabelText(/Or paste rows/));
  await user.paste('Ckt\tDescription\n1\tReception lighting');
  expect(await screen.findByText('What its rows come to')).toBeDefined();
  expect(sent.map((one) => one.method)).toContain('POST');
});

test('a sheet of 200 columns is refused as a whole', async () => {
  fakeServer(answers(sampleSheet('two-hundred-columns.csv')));
  render(<Job />);
  const user = await choose();
  await user.type(await screen.findByLabelText('Its name'), 'LP-8');
  expect((await screen.findByRole('alert')).textContent).toMatch(/200 columns; at most 60 are read/);
  expect(screen.getByRole('button', { name: /into LP-8$/ }).getAttribute('aria-disabled')).toBe('true');
});

test('closing keeps the open file and what was settled about it', async () => {
  fakeServer(answers(sampleSheet('mixed-units.csv')));
  const page = render(<Job />);
  const user = await choose();
  await user.type(await screen.findByLabelText('Its name'), 'LP-7');
  page.rerender(<Job open={false} />);
  expect(screen.queryByRole('dialog')).toBeNull();
  page.rerender(<Job />);
  expect(((await screen.findByLabelText('Its name')) as HTMLInputElement).value).toBe('LP-7');
});
