import { z } from 'zod';
import { edit, editConflict } from '../edit/index.ts';
import { MEMBER, route } from '../route.ts';
import { jobRowLists } from '../rows/index.ts';
import { empty, exactText, firmParams, freeText, instant, jobParams, none, ok } from './common.ts';

/** What the list shows of a job without opening it; the figures are of the last solve that a browser reported. */
export const jobSummary = z.strictObject({
  id: z.uuid(),
  name: z.string(),
  address: z.string().nullable(),
  changedAt: instant,
  changedBy: z.string().nullable(),
  archivedAt: instant.nullable(),
  headSeq: z.int(),
  circuits: z.int(),
  /** Of the solve at `atSeq`: older than `headSeq` means that it is out of date. `null`: not solved yet. */
  verdict: z
    .strictObject({
      atSeq: z.int(),
      solverVersion: exactText(40),
      worstPercent: z.number().nullable(),
      over: z.int(),
      near: z.int(),
      within: z.int(),
      leftOut: z.int(),
    })
    .nullable(),
  revision: z.strictObject({ no: z.int(), issuedAt: instant, decision: z.string().nullable() }).nullable(),
});
export type JobSummary = z.output<typeof jobSummary>;

export const listJobs = route({
  name: 'listJobs',
  method: 'GET',
  path: '/api/firms/:firm/jobs',
  access: MEMBER,
  kind: 'json',
  idempotent: true,
  params: firmParams,
  query: z.strictObject({
    search: exactText(200).optional(),
    archived: z.enum(['no', 'yes']).optional(),
  }),
  body: empty,
  response: z.strictObject({ jobs: z.array(jobSummary) }),
  errors: ['not_found'],
});

export const openJob = z.strictObject({
  headSeq: z.int(),
  archivedAt: instant.nullable(),
  hasRevisions: z.boolean(),
  rows: jobRowLists,
});
export type OpenJob = z.output<typeof openJob>;

/** The rows of a new job: `rows.job` holds exactly one row, whose id becomes the job's. Uploaded job files come so too. */
export const createJob = route({
  name: 'createJob',
  method: 'POST',
  path: '/api/firms/:firm/jobs',
  access: MEMBER,
  kind: 'json',
  idempotent: true,
  params: firmParams,
  query: none,
  body: z.strictObject({ rows: jobRowLists }),
  response: z.strictObject({ id: z.uuid(), headSeq: z.int() }),
  errors: ['invalid', 'conflict', 'not_found', 'too_large'],
});

export const getJob = route({
  name: 'getJob',
  method: 'GET',
  path: '/api/firms/:firm/jobs/:job',
  access: MEMBER,
  kind: 'json',
  idempotent: true,
  params: jobParams,
  query: none,
  body: empty,
  response: openJob,
  errors: ['not_found'],
});

/** 409 `conflict` answers with `details` of the shape of `editConflict`. The same `editId` answers its first `seq`. */
export const postEdit = route({
  name: 'postEdit',
  method: 'POST',
  path: '/api/firms/:firm/jobs/:job/edits',
  access: MEMBER,
  kind: 'json',
  idempotent: true,
  params: jobParams,
  query: none,
  body: edit,
  response: z.strictObject({ seq: z.int(), headSeq: z.int() }),
  errors: ['invalid', 'conflict', 'archived', 'not_found', 'too_large'],
});
export const conflictDetail = editConflict.extend({ path: z.string(), message: z.string() });

/** The edits after `since`, in order: how another page of the same job catches up. */
export const listEdits = route({
  name: 'listEdits',
  method: 'GET',
  path: '/api/firms/:firm/jobs/:job/edits',
  access: MEMBER,
  kind: 'json',
  idempotent: true,
  params: jobParams,
  query: z.strictObject({ since: z.coerce.number().int().nonnegative() }),
  body: empty,
  response: z.strictObject({
    headSeq: z.int(),
    edits: z.array(
      z.strictObject({
        seq: z.int(),
        editId: z.uuid(),
        person: z.string(),
        label: z.string(),
        at: instant,
        ops: edit.shape.ops,
      }),
    ),
  }),
  errors: ['not_found'],
});

/** The figures for the job list, as the browser's solver found them at `atSeq`. */
export const reportVerdict = route({
  name: 'reportVerdict',
  method: 'PUT',
  path: '/api/firms/:firm/jobs/:job/verdict',
  access: MEMBER,
  kind: 'json',
  idempotent: true,
  params: jobParams,
  query: none,
  body: jobSummary.shape.verdict.unwrap(),
  response: ok,
  errors: ['invalid', 'not_found'],
});

export const duplicateJob = route({
  name: 'duplicateJob',
  method: 'POST',
  path: '/api/firms/:firm/jobs/:job/duplicate',
  access: MEMBER,
  kind: 'json',
  idempotent: true,
  params: jobParams,
  query: none,
  body: z.strictObject({ id: z.uuid(), name: freeText(400).min(1, 'Enter a name.') }),
  response: z.strictObject({ id: z.uuid(), headSeq: z.int() }),
  errors: ['invalid', 'conflict', 'not_found'],
});

export const archiveJob = route({
  name: 'archiveJob',
  method: 'PUT',
  path: '/api/firms/:firm/jobs/:job/archived',
  access: MEMBER,
  kind: 'json',
  idempotent: true,
  params: jobParams,
  query: none,
  body: z.strictObject({ archived: z.boolean() }),
  response: ok,
  errors: ['invalid', 'not_found'],
});

/** Only a job without revisions; one with revisions is archived (`conflict`). */
export const deleteJob = route({
  name: 'deleteJob',
  method: 'DELETE',
  path: '/api/firms/:firm/jobs/:job',
  access: MEMBER,
  kind: 'json',
  idempotent: true,
  params: jobParams,
  query: none,
  body: empty,
  response: ok,
  errors: ['conflict', 'not_found'],
});

/** The job file of the rows as they stand, and what it leaves out in the header `x-left-out`. */
export const downloadJobFile = route({
  name: 'downloadJobFile',
  method: 'GET',
  path: '/api/firms/:firm/jobs/:job/file',
  access: MEMBER,
  kind: 'file',
  idempotent: true,
  params: jobParams,
  query: none,
  body: empty,
  response: z.unknown(),
  errors: ['not_found'],
});
