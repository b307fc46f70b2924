import { cleanup, screen } from '@testing-library/react';
import { afterEach, expect, test, vi } from 'vitest';
import { FIRM, fakeServer, JOB, SIGNED_IN, VISITOR } from '../../testing/fake-server.ts';
import { renderPage } from '../../testing/render-page.tsx';
import { SlotProviders } from '../../ui/slot.tsx';
import { FirmFrame } from './firm-frame.tsx';

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const frame = (
  <SlotProviders>
    <FirmFrame />
  </SlotProviders>
);

test('a visitor is asked to sign in first', async () => {
  fakeServer({ 'GET /api/session': VISITOR });
  renderPage(frame, `/firms/${FIRM}/jobs`, '/firms/:firm/*');
  expect(await screen.findByText('came elsewhere')).toBeTruthy();
});

test('another firm’s address shows nothing of it', async () => {
  fakeServer({ 'GET /api/session': SIGNED_IN });
  renderPage(frame, `/firms/${JOB}/jobs`, '/firms/:firm/*');
  expect(await screen.findByRole('heading', { name: 'Nothing is drawn here.' })).toBeTruthy();
});

test('the places of a job stand in the rail only while one is open', async () => {
  fakeServer({ 'GET /api/session': SIGNED_IN });
  renderPage(frame, `/firms/${FIRM}/jobs`, '/firms/:firm/*');
  await screen.findAllByRole('link', { name: 'Jobs' });
  expect(screen.queryByRole('link', { name: 'Schedule' })).toBeNull();
  cleanup();
  renderPage(frame, `/firms/${FIRM}/jobs/${JOB}/sizes`, '/firms/:firm/*');
  const [sizes] = await screen.findAllByRole('link', { name: 'Sizes' });
  expect(sizes?.getAttribute('aria-current')).toBe('page');
  expect(screen.getAllByRole('link', { name: 'Reports' })[0]?.getAttribute('href')).toBe(
    `/firms/${FIRM}/jobs/${JOB}/reports`,
  );
});
