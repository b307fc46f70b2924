import { cleanup, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, expect, test, vi } from 'vitest';
import { FIRM, fakeServer, JOB, PERSON, refusal, SIGNED_IN } from '../../../testing/fake-server.ts';
import { renderPage } from '../../../testing/render-page.tsx';
import type { JobStanding } from '../job-standing.ts';
import { ReportsPage } from './reports-page.tsx';

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const at = '2026-11-03T10:58:00.000Z';
const delivery = (changes: object) => ({
  id: crypto.randomUUID(),
  recipientName: 'Dele Moss',
  recipientEmail: 'dele@town.example',
  state: 'sent',
  attempts: 1,
  lastError: null,
  queuedAt: at,
  sentAt: at,
  openedAt: null,
  link: 'open',
  linkExpiresAt: '2026-12-03T10:58:00.000Z',
  ...changes,
});
const revision = (changes: object = {}) => ({
  id: PERSON,
  no: 2,
  seq: 40,
  sha256: 'af965f7bcab0deb6'.repeat(4),
  solverVersion: '0.1.0',
  issuedAt: at,
  issuedBy: 'Mara Osier',
  scenario: 'each-circuit',
  paper: 'letter',
  pdf: 'ready',
  over: 1,
  near: 2,
  within: 30,
  worstPercent: 5.2,
  deliveries: [],
  decisions: [],
  ...changes,
});
const standing: JobStanding = {
  seq: 42,
  saved: true,
  archived: false,
  scenario: 'design',
  panels: [{ id: JOB, label: 'LP-1' }],
  leftOut: [],
  unsolvable: null,
};
const LIST = `GET /api/firms/${FIRM}/jobs/${JOB}/revisions`;
const ISSUE = `POST /api/firms/${FIRM}/jobs/${JOB}/revisions`;
const page = (changes: Partial<JobStanding> = {}, mayIssue = true) => (
  <ReportsPage
    firm={FIRM}
    job={JOB}
    standing={{ ...standing, ...changes }}
    mayIssue={mayIssue}
    cautions={null}
  />
);

test('a report names the change that the person saw, and its scenario', async () => {
  const user = userEvent.setup();
  const issued = revision({ id: crypto.randomUUID(), no: 3, seq: 42, pdf: 'waiting' });
  let list = [revision()];
  const sent = fakeServer({
    'GET /api/session': SIGNED_IN,
    [LIST]: () => ({ headSeq: 42, revisions: list }),
    [ISSUE]: () => {
      list = [...list, issued];
      return issued;
    },
  });
  renderPage(page());
  await screen.findByRole('region', { name: 'Revision B' });
  await user.click(screen.getByRole('button', { name: 'Issue a report' }));
  await user.selectOptions(screen.getByLabelText('Node equations written out'), 'LP-1');
  await user.click(screen.getByRole('button', { name: 'Issue' }));
  expect(await screen.findByText(/Revision C is issued/)).toBeTruthy();
  expect(sent.find(({ method }) => method === 'POST')?.body).toMatchObject({
    seq: 42,
    scenario: 'design',
    equationsPanel: JOB,
  });
});

test('a job that moved on is said, and the dialog stays', async () => {
  const user = userEvent.setup();
  fakeServer({
    'GET /api/session': SIGNED_IN,
    [LIST]: { headSeq: 43, revisions: [] },
    [ISSUE]: () => refusal('job_moved_on', 409, 'The job is at change 43 now.'),
  });
  renderPage(page());
  await user.click(await screen.findByRole('button', { name: 'Issue a report' }));
  await user.click(screen.getByRole('button', { name: 'Issue' }));
  expect((await screen.findByRole('alert')).textContent).toContain('change 43');
  expect(screen.getByText(/look at it, then issue again/)).toBeTruthy();
});

test('rows that are left out stand in the way, each with the place where it is mended', async () => {
  fakeServer({ 'GET /api/session': SIGNED_IN, [LIST]: { headSeq: 42, revisions: [] } });
  renderPage(page({ leftOut: [{ key: 'a', label: 'LP-2-9, Loom room', reason: 'length', to: '/there' }] }));
  const way = await screen.findByRole('region', { name: 'Before a report can be issued' });
  expect(within(way).getByRole('link', { name: 'LP-2-9, Loom room' }).getAttribute('href')).toBe('/there');
  expect((screen.getByRole('button', { name: 'Issue a report' }) as HTMLButtonElement).disabled).toBe(true);
});

test('an uncertain delivery explains itself and is only repeated by a person', async () => {
  const user = userEvent.setup();
  const uncertain = delivery({ state: 'uncertain', sentAt: null });
  const resend = `POST /api/firms/${FIRM}/jobs/${JOB}/deliveries/${uncertain.id}/resend`;
  const sent = fakeServer({
    'GET /api/session': SIGNED_IN,
    [LIST]: { headSeq: 42, revisions: [revision({ deliveries: [uncertain] })] },
    [resend]: delivery({ id: uncertain.id }),
  });
  renderPage(page());
  expect(await screen.findByText(/it may have arrived/)).toBeTruthy();
  expect(sent.some(({ method }) => method === 'POST')).toBe(false);
  await user.click(screen.getByRole('button', { name: 'Actions for the delivery to Dele Moss' }));
  await user.click(await screen.findByRole('menuitem', { name: 'Send once more' }));
  await vi.waitFor(() => expect(sent.some(({ path }) => path.endsWith('/resend'))).toBe(true));
});

test('an estimator reads and is offered nothing to issue or send', async () => {
  fakeServer({
    'GET /api/session': SIGNED_IN,
    [LIST]: { headSeq: 42, revisions: [revision({ deliveries: [delivery({})] })] },
  });
  renderPage(page({}, false));
  await screen.findByRole('region', { name: 'Revision B' });
  expect(screen.queryByRole('button', { name: /Issue|Send|Actions|Enter/ })).toBeNull();
  expect(screen.getByRole('link', { name: 'Open the PDF' })).toBeTruthy();
});
