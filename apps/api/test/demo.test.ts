import { jobFromRows } from '@farlug/contract/job';
import { getJob, listJobs } from '@farlug/contract/routes';
import { rowsFromLists } from '@farlug/contract/rows';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { DEMO_ACCOUNTS } from '../src/demo/demo-accounts.ts';
import { seedDemo } from '../src/demo/seed-demo.ts';
import { startTestApi, type TestApi } from './start-test-api.ts';

let api: TestApi;
beforeAll(async () => {
  api = await startTestApi({ config: { local: true } });
});
afterAll(() => api.close());

it('gives one account per role and three jobs, of which one has lengths to be measured', async () => {
  expect(await seedDemo(api.deps)).toBe('made');
  expect(await seedDemo(api.deps)).toBe('there');
  expect(DEMO_ACCOUNTS.map(({ role }) => role).sort()).toEqual(['admin', 'contractor', 'estimator']);
  for (const { email, password } of DEMO_ACCOUNTS) {
    expect(email).toMatch(/\.example$/);
    const client = api.client();
    const firm = (await client.signIn(email, password)).memberships[0]!.firmId;
    const { jobs } = (await client.call(listJobs, { params: { firm } })).body;
    expect(jobs.map(({ name }) => name)).toEqual(['Tannery Row workshop', 'Weaving hall', 'Ridge cabin']);
    const open = (await client.call(getJob, { params: { firm, job: jobs[0]!.id } })).body;
    expect(jobFromRows(rowsFromLists(open.rows)).leftOutCount).toBeGreaterThan(0);
  }
});
