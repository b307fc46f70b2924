import { vi } from 'vitest';

export interface Sent {
  method: string;
  path: string;
  body: unknown;
}
type Answer = unknown | ((body: unknown) => unknown);

/** A refusal as the API writes it. */
export function refusal(code: string, status: number, message: string, details: unknown[] = []): Response {
  return Response.json({ error: { code, message, requestId: 'r-1', details } }, { status });
}

/** Answers `fetch` by method and path; what nobody prepared is a failing test. */
export function fakeServer(answers: Record<string, Answer>): Sent[] {
  const sent: Sent[] = [];
  vi.stubGlobal('fetch', async (url: string, init: RequestInit) => {
    const path = url.replace(/\?.*/, '');
    const key = `${init.method} ${path}`;
    if (!(key in answers)) throw new Error(`no answer prepared for ${key}`);
    const body = typeof init.body === 'string' ? JSON.parse(init.body) : undefined;
    sent.push({ method: init.method ?? 'GET', path: url, body });
    const answer = answers[key];
    const value = typeof answer === 'function' ? answer(body) : answer;
    return value instanceof Response ? value : Response.json(value);
  });
  return sent;
}

export const FIRM = '018f7a00-0000-7000-8000-000000000001';
export const JOB = '018f7a00-0000-7000-8000-00000000000a';
export const PERSON = '018f7a00-0000-7000-8000-0000000000aa';

export const VISITOR = { person: null, memberships: [], local: false, csrfToken: 'csrf' };
export const SIGNED_IN = {
  person: { id: PERSON, name: 'Mara Osier', email: 'mara@osier-electric.example' },
  memberships: [{ firmId: FIRM, firmName: 'Osier Electric', role: 'contractor' }],
  local: false,
  csrfToken: 'csrf',
};
