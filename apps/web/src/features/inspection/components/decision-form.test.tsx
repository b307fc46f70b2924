import { cleanup, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { afterEach, expect, test, vi } from 'vitest';
import { fakeServer, refusal, VISITOR } from '../../../testing/fake-server.ts';
import { renderPage } from '../../../testing/render-page.tsx';
import { DecisionForm } from './decision-form.tsx';
import { OpenLinkPage } from './open-link-page.tsx';

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
  window.history.replaceState(null, '', '/');
});

test('corrections need words and a name; then the decision is recorded as typed', async () => {
  const user = userEvent.setup();
  const sent = fakeServer({ 'GET /api/session': VISITOR, 'POST /api/inspection/decisions': { ok: true } });
  renderPage(<DecisionForm letter="B" recipient="" />);
  await user.click(screen.getByRole('button', { name: 'Record' }));
  expect(screen.getByText(/Choose one/)).toBeTruthy();
  expect(screen.getByText(/Enter a name/)).toBeTruthy();
  await user.click(screen.getByRole('radio', { name: 'Corrections needed' }));
  expect(screen.getByText(/Say what needs correction/)).toBeTruthy();
  await user.type(screen.getByLabelText('Comments'), 'Measure LP-2-20.');
  await user.type(screen.getByLabelText('Name, as typed and unverified'), 'Dele Moss');
  await user.click(screen.getByRole('button', { name: 'Record' }));
  expect(await screen.findByText(/on record against revision B/)).toBeTruthy();
  expect(sent.at(-1)?.body).toMatchObject({
    decision: 'corrections-needed',
    comments: 'Measure LP-2-20.',
    name: 'Dele Moss',
  });
});

test('a circuit that is asked for is taken up in the comments, below what stands there', async () => {
  const user = userEvent.setup();
  fakeServer({ 'GET /api/session': VISITOR });
  const Asking = () => {
    const [asked, setAsked] = useState<{ no: number; place: string } | null>(null);
    return (
      <>
        <button type="button" onClick={() => setAsked({ no: (asked?.no ?? 0) + 1, place: 'LP-2-20' })}>
          ask
        </button>
        <DecisionForm letter="B" recipient="" asked={asked} />
      </>
    );
  };
  renderPage(<Asking />);
  const comments = screen.getByLabelText('Comments') as HTMLTextAreaElement;
  await user.type(comments, 'Look again.');
  await user.click(screen.getByRole('button', { name: 'ask' }));
  expect(comments.value).toBe('Look again.\nLP-2-20: ');
  await user.keyboard('is assumed');
  expect(comments.value).toBe('Look again.\nLP-2-20: is assumed');
});

test('the token of the link is sent once, leaves the address, and the page goes on at a clean one', async () => {
  window.history.replaceState(null, '', '/i#abcdefghijklmnopqrstuvwxyz');
  const sent = fakeServer({ 'GET /api/session': VISITOR, 'POST /api/inspection/open': { ok: true } });
  renderPage(<OpenLinkPage />, '/i', '/i');
  expect(await screen.findByText('came elsewhere')).toBeTruthy();
  expect(window.location.hash).toBe('');
  expect(sent.filter(({ method }) => method === 'POST')).toEqual([
    { method: 'POST', path: '/api/inspection/open', body: { token: 'abcdefghijklmnopqrstuvwxyz' } },
  ]);
});

test('a link that has ended says what can be done', async () => {
  window.history.replaceState(null, '', '/i#abcdefghijklmnopqrstuvwxyz');
  fakeServer({
    'GET /api/session': VISITOR,
    'POST /api/inspection/open': () => refusal('link_gone', 410, 'Gone.'),
  });
  renderPage(<OpenLinkPage />, '/i', '/i');
  expect(await screen.findByRole('heading', { name: /no longer opens the report/ })).toBeTruthy();
});
