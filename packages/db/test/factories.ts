import { randomUUID } from 'node:crypto';
import { listsFromRows } from '@farlug/contract/rows';
import { emptyRows } from '@farlug/contract/testing';
import type { Database } from '../src/database.ts';
import { createDelivery } from '../src/queries/deliveries.ts';
import { lockJob } from '../src/queries/edits.ts';
import { addMember, createFirm } from '../src/queries/firms.ts';
import { createJob } from '../src/queries/jobs.ts';
import { addLink } from '../src/queries/links.ts';
import { createPerson } from '../src/queries/people.ts';
import { insertRevision, nextRevisionNo } from '../src/queries/revisions.ts';

export interface TestFirm {
  firmId: string;
  personId: string;
}

/** A firm with one administrator. */
export async function makeFirm(db: Database, name = 'Alder & Finch Electric'): Promise<TestFirm> {
  const firmId = randomUUID();
  const personId = await makePerson(db);
  await db.withFirm(firmId, personId, async (tx) => {
    await createFirm(tx, { name });
    await addMember(tx, personId, 'admin');
  });
  return { firmId, personId };
}

export async function makePerson(db: Database, name = 'Ida Marlow'): Promise<string> {
  const id = randomUUID();
  await db.global((tx) =>
    createPerson(tx, { id, name, email: `${id}@alder.example`, passwordHash: 'not a hash' }),
  );
  return id;
}

/** An empty job of the firm. */
export async function makeJob(db: Database, { firmId, personId }: TestFirm): Promise<string> {
  const id = randomUUID();
  await db.withFirm(firmId, personId, (tx) => createJob(tx, listsFromRows(emptyRows(id))));
  return id;
}

/** A revision of the job, its printed form not made yet. */
export async function makeRevision(
  db: Database,
  { firmId, personId }: TestFirm,
  jobId: string,
  input: unknown = { format: 'farlug-revision/1' },
): Promise<string> {
  const id = randomUUID();
  await db.withFirm(firmId, personId, async (tx) => {
    await lockJob(tx, jobId);
    await insertRevision(tx, jobId, {
      id,
      no: await nextRevisionNo(tx, jobId),
      seq: 0,
      scenario: 'each-circuit',
      paper: 'letter',
      input,
      result: { format: 'farlug-solution/1' },
      solverVersion: '0.1.0',
      sha256: 'a'.repeat(64),
      worstPercent: 2.5,
      over: 0,
      near: 1,
      within: 8,
      issuedBy: personId,
      issuedAt: new Date('2026-11-03T09:20:00Z'),
    });
  });
  return id;
}

/** A queued delivery of the revision, with its link. */
export async function makeDelivery(
  db: Database,
  { firmId, personId }: TestFirm,
  jobId: string,
  revisionId: string,
): Promise<string> {
  const id = randomUUID();
  await db.withFirm(firmId, personId, async (tx) => {
    await createDelivery(tx, jobId, {
      id,
      revisionId,
      recipientName: 'R. Osei',
      recipientEmail: 'osei@inspect.example',
      message: '',
      messageId: `<${id}@farlug.example>`,
      queuedBy: personId,
      linkExpiresAt: new Date('2027-01-01T00:00:00Z'),
    });
    await addLink(tx, `hash-${id}-1`, { jobId, deliveryId: id, epoch: 1 });
  });
  return id;
}
