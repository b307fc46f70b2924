import type { Route } from '@farlug/contract/route';
import { ALL_ROUTES, requestPasswordReset, signIn } from '@farlug/contract/routes';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { RATE_LIMITS } from '../src/platform/rate-limits.ts';
import { startTestApi, type TestApi } from './start-test-api.ts';
import type { TestClient } from './test-client.ts';
import { PASSWORD, signUpFirm, type TestFirm } from './test-firm.ts';
import { inspectorOf, queuedDelivery } from './test-report.ts';

const LIMITED = ALL_ROUTES.filter(({ errors }) => errors.includes('too_many'));
let api: TestApi;
let byEmail: TestApi;
let firm: TestFirm;
let inspector: TestClient;
beforeAll(async () => {
  const tight = Object.fromEntries(LIMITED.map(({ name }) => [name, { hits: 2, windowS: 3600 }]));
  api = await startTestApi({ rateLimits: tight });
  firm = await signUpFirm(api);
  inspector = await inspectorOf(api, await queuedDelivery(api, firm));
  byEmail = await startTestApi({
    rateLimits: {
      ...RATE_LIMITS,
      signIn: { hits: 100, windowS: 3600, hitsPerEmail: 2, refusalsOnly: true },
      requestPasswordReset: { hits: 100, windowS: 3600, hitsPerEmail: 2 },
    },
  });
});
afterAll(async () => {
  await Promise.all([api.close(), byEmail.close()]);
});

const made: Record<string, string> = {};
const idFor = (name: string) => (made[name] ??= crypto.randomUUID());
const paramsOf = (route: Route) =>
  Object.fromEntries(
    [...route.path.matchAll(/:(\w+)/g)].map(([, name]) => [
      name!,
      name === 'firm' ? firm.firm : idFor(name!),
    ]),
  );

it('has a limit for every route that may answer too_many, and for no other', () => {
  expect(Object.keys(RATE_LIMITS).sort()).toEqual(LIMITED.map(({ name }) => name).sort());
});

it.each(LIMITED.map((route) => [route.name, route] as const))(
  '%s answers too_many after so many tries, whatever is sent, and says when to come back',
  async (_name, route) => {
    const client = { public: api.client(), inspection: inspector }[String(route.access.kind)] ?? firm.admin;
    let answer = await client.call(route, { params: paramsOf(route), body: {} });
    for (let tries = 1; tries < 4 && answer.status !== 429; tries += 1)
      answer = await client.call(route, { params: paramsOf(route), body: {} });
    expect(answer).toMatchObject({
      status: 429,
      error: { code: 'too_many', message: expect.stringMatching(/Wait 60 minutes/) },
    });
    expect(Number(answer.headers['retry-after'])).toBeGreaterThan(0);
  },
);

it('counts tries on one address across browsers, and leaves others alone', async () => {
  const { adminEmail } = await signUpFirm(byEmail);
  const { adminEmail: other } = await signUpFirm(byEmail);
  const tryOnce = (email: string, password: string) =>
    byEmail.client().call(signIn, { body: { email, password } });
  expect((await tryOnce(adminEmail, 'a')).status).toBe(401);
  expect((await tryOnce(adminEmail.toUpperCase(), 'b')).status).toBe(401);
  expect((await tryOnce(` ${adminEmail}`.trim(), PASSWORD)).status).toBe(429);
  for (let times = 0; times < 4; times += 1) expect((await tryOnce(other, PASSWORD)).status).toBe(200);
  const reset = () => byEmail.client().call(requestPasswordReset, { body: { email: adminEmail } });
  expect([(await reset()).status, (await reset()).status, (await reset()).status]).toEqual([200, 200, 429]);
});
