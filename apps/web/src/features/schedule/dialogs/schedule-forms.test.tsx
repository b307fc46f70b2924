import { applyEdit, type Edit } from '@farlug/contract/edit';
import type { JobRows } from '@farlug/contract/rows';
import { scheduleView } from '@farlug/contract/schedule';
import { cleanup, configure, render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, expect, test, vi } from 'vitest';
import { demoRows } from '../upload/testing/sample-sheet.ts';
import { FeederDialog } from './feeder-dialog.tsx';
import { newFeederDraft, settleFeeder } from './feeder-draft.ts';
import { DeletePanelDialog, DuplicatePanelDialog } from './panel-actions.tsx';
import { PanelDialog } from './panel-dialog.tsx';
import { SourceDialog } from './source-dialog.tsx';
import { newSourceDraft, settleSource } from './source-draft.ts';
import { TransformerDialog } from './transformer-dialog.tsx';

// Whole dialogs under a busy machine: a slow answer is not a wrong one.
configure({ asyncUtilTimeout: 10_000 });

afterEach(cleanup);

const rows = demoRows('tannery-row.json');
const panelOf = (now: JobRows, code: string) => scheduleView(now).panels.find((panel) => panel.code === code);
/** A job that takes edits, and the rows that they lead to. */
function openJob() {
  const job = { rows, edits: [] as Edit[] };
  const apply = (edit: Edit): string | null => {
    const outcome = applyEdit(job.rows, edit);
    if (!outcome.ok) return JSON.stringify(outcome);
    job.rows = outcome.rows;
    job.edits.push(edit);
    return null;
  };
  return { job, props: { rows, apply, onClose: vi.fn(), onAsk: vi.fn() } };
}

test('a panel is added by keyboard; what was understood is said at once', async () => {
  const { job, props } = openJob();
  const onDone = vi.fn();
  render(
    <PanelDialog {...props} panelId={null} feed={`panel:${panelOf(rows, 'DP-L')!.id}`} onDone={onDone} />,
  );
  const user = userEvent.setup();
  await user.type(screen.getByLabelText('Name'), 'LP-7');
  await user.type(screen.getByLabelText('Length, one way'), '36m');
  expect(screen.getByText('= 118.1 ft')).toBeDefined();
  await user.type(screen.getByLabelText('Size of the lines'), '2 x 1/0 al');
  expect(screen.getByText('= 2 sets of 1/0 AWG, aluminum')).toBeDefined();
  await user.type(screen.getByLabelText('Breaker there'), '100');
  expect(screen.getByText('= 100 A, 3 poles')).toBeDefined();
  await user.type(screen.getByLabelText('Breaker there'), '{Enter}');
  await waitFor(() => expect(onDone).toHaveBeenCalled());
  expect(job.edits).toHaveLength(1);
  expect(panelOf(job.rows, 'LP-7')!.fedFromText).toMatch(/^DP-L-/);
});

test('a field that is wrong keeps its text, says what would be right, and takes the focus', async () => {
  const { job, props } = openJob();
  render(<PanelDialog {...props} panelId={null} feed="" onDone={vi.fn()} />);
  const user = userEvent.setup();
  await user.type(screen.getByLabelText('Name'), 'LP-2');
  await user.click(screen.getByRole('button', { name: 'Add the panel' }));
  const name = screen.getByLabelText('Name') as HTMLInputElement;
  expect(await screen.findByText(/LP-2 is already the name of a point of this job/)).toBeDefined();
  expect(name.getAttribute('aria-invalid')).toBe('true');
  await waitFor(() => expect(document.activeElement).toBe(name));
  expect(name.value).toBe('LP-2');
  expect(job.edits).toEqual([]);
  await user.type(name, 'x');
  expect(screen.queryByText(/already the name/)).toBeNull();
});

test('the panel behind a transformer leads to what stands on the way', async () => {
  const { props } = openJob();
  render(<PanelDialog {...props} panelId={panelOf(rows, 'DP-L')!.id} feed="" onDone={vi.fn()} />);
  await userEvent.setup().click(screen.getByRole('button', { name: 'transformer T1' }));
  expect(props.onAsk).toHaveBeenCalledWith({ kind: 'transformer', id: [...rows.transformer.keys()][0] });
});

test('a panel is duplicated under a free name', async () => {
  const { job, props } = openJob();
  const onDone = vi.fn();
  render(<DuplicatePanelDialog {...props} panelId={panelOf(rows, 'LP-3')!.id} onDone={onDone} />);
  const user = userEvent.setup();
  await user.type(screen.getByLabelText('Name of the copy'), 'LP-1{Enter}');
  expect(await screen.findByText(/already the name/)).toBeDefined();
  await user.clear(screen.getByLabelText('Name of the copy'));
  await user.type(screen.getByLabelText('Name of the copy'), 'LP-8{Enter}');
  await waitFor(() => expect(onDone).toHaveBeenCalled());
  const own = (panel: ReturnType<typeof panelOf>) =>
    panel!.circuits.filter((one) => one.circuit.kind === 'branch').length;
  expect(own(panelOf(job.rows, 'LP-8'))).toBe(own(panelOf(rows, 'LP-3')));
});

test('a panel goes after saying what goes with it', async () => {
  const { job, props } = openJob();
  render(<DeletePanelDialog {...props} panelId={panelOf(rows, 'LP-2')!.id} onDone={vi.fn()} />);
  expect(screen.getByText(/LP-3 stays without a feed/)).toBeDefined();
  await userEvent.setup().click(screen.getByRole('button', { name: 'Delete LP-2' }));
  expect(panelOf(job.rows, 'LP-2')).toBeUndefined();
  expect(panelOf(job.rows, 'LP-3')!.fedFrom).toBeNull();
});

test('a transformer is deleted only when asked for twice', async () => {
  const { job, props } = openJob();
  const [id] = [...rows.transformer.keys()];
  render(<TransformerDialog {...props} transformerId={id!} feed="" />);
  const user = userEvent.setup();
  await user.click(screen.getByRole('button', { name: 'Delete …' }));
  expect(job.edits).toEqual([]);
  await user.click(screen.getByRole('button', { name: 'Delete transformer T1' }));
  expect(job.rows.transformer.size).toBe(rows.transformer.size - 1);
});

test('a transformer follows what feeds it', async () => {
  const { props } = openJob();
  render(<TransformerDialog {...props} transformerId={null} feed="" />);
  const user = userEvent.setup();
  await user.selectOptions(screen.getByLabelText('Primary fed from'), `panel:${panelOf(rows, 'LP-2')!.id}`);
  expect((screen.getByLabelText('Primary volts') as HTMLInputElement).value).toBe('208');
  await user.selectOptions(screen.getByLabelText('Connection, primary to secondary'), 'single-phase');
  expect((screen.getByLabelText('Primary between') as HTMLSelectElement).value).toBe('L1-L2');
  await user.click(screen.getByRole('radio', { name: 'R/X' }));
  expect(screen.getByLabelText('R/X', { selector: 'input' })).toBeDefined();
});

test('a run that stands is changed in its own fields, folded ones too', async () => {
  const { job, props } = openJob();
  const run = [...rows.run.values()].find((one) => one.code === 'F8')!;
  render(<FeederDialog {...props} runId={run.id} feed="" />);
  const user = userEvent.setup();
  const length = screen.getByLabelText('Length, one way');
  await user.clear(length);
  await user.type(length, '40m');
  await user.selectOptions(screen.getByLabelText('The length is'), 'measured');
  await user.type(screen.getByLabelText('Ambient'), '104 F');
  expect(screen.getByText('= 40 °C')).toBeDefined();
  await user.click(screen.getByRole('button', { name: 'Save the run' }));
  await waitFor(() => expect(props.onClose).toHaveBeenCalled());
  expect(job.rows.run.get(run.id)).toMatchObject({ length: '40 m', lengthState: 'measured', ambient: '40' });
  expect(job.edits).toHaveLength(1);
});

test('a source needs what its fault current is', async () => {
  const { job, props } = openJob();
  render(<SourceDialog {...props} />);
  const user = userEvent.setup();
  await user.type(screen.getByLabelText('Name'), 'Standby');
  await user.selectOptions(screen.getByLabelText('Feeds in at'), `panel:${panelOf(rows, 'MDP')!.id}`);
  await user.click(screen.getByRole('button', { name: 'Add the source' }));
  expect(await screen.findByText('Fault current must be given.')).toBeDefined();
  await user.type(screen.getByLabelText('Three-phase fault current'), '1.2 kA');
  await user.click(screen.getByRole('button', { name: 'Add the source' }));
  await waitFor(() => expect(job.rows.source.size).toBe(rows.source.size + 1));
});

test('of several fields in a part, the one that is wrong takes the focus', async () => {
  const { props } = openJob();
  const feed = `panel:${panelOf(rows, 'DP-L')!.id}` as const;
  render(<FeederDialog {...props} runId={null} feed={feed} />);
  const user = userEvent.setup();
  await user.type(screen.getByLabelText('Name'), 'F99');
  await user.selectOptions(screen.getByLabelText('To'), feed);
  await user.click(screen.getByRole('button', { name: 'Add the run' }));
  expect(await screen.findByText(/from one point to another: choose two/)).toBeDefined();
  await waitFor(() => expect(document.activeElement).toBe(screen.getByLabelText('To')));
});

test('Esc asks before what was typed is let go', async () => {
  const { props } = openJob();
  render(<PanelDialog {...props} panelId={null} feed="" onDone={vi.fn()} />);
  const user = userEvent.setup();
  await user.type(screen.getByLabelText('Name'), 'LP-7');
  await user.keyboard('{Escape}');
  expect(props.onClose).not.toHaveBeenCalled();
  await user.click(screen.getByRole('button', { name: 'Go on typing' }));
  expect((screen.getByLabelText('Name') as HTMLInputElement).value).toBe('LP-7');
  await user.keyboard('{Escape}');
  await user.click(screen.getByRole('button', { name: 'Let it go' }));
  expect(props.onClose).toHaveBeenCalled();
});

test('a further source is deleted when asked for twice', async () => {
  const made = settleSource(rows, {
    ...newSourceDraft(rows),
    code: 'Standby',
    to: `panel:${panelOf(rows, 'MDP')!.id}`,
    faultAmps: '900',
  });
  const { job, props } = openJob();
  props.apply(made.edit!);
  render(<SourceDialog {...props} rows={job.rows} />);
  const user = userEvent.setup();
  await user.click(screen.getByRole('button', { name: 'Delete Standby …' }));
  expect(job.rows.source.size).toBe(2);
  await user.click(screen.getByRole('button', { name: 'Delete Standby' }));
  expect(job.rows.source.size).toBe(1);
  expect(job.rows.run.size).toBe(rows.run.size);
});

test('a run beside the feeder of a panel is reached from the panel', async () => {
  const made = settleFeeder(rows, null, {
    ...newFeederDraft(`panel:${panelOf(rows, 'DP-L')!.id}`),
    code: 'F99',
    to: `panel:${panelOf(rows, 'LP-2')!.id}`,
  });
  const { job, props } = openJob();
  props.apply(made.edit!);
  render(
    <PanelDialog {...props} rows={job.rows} panelId={panelOf(rows, 'LP-2')!.id} feed="" onDone={vi.fn()} />,
  );
  await userEvent.setup().click(screen.getByRole('button', { name: 'run F99' }));
  expect(props.onAsk).toHaveBeenCalledWith({ kind: 'feeder', id: made.id });
});
