import { randomUUID } from 'node:crypto';
import { rowsFromJob } from '@farlug/contract/job';
import {
  createJob,
  issueRevision,
  openInspection,
  type recordDecision,
  sendRevision,
} from '@farlug/contract/routes';
import type { JobRowLists } from '@farlug/contract/rows';
import type { Attempt } from '@farlug/db';
import type { z } from 'zod';
import { linkToken } from '../src/platform/link-token.ts';
import { renderRevision } from '../src/worker/render-report.ts';
import type { WorkerDeps } from '../src/worker/worker-deps.ts';
import type { TestApi } from './start-test-api.ts';
import type { TestClient } from './test-client.ts';
import type { TestFirm } from './test-firm.ts';
import { demoFile } from './test-job.ts';

export const FIRST: Attempt = { number: 1, last: false };
export const LAST: Attempt = { number: 6, last: true };

/** What the worker works with, as its own database role; prints a small page that names the revision. */
export function workerDeps(api: TestApi, more: Partial<WorkerDeps> & { smtpUrl?: string } = {}): WorkerDeps {
  const { smtpUrl, ...rest } = more;
  return {
    config: { ...api.deps.config, ...(smtpUrl ? { smtpUrl } : {}) },
    db: api.database.worker,
    log: api.deps.log,
    render: async (_input, { revisionLetter }) => ({
      bytes: pdfSaying(`Revision ${revisionLetter}`),
      pages: 1,
    }),
    ...rest,
  };
}

/** A PDF of one page with one line (ISO 32000-1, 7.5). */
export function pdfSaying(text: string): Buffer {
  const stream = `BT /F1 12 Tf 20 20 Td (${text}) Tj ET`;
  const objects = [
    '<</Type/Catalog/Pages 2 0 R>>',
    '<</Type/Pages/Kids[3 0 R]/Count 1>>',
    '<</Type/Page/Parent 2 0 R/MediaBox[0 0 200 50]/Contents 4 0 R/Resources<</Font<</F1 5 0 R>>>>>>',
    `<</Length ${stream.length}>>stream\n${stream}\nendstream`,
    '<</Type/Font/Subtype/Type1/BaseFont/Helvetica>>',
  ];
  let body = '%PDF-1.4\n';
  const offsets = objects.map((object, index) => {
    const offset = body.length;
    body += `${index + 1} 0 obj${object}endobj\n`;
    return `${String(offset).padStart(10, '0')} 00000 n \n`;
  });
  const start = body.length;
  body += `xref\n0 6\n0000000000 65535 f \n${offsets.join('')}trailer<</Size 6/Root 1 0 R>>\nstartxref\n${start}\n%%EOF\n`;
  return Buffer.from(body, 'latin1');
}

export interface JobPlace {
  firm: string;
  job: string;
}

/** A demo job of the firm, changed before it is stored. */
export async function demoJob(
  { firm, admin }: TestFirm,
  change: (rows: JobRowLists) => JobRowLists = (rows) => rows,
  name: Parameters<typeof demoFile>[0] = 'ridge-cabin',
): Promise<JobPlace> {
  const rows = change(rowsFromJob(demoFile(name)));
  const { status, error } = await admin.call(createJob, { params: { firm }, body: { rows } });
  if (status !== 200) throw new Error(`the job was not made: ${error.message}`);
  return { firm, job: rows.job[0]!.id };
}

/** A circuit whose length nobody has measured yet. */
export const withoutLength = (rows: JobRowLists): JobRowLists => ({
  ...rows,
  run: rows.run.map((run) => (run.code === 'DC-1-3' ? { ...run, length: null } : run)),
});

/** More power than 38 ft of 14 AWG can carry at 48 V, whatever the current. */
export const tooHeavy = (rows: JobRowLists): JobRowLists => ({
  ...rows,
  load: rows.load.map((load) =>
    load.code === 'DC-1-3' ? { ...load, size: '5 kW', behaviour: 'power' as const } : load,
  ),
});

type IssueBody = z.input<typeof issueRevision.body>;

export function issueBody(more: Partial<IssueBody> = {}): IssueBody {
  return {
    revision: randomUUID(),
    seq: 0,
    scenario: 'each-circuit',
    paper: 'letter',
    equationsPanel: null,
    note: '',
    ...more,
  };
}

export interface IssuedPlace extends JobPlace {
  revision: string;
}

/** A report of the job. */
export async function issued({ admin }: TestFirm, place: JobPlace): Promise<IssuedPlace> {
  const body = issueBody();
  const { status, error } = await admin.call(issueRevision, { params: place, body });
  if (status !== 200) throw new Error(`no report was issued: ${error.message}`);
  return { ...place, revision: body.revision };
}

/** The report and its printed form, as the worker makes it. */
export async function printed(api: TestApi, firm: TestFirm, place?: JobPlace): Promise<IssuedPlace> {
  const at = await issued(firm, place ?? (await demoJob(firm)));
  await renderRevision(workerDeps(api), queuePayload(at), FIRST);
  return at;
}

export const queuePayload = ({
  firm,
  job,
  ...more
}: JobPlace & { revision?: string; delivery?: string }) => ({
  firmId: firm,
  jobId: job,
  revisionId: more.revision ?? '',
  deliveryId: more.delivery ?? '',
});

type SendBody = z.input<typeof sendRevision.body>;

export function sendBody(more: Partial<SendBody> = {}): SendBody {
  return {
    delivery: randomUUID(),
    recipientName: 'R. Osei',
    recipientEmail: 'osei@inspect.example',
    message: 'As agreed on the telephone.',
    linkDays: 30,
    ...more,
  };
}

export interface DeliveryPlace extends IssuedPlace {
  delivery: string;
}

/** A delivery that waits to be sent. */
export async function queuedDelivery(api: TestApi, firm: TestFirm, at?: IssuedPlace): Promise<DeliveryPlace> {
  const params = at ?? (await printed(api, firm));
  const body = sendBody();
  const { status, error } = await firm.admin.call(sendRevision, { params, body });
  if (status !== 200) throw new Error(`nothing was sent: ${error.message}`);
  return { ...params, delivery: body.delivery };
}

export const tokenOf = (api: TestApi, { firm, job, delivery }: DeliveryPlace, epoch = 1): string =>
  linkToken(api.deps.config.linkSecret, { firmId: firm, jobId: job, deliveryId: delivery, epoch });

/** The browser of somebody who opened the delivery's link. */
export async function inspectorOf(api: TestApi, at: DeliveryPlace): Promise<TestClient> {
  const client = api.client();
  const { status } = await client.call(openInspection, { body: { token: tokenOf(api, at) } });
  if (status !== 200) throw new Error(`opening the link answered ${status}`);
  return client;
}

type DecisionBody = z.input<typeof recordDecision.body>;

export function decisionBody(more: Partial<DecisionBody> = {}): DecisionBody {
  return {
    id: randomUUID(),
    decision: 'corrections-needed',
    words: '',
    comments: 'DC-1-7: show the length.',
    name: 'R. Osei',
    title: 'Electrical inspector',
    ...more,
  };
}
