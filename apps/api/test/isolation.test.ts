import { randomUUID } from 'node:crypto';
import { blankJob } from '@farlug/contract/job';
import type { FirmRole, Route } from '@farlug/contract/route';
import { ALL_ROUTES, createJob, getFirm, getJob } from '@farlug/contract/routes';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startTestApi, type TestApi } from './start-test-api.ts';
import type { TestClient } from './test-client.ts';
import { joinFirm, signUpFirm, type TestFirm } from './test-firm.ts';
import { emptyRows } from './test-job.ts';

let api: TestApi;
let ours: TestFirm;
let theirs: TestFirm;
let job: string;
const people = {} as Record<FirmRole, TestClient>;
beforeAll(async () => {
  api = await startTestApi();
  ours = await signUpFirm(api, 'Ours');
  theirs = await signUpFirm(api, 'Theirs');
  people.admin = ours.admin;
  people.contractor = (await joinFirm(api, ours, 'contractor')).client;
  people.estimator = (await joinFirm(api, ours, 'estimator')).client;
  job = randomUUID();
  const row = blankJob({ id: job, name: 'Kiln House', lengthUnit: 'ft', wireUnit: 'awg' });
  await ours.admin.call(createJob, {
    params: { firm: ours.firm },
    body: { rows: { ...emptyRows(), job: [row] } },
  });
});
afterAll(() => api.close());

/** Fitting parameters for any route: real firm and job, anything else made up. */
function paramsOf(route: Route, firm: string): Record<string, string> {
  const names = [...route.path.matchAll(/:(\w+)/g)].map(([, name]) => name!);
  const known: Record<string, string> = { firm, job, message: 'none', index: '0' };
  return Object.fromEntries(names.map((name) => [name, known[name] ?? randomUUID()]));
}
const FIRM_ROUTES = ALL_ROUTES.filter(({ access }) => access.kind === 'member');
const call = (client: TestClient, route: Route, firm: string) =>
  client.call(route, { params: paramsOf(route, firm), body: route.method === 'GET' ? undefined : {} });

describe.each(FIRM_ROUTES.map((route) => [route.name, route] as const))('%s', (_name, route) => {
  it('is not there for another firm’s administrator, nor in a firm that is not there', async () => {
    expect(await call(theirs.admin, route, ours.firm)).toMatchObject({
      status: 404,
      error: { code: 'not_found' },
    });
    expect(await call(ours.admin, route, randomUUID())).toMatchObject({
      status: 404,
      error: { code: 'not_found' },
    });
  });

  it('asks somebody unknown to sign in', async () => {
    expect(await call(api.client(), route, ours.firm)).toMatchObject({
      status: 401,
      error: { code: 'sign_in_needed' },
    });
  });

  it('lets the roles of its contract pass and no others', async () => {
    if (route.access.kind !== 'member') throw new Error('not a route of a firm');
    for (const [role, client] of Object.entries(people) as [FirmRole, TestClient][]) {
      if (route.access.roles.includes(role)) continue;
      expect(await call(client, route, ours.firm), role).toMatchObject({
        status: 403,
        error: { code: 'forbidden' },
      });
    }
  });
});

it('shows another firm’s job to nobody, even under the own firm’s address', async () => {
  const params = { firm: theirs.firm, job };
  expect((await theirs.admin.call(getJob, { params })).status).toBe(404);
  expect((await ours.admin.call(getJob, { params: { firm: ours.firm, job } })).status).toBe(200);
});

it('treats what is no id like what is not there', async () => {
  const answer = await ours.admin.call(getFirm, { params: { firm: "x' or 1=1" } });
  expect(answer).toMatchObject({ status: 404, error: { code: 'not_found' } });
});

it('keeps roles that only administrators have from everybody else', () => {
  const restricted = FIRM_ROUTES.filter(({ access }) => access.kind === 'member' && access.roles.length < 3);
  expect(restricted.length).toBeGreaterThan(10);
  const issue = ALL_ROUTES.find(({ name }) => name === 'issueRevision');
  expect(issue?.access).toEqual({ kind: 'member', roles: ['admin', 'contractor'] });
});
