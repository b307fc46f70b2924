import type { Edit } from '@farlug/contract/edit';
import { listsFromRows } from '@farlug/contract/rows';
import { cleanup, fireEvent, screen, waitFor, within } from '@testing-library/react';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { OpenJob } from '../../../job/open-job.tsx';
import { FIRM, fakeServer, JOB, type Sent, VISITOR } from '../../../testing/fake-server.ts';
import { renderPage } from '../../../testing/render-page.tsx';
import { openDemoRows, panelOf } from '../testing/open-demo.ts';
import { SolverWorker } from '../testing/solver-worker.ts';
import { SchedulePlace } from './schedule-place.tsx';

const rows = openDemoRows();
const api = `/api/firms/${FIRM}/jobs/${JOB}`;
let sent: Sent[];
let seq: number;

beforeEach(() => {
  seq = 0;
  localStorage.clear();
  vi.stubGlobal('Worker', SolverWorker);
  vi.stubGlobal('matchMedia', (media: string) => ({
    media,
    matches: true,
    addEventListener() {},
    removeEventListener() {},
  }));
  sent = fakeServer({
    'GET /api/session': VISITOR,
    [`GET ${api}`]: {
      headSeq: 0,
      archivedAt: null,
      hasRevisions: false,
      rows: listsFromRows(rows),
    },
    [`POST ${api}/edits`]: () => {
      seq += 1;
      return { seq, headSeq: seq };
    },
    [`GET ${api}/edits`]: () => ({ headSeq: seq, edits: [] }),
    [`PUT ${api}/verdict`]: { ok: true },
  });
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

async function open(code: string, more = '', heading = code): Promise<void> {
  renderPage(
    <OpenJob firm={FIRM} job={JOB}>
      <SchedulePlace cautions={<p>Calculated from the data entered.</p>} />
    </OpenJob>,
    `/schedule?panel=${panelOf(rows, code).id}${more}`,
    '/schedule',
  );
  await screen.findByRole('heading', { level: 1, name: new RegExp(heading) });
  await screen.findAllByText('within');
}
const line = (text: string) => screen.getByText(text, { selector: 'td, td *' }).closest('tr')!;
const cell = (of: HTMLElement, column: number) => within(of).getAllByRole('gridcell')[column]!;
const key = (name: string, more: object = {}) =>
  fireEvent.keyDown(document.activeElement!, { key: name, ...more });
const type = (into: HTMLElement, text: string) => {
  fireEvent.click(into);
  key('Enter');
  fireEvent.change(within(into).getByRole('textbox'), { target: { value: text } });
  key('Enter');
};
const LENGTH = 5;
const edits = () => sent.filter(({ method }) => method === 'POST').map(({ body }) => (body as Edit).label);

test('a length that is typed changes the verdict, is saved, and is undone in words', async () => {
  await open('LP-2');
  const bays = line('Loft lighting, south bays');
  expect(within(bays).getByText('over')).toBeTruthy();
  type(cell(bays, LENGTH), '40');
  expect(cell(bays, LENGTH).textContent).toBe('40 ft');
  await waitFor(() => expect(within(bays).getByText('within')).toBeTruthy());
  expect(edits()).toEqual(['Length of LP-2-13']);
  key('z', { ctrlKey: true });
  expect(screen.getByText('Undone: Length of LP-2-13')).toBeTruthy();
  await waitFor(() => expect(within(bays).getByText('over')).toBeTruthy());
  key('y', { ctrlKey: true });
  expect(screen.getByText('Done again: Length of LP-2-13')).toBeTruthy();
  await waitFor(() =>
    expect(edits()).toEqual(['Length of LP-2-13', 'Undo: Length of LP-2-13', 'Redo: Length of LP-2-13']),
  );
});

test('text that is not understood stays in its cell with what would be right, and the row is left out', async () => {
  await open('LP-2');
  const bays = line('Loft lighting, south bays');
  type(cell(bays, LENGTH), 'far away');
  expect(within(bays).getByRole('alert').textContent).toMatch(/^Length must be a length such as 120 ft/);
  expect(cell(bays, LENGTH).textContent).toContain('far away');
  await waitFor(() => expect(within(bays).getByText('left out')).toBeTruthy());
  type(cell(bays, LENGTH), '40 ft');
  expect(within(bays).queryByRole('alert')).toBeNull();
  await waitFor(() => expect(within(bays).getByText('within')).toBeTruthy());
});

test('the next missing length is one step away, and the cell has the focus', async () => {
  await open('LP-2');
  const next = screen.getAllByRole('button', { name: /lengths missing, next LP-2-9/ })[0]!;
  fireEvent.click(next);
  const loom = line('Loom room receptacles');
  await waitFor(() => expect(document.activeElement).toBe(cell(loom, LENGTH)));
  expect(screen.getByRole('complementary').textContent).toContain('Left out of the results.');
  key('5');
  fireEvent.change(screen.getByLabelText('Length of LP-2-9'), { target: { value: '55 ft' } });
  key('Enter');
  await waitFor(() => expect(within(loom).queryByText('left out')).toBeNull());
});

test('circuits are added, duplicated and deleted where there is room; a full panel says so', async () => {
  await open('HP-2');
  fireEvent.click(screen.getByRole('button', { name: 'Add circuit' }));
  await waitFor(() => expect(edits()).toEqual(['Add HP-2-31']));
  await waitFor(() => expect((document.activeElement as HTMLElement).dataset.cell).toMatch(/:2$/));
  fireEvent.click(cell(line('Curing oven, 36 kW'), 2));
  key('D', { ctrlKey: true, shiftKey: true });
  expect(screen.getAllByText('Curing oven, 36 kW').length).toBeGreaterThan(1);
  key('Delete', { shiftKey: true });
  expect(screen.getByText(/^Deleted HP-2-.*; undo brings it back\.$/)).toBeTruthy();
  cleanup();
  await open('LP-2');
  fireEvent.click(screen.getByRole('button', { name: 'Add circuit' }));
  expect(screen.getByText('LP-2 has no open space left.')).toBeTruthy();
});

test('the side sheet says the verdict in words, with what is assumed in the circuit', async () => {
  const roof = panelOf(rows, 'LP-2').circuits.find((one) => one.code === 'LP-2-20')!;
  await open('LP-2', `&circuit=${roof.id}`);
  const sheet = screen.getByRole('complementary');
  expect(sheet.textContent).toMatch(/Over\..*against 5/);
  expect(sheet.textContent).toContain('not a violation by itself');
  expect(sheet.textContent).toContain('16 A, assumed');
  expect(sheet.textContent).toContain('Calculated from the data entered.');
  fireEvent.click(within(sheet).getByRole('radio', { name: 'Assumed' }));
  await waitFor(() => expect(edits()).toEqual(['Length of LP-2-20']));
});

test('worst first leads with the worst load of the whole job', async () => {
  await open('LP-2', '&view=loads', 'Worst first');
  const [first] = within(screen.getByRole('table')).getAllByRole('rowheader');
  expect(first!.textContent).toContain('LP-2-20, Roof deck receptacles');
});
