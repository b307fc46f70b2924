import { randomUUID } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { blankJob } from '@farlug/contract/job';
import {
  ALL_ROUTES,
  archiveJob,
  createJob,
  inviteMember,
  postEdit,
  readSchedule,
  saveFirmConductor,
  setMemberRole,
  signIn,
  signUp,
} from '@farlug/contract/routes';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { mountFeatures } from '../src/app.ts';
import { type ErrorWorld, exerciseErrors, type ProvokeTable, paramsFor } from './exercise-errors.ts';
import { REPORT_ERRORS } from './report-errors.ts';
import { startTestApi } from './start-test-api.ts';
import { invitationToken, joinFirm, PASSWORD, signUpFirm } from './test-firm.ts';
import { emptyRows, withRevision } from './test-job.ts';

let world: ErrorWorld;
beforeAll(async () => {
  const api = await startTestApi();
  const tight = Object.fromEntries(ALL_ROUTES.map(({ name }) => [name, { hits: 2, windowS: 3600 }]));
  const limited = await startTestApi({
    database: api.database,
    rateLimits: { ...tight, signIn: { hits: 100, windowS: 3600, hitsPerEmail: 100 } },
  });
  const firm = await signUpFirm(api);
  const other = await signUpFirm(api);
  world = { api, limited, firm, other, estimator: await joinFirm(api, firm, 'estimator') };
});
afterAll(async () => {
  await world.limited.close();
  await world.api.close();
});

async function newJob({ firm }: ErrorWorld): Promise<{ firm: string; job: string }> {
  const job = randomUUID();
  const row = blankJob({ id: job, name: 'Kiln House', lengthUnit: 'ft', wireUnit: 'awg' });
  await firm.admin.call(createJob, {
    params: { firm: firm.firm },
    body: { rows: { ...emptyRows(), job: [row] } },
  });
  return { firm: firm.firm, job };
}
const rename = (job: string, was: string) => ({
  editId: randomUUID(),
  label: 'name',
  ops: [{ table: 'job' as const, row: job, was: { name: was }, set: { name: 'New' } }],
});
const TOO_LARGE = { nonsense: 'x'.repeat(25 * 1024 * 1024) };
const BAD_TOKEN = 'x'.repeat(43);

const OWN: ProvokeTable = {
  signUp: {
    conflict: ({ api, firm }) =>
      api.client().call(signUp, {
        body: { name: 'A', email: firm.adminEmail, password: PASSWORD, firmName: 'B' },
      }),
  },
  signIn: {
    wrong_credentials: ({ api, firm }) =>
      api.client().call(signIn, { body: { email: firm.adminEmail, password: 'wrong' } }),
    too_many: async ({ api }) => {
      const limited = await startTestApi({
        database: api.database,
        rateLimits: { ...api.deps.rateLimits, signIn: { hits: 1, windowS: 3600 } },
      });
      const body = { email: 'nobody@firm.example', password: 'x' };
      await limited.client().call(signIn, { body });
      const answer = await limited.client().call(signIn, { body });
      await limited.close();
      return answer;
    },
  },
  resetPassword: {
    link_gone: ({ api }, route) =>
      api.client().call(route, { body: { token: BAD_TOKEN, password: PASSWORD } }),
  },
  readInvitation: {
    link_gone: ({ api }, route) => api.client().call(route, { body: { token: BAD_TOKEN } }),
  },
  acceptInvitation: {
    link_gone: ({ api }, route) =>
      api.client().call(route, { body: { token: BAD_TOKEN, name: 'A', password: PASSWORD } }),
    wrong_credentials: async ({ api, firm, other }, route) => {
      await firm.admin.call(inviteMember, {
        params: { firm: firm.firm },
        body: { email: other.adminEmail, role: 'estimator' },
      });
      const token = await invitationToken(api, other.adminEmail);
      return api.client().call(route, { body: { token, name: null, password: 'wrong' } });
    },
  },
  changePassword: {
    wrong_credentials: ({ firm }, route) =>
      firm.admin.call(route, { body: { current: 'wrong', password: PASSWORD } }),
  },
  inviteMember: {
    conflict: ({ firm, estimator }) =>
      firm.admin.call(inviteMember, {
        params: { firm: firm.firm },
        body: { email: estimator.email, role: 'admin' },
      }),
  },
  setMemberRole: {
    conflict: ({ firm }) =>
      firm.admin.call(setMemberRole, {
        params: { firm: firm.firm, person: firm.adminId },
        body: { role: 'estimator' },
      }),
  },
  removeMember: {
    conflict: ({ firm }, route) =>
      firm.admin.call(route, { params: { firm: firm.firm, person: firm.adminId } }),
  },
  saveFirmConductor: {
    conflict: async ({ firm }) => {
      const save = () =>
        firm.admin.call(saveFirmConductor, {
          params: { firm: firm.firm, conductor: randomUUID() },
          body: {
            name: 'House 10',
            material: 'copper',
            areaMm2: '5.26',
            r: '1.24',
            x: '0.05',
            per: '1000ft',
            temperature: '75',
            ampacity: null,
            source: 'Data sheet',
          },
        });
      await save();
      return save();
    },
  },
  readSchedule: {
    invalid: ({ firm }) => {
      const { agent, csrfToken } = firm.admin;
      return agent
        .post(`/api/firms/${firm.firm}/schedule-files`)
        .set('x-csrf-token', csrfToken)
        .type('multipart/form-data; boundary=b')
        .send('--b--\r\n')
        .then(({ status, body }) => ({ status, error: body.error }) as never);
    },
    too_large: ({ firm }) =>
      firm.admin.call(readSchedule, {
        params: { firm: firm.firm },
        file: { name: 'a.csv', bytes: Buffer.alloc(6 * 1024 * 1024, 'a,') },
      }),
    unsupported_file: ({ firm }) =>
      firm.admin.call(readSchedule, {
        params: { firm: firm.firm },
        file: { name: 'a.csv', bytes: Buffer.from('%PDF-1.7') },
      }),
  },
  createJob: {
    conflict: async (here) => {
      const { job, firm } = await newJob(here);
      const row = blankJob({ id: job, name: 'Another', lengthUnit: 'ft', wireUnit: 'awg' });
      return here.firm.admin.call(createJob, {
        params: { firm },
        body: { rows: { ...emptyRows(), job: [row] } },
      });
    },
    too_large: ({ firm }, route) => firm.admin.call(route, { params: { firm: firm.firm }, body: TOO_LARGE }),
  },
  postEdit: {
    conflict: async (here) => {
      const params = await newJob(here);
      return here.firm.admin.call(postEdit, { params, body: rename(params.job, 'Not its name') });
    },
    archived: async (here) => {
      const params = await newJob(here);
      await here.firm.admin.call(archiveJob, { params, body: { archived: true } });
      return here.firm.admin.call(postEdit, { params, body: rename(params.job, 'Kiln House') });
    },
    too_large: ({ firm }, route) =>
      firm.admin.call(route, { params: paramsFor(route, { firm: firm.firm }), body: TOO_LARGE }),
  },
  duplicateJob: {
    conflict: async (here, route) => {
      const params = await newJob(here);
      return here.firm.admin.call(route, { params, body: { id: params.job, name: 'Copy' } });
    },
  },
  deleteJob: {
    conflict: async (here, route) => {
      const params = await newJob(here);
      await withRevision(here.api, params, here.firm.adminId);
      return here.firm.admin.call(route, { params });
    },
  },
};

describe('every code', () => {
  exerciseErrors(() => world, ALL_ROUTES, { ...OWN, ...REPORT_ERRORS });
});

describe('every route', () => {
  it('has a handler', () => {
    const { mounted } = mountFeatures(world.api.deps);
    expect([...mounted].sort()).toEqual(ALL_ROUTES.map(({ name }) => name).sort());
  });

  it('lists "invalid" where a body can be wrong', () => {
    const silent = ALL_ROUTES.filter(
      ({ kind, body, errors }) =>
        kind === 'json' && !body.safeParse(undefined).success && !errors.includes('invalid'),
    );
    expect(silent.map(({ name }) => name)).toEqual([]);
  });

  it('is called over HTTP by a test', () => {
    const root = fileURLToPath(new URL('..', import.meta.url));
    const tests = ['src', 'test']
      .flatMap((part) =>
        readdirSync(path.join(root, part), { recursive: true }).map((file) =>
          path.join(root, part, String(file)),
        ),
      )
      .filter((file) => file.endsWith('.test.ts'))
      .map((file) => readFileSync(file, 'utf8'))
      .join('\n');
    const uncalled = ALL_ROUTES.filter(({ name }) => !new RegExp(`\\.call\\(\\s*${name}\\b`).test(tests));
    expect(uncalled.map(({ name }) => name)).toEqual([]);
  });
});
