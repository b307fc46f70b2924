import { deleteJob, getSession, listJobs, signIn } from '@farlug/contract/routes';
import { afterEach, expect, test, vi } from 'vitest';
import { ask, call, keepCsrfToken } from './call.ts';

const firm = '018f7a00-0000-7000-8000-000000000001';
const session = { person: null, memberships: [], local: false, csrfToken: 'token-of-the-session' };
interface Sent {
  url: string;
  init: RequestInit;
}

function server(answers: Record<string, () => Response>): Sent[] {
  const sent: Sent[] = [];
  vi.stubGlobal('fetch', async (url: string, init: RequestInit) => {
    sent.push({ url, init });
    const answer = answers[`${init.method} ${url}`];
    if (!answer) throw new TypeError(`nothing at ${init.method} ${url}`);
    return answer();
  });
  return sent;
}
const json = (body: unknown, status = 200) => new Response(JSON.stringify(body), { status });
const refusal = (code: string, details: unknown[] = []) => ({
  error: { code, message: 'In words.', requestId: 'r-1', details },
});

afterEach(() => vi.unstubAllGlobals());

test('a route becomes an address with its params and query, and its answer is read by its schema', async () => {
  const sent = server({
    [`GET /api/firms/${firm}/jobs?search=mill+%26+kiln&archived=no`]: () => json({ jobs: [] }),
  });
  const outcome = await call(listJobs, {
    params: { firm },
    query: { search: 'mill & kiln', archived: 'no' },
  });
  expect(outcome).toEqual({ ok: true, data: { jobs: [] } });
  expect(sent[0]?.init.body).toBeUndefined();
});

test('whatever changes something carries the token of the session', async () => {
  keepCsrfToken('kept');
  const sent = server({ 'POST /api/sign-in': () => json(session) });
  await call(signIn, { body: { email: 'mara@tannery.example', password: 'a long enough one' } });
  expect(new Headers(sent[0]?.init.headers).get('x-csrf-token')).toBe('kept');
  expect(JSON.parse(String(sent[0]?.init.body))).toEqual({
    email: 'mara@tannery.example',
    password: 'a long enough one',
  });
});

test('a token that has gone stale is fetched anew and the request repeated once', async () => {
  keepCsrfToken('stale');
  let asked = 0;
  const sent = server({
    'GET /api/session': () => json(session),
    [`DELETE /api/firms/${firm}/jobs/${firm}`]: () =>
      asked++ === 0 ? json(refusal('forbidden'), 403) : json({ ok: true }),
  });
  const outcome = await call(deleteJob, { params: { firm, job: firm } });
  expect(outcome.ok).toBe(true);
  expect(sent.map(({ url }) => url)).toEqual([
    `/api/firms/${firm}/jobs/${firm}`,
    '/api/session',
    `/api/firms/${firm}/jobs/${firm}`,
  ]);
  expect(new Headers(sent[2]?.init.headers).get('x-csrf-token')).toBe('token-of-the-session');
});

test('a refusal is a value with its code, its words and its places', async () => {
  keepCsrfToken('kept');
  server({
    'POST /api/sign-in': () =>
      json(refusal('invalid', [{ path: 'email', message: 'Enter an e-mail address.' }]), 422),
  });
  const outcome = await call(signIn, { body: { email: 'x', password: 'y' } });
  expect(outcome).toMatchObject({
    ok: false,
    error: {
      code: 'invalid',
      status: 422,
      requestId: 'r-1',
      message: 'In words.',
      details: [{ path: 'email' }],
    },
  });
});

test('an answer that the schema does not know, and a server that is away, are told apart', async () => {
  server({ 'GET /api/session': () => json({ person: 'nobody' }) });
  expect(await call(getSession, {})).toMatchObject({ ok: false, error: { code: 'unreadable' } });
  server({});
  expect(await call(getSession, {})).toMatchObject({ ok: false, error: { code: 'unreachable' } });
});

test('ask throws what call would answer', async () => {
  server({ 'GET /api/session': () => json(refusal('too_many'), 429) });
  await expect(ask(getSession, {})).rejects.toMatchObject({ code: 'too_many', status: 429 });
});
