import { cleanup, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, expect, test, vi } from 'vitest';
import { fakeServer, refusal, SIGNED_IN, VISITOR } from '../../../testing/fake-server.ts';
import { renderPage } from '../../../testing/render-page.tsx';
import { SignInPage } from './sign-in-page.tsx';

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

async function signIn(email: string, password: string) {
  const user = userEvent.setup();
  await user.type(screen.getByLabelText('E-mail'), email);
  await user.type(screen.getByLabelText('Password'), password);
  await user.click(screen.getByRole('button', { name: 'Sign in' }));
}

test('who signs in comes to the page that asked for it', async () => {
  const sent = fakeServer({ 'GET /api/session': VISITOR, 'POST /api/sign-in': SIGNED_IN });
  renderPage(<SignInPage />, '/sign-in?next=%2Ffirms%2Fx%2Fjobs', '/sign-in');
  await signIn('mara@osier-electric.example', 'a password of hers');
  expect(await screen.findByText('came elsewhere')).toBeTruthy();
  expect(sent.at(-1)?.body).toEqual({ email: 'mara@osier-electric.example', password: 'a password of hers' });
});

test('an address outside the product is not gone to', async () => {
  fakeServer({ 'GET /api/session': VISITOR, 'POST /api/sign-in': { ...SIGNED_IN, memberships: [] } });
  renderPage(<SignInPage />, '/sign-in?next=%2F%2Felsewhere.example', '/sign-in');
  await signIn('mara@osier-electric.example', 'a password of hers');
  expect(await screen.findByText('came elsewhere')).toBeTruthy();
  expect(window.location.host).not.toBe('elsewhere.example');
});

test('a refusal is said in words and what was typed stays', async () => {
  fakeServer({
    'GET /api/session': VISITOR,
    'POST /api/sign-in': () => refusal('wrong_credentials', 401, 'E-mail and password do not go together.'),
  });
  renderPage(<SignInPage />, '/sign-in', '/sign-in');
  await signIn('mara@osier-electric.example', 'wrong');
  expect((await screen.findByRole('alert')).textContent).toContain('do not go together');
  expect((screen.getByLabelText('E-mail') as HTMLInputElement).value).toBe('mara@osier-electric.example');
});

test('an address that is none is said at the field before anything is sent', async () => {
  const sent = fakeServer({ 'GET /api/session': VISITOR });
  renderPage(<SignInPage />, '/sign-in', '/sign-in');
  await signIn('mara', 'x');
  expect(screen.getByLabelText('E-mail').getAttribute('aria-invalid')).toBe('true');
  expect(sent.filter(({ method }) => method === 'POST')).toEqual([]);
});
