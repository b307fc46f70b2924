import { ERROR_CODES, type ErrorCode } from '@farlug/contract/errors';
import type { Route } from '@farlug/contract/route';
import { expect, it } from 'vitest';
import type { TestApi } from './start-test-api.ts';
import type { Received, TestClient } from './test-client.ts';
import { PASSWORD, type TestFirm, type TestMember } from './test-firm.ts';

export interface ErrorWorld {
  api: TestApi;
  /** The same database, but every limit is two tries. */
  limited: TestApi;
  firm: TestFirm;
  other: TestFirm;
  estimator: TestMember;
}
/** Brings a route to answer one code. */
export type Provoke = (world: ErrorWorld, route: Route) => Promise<Received<Route>>;
export type ProvokeTable = Record<string, Partial<Record<ErrorCode, Provoke>>>;

/** Fitting parameters for any route; what is not given is an id that leads nowhere. */
export function paramsFor(route: Route, given: Record<string, string>): Record<string, string> {
  const names = [...route.path.matchAll(/:(\w+)/g)].map(([, name]) => name!);
  return Object.fromEntries(names.map((name) => [name, given[name] ?? crypto.randomUUID()]));
}

const send = (client: TestClient, route: Route, firm: string, body: unknown = {}) =>
  client.call(route, {
    params: paramsFor(route, { firm }),
    body: route.method === 'GET' ? undefined : body,
  });

/** What any route answers in the same case; a route's own entry comes first. */
const USUAL: Partial<Record<ErrorCode, Provoke>> = {
  not_found: ({ firm, other }, route) => send(other.admin, route, firm.firm),
  forbidden: ({ firm, estimator }, route) => send(estimator.client, route, firm.firm),
  invalid: ({ firm }, route) => send(firm.admin, route, firm.firm, { nonsense: 1 }),
  sign_in_needed: ({ api, firm }, route) => send(api.client(), route, firm.firm),
  too_many: async ({ limited, firm }, route) => {
    const client = limited.client();
    if (route.access.kind !== 'public') await client.signIn(firm.adminEmail, PASSWORD);
    const params = paramsFor(route, { firm: firm.firm });
    let answer = await client.call(route, { params, body: {} });
    for (let tries = 1; tries < 3; tries += 1) answer = await client.call(route, { params, body: {} });
    return answer;
  },
};

/** One test per route and code that its contract lists; a code that nothing provokes fails too. */
export function exerciseErrors(world: () => ErrorWorld, routes: readonly Route[], own: ProvokeTable): void {
  const names = routes.map(({ name }) => name);
  it('knows no route or code that the contract does not list', () => {
    for (const [name, codes] of Object.entries(own)) {
      expect(names).toContain(name);
      const { errors } = routes.find((route) => route.name === name)!;
      for (const code of Object.keys(codes)) expect(errors, name).toContain(code);
    }
  });
  for (const route of routes)
    for (const code of route.errors)
      it(`${route.name} answers ${code}`, async () => {
        const provoke = own[route.name]?.[code] ?? USUAL[code];
        if (!provoke) throw new Error(`nothing makes ${route.name} answer ${code}`);
        const { status, error } = await provoke(world(), route);
        expect(error?.code).toBe(code);
        expect(status).toBe(ERROR_CODES[code]);
        expect(error.message).toMatch(/^[A-Z\d].*\.$/s);
      });
}
