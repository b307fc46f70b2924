import { and, asc, desc, eq, gt, max, sql } from 'drizzle-orm';
import type { FirmTransaction } from '../database.ts';
import { person, revision, revisionPdf } from '../schema/index.ts';
import { type DecisionRow, listDecisions } from './decisions.ts';
import { type DeliveryRow, listDeliveries } from './deliveries.ts';

type Stored = typeof revision.$inferSelect;
export type NewRevision = Omit<Stored, 'firmId' | 'jobId' | 'issuedBy'> & { issuedBy: string };
export type PdfState = (typeof revisionPdf.$inferSelect)['state'];

/** Without input and result, which are large. */
export type RevisionRow = Omit<Stored, 'firmId' | 'jobId' | 'input' | 'result' | 'issuedBy'> & {
  issuedBy: string;
  pdf: PdfState;
};
export interface RevisionWithFate extends RevisionRow {
  deliveries: DeliveryRow[];
  decisions: DecisionRow[];
}

const ofJob = (tx: FirmTransaction, jobId: string) =>
  and(eq(revision.firmId, tx.firmId), eq(revision.jobId, jobId));
const thisOne = (tx: FirmTransaction, jobId: string, id: string) =>
  and(ofJob(tx, jobId), eq(revision.id, id));
const thisPdf = (tx: FirmTransaction, jobId: string, id: string) =>
  and(eq(revisionPdf.firmId, tx.firmId), eq(revisionPdf.jobId, jobId), eq(revisionPdf.revisionId, id));

const SUMMARY = {
  id: revision.id,
  no: revision.no,
  seq: revision.seq,
  scenario: revision.scenario,
  paper: revision.paper,
  solverVersion: revision.solverVersion,
  sha256: revision.sha256,
  worstPercent: revision.worstPercent,
  over: revision.over,
  near: revision.near,
  within: revision.within,
  issuedAt: revision.issuedAt,
  issuedBy: person.name,
  pdf: revisionPdf.state,
};

function summaries(tx: FirmTransaction) {
  return tx.sql
    .select(SUMMARY)
    .from(revision)
    .innerJoin(person, eq(person.id, revision.issuedBy))
    .innerJoin(
      revisionPdf,
      and(
        eq(revisionPdf.firmId, revision.firmId),
        eq(revisionPdf.jobId, revision.jobId),
        eq(revisionPdf.revisionId, revision.id),
      ),
    )
    .$dynamic();
}

/** The number of the next revision; call it under `lockJob`. */
export async function nextRevisionNo(tx: FirmTransaction, jobId: string): Promise<number> {
  const [last] = await tx.sql
    .select({ no: max(revision.no) })
    .from(revision)
    .where(ofJob(tx, jobId));
  return (last?.no ?? 0) + 1;
}

/** Stores what was issued, its printed form still to be made; call it under `lockJob`. */
export async function insertRevision(tx: FirmTransaction, jobId: string, values: NewRevision): Promise<void> {
  await tx.sql.insert(revision).values({ firmId: tx.firmId, jobId, ...values });
  await tx.sql
    .insert(revisionPdf)
    .values({ firmId: tx.firmId, jobId, revisionId: values.id, state: 'waiting' });
}

export async function revisionById(
  tx: FirmTransaction,
  jobId: string,
  id: string,
): Promise<RevisionRow | null> {
  const [found] = await summaries(tx).where(thisOne(tx, jobId, id));
  return found ?? null;
}

/** What was pinned and what came out of it. */
export async function revisionContent(
  tx: FirmTransaction,
  jobId: string,
  id: string,
): Promise<{ input: unknown; result: unknown; sha256: string; no: number; solverVersion: string } | null> {
  const [found] = await tx.sql
    .select({
      input: revision.input,
      result: revision.result,
      sha256: revision.sha256,
      no: revision.no,
      solverVersion: revision.solverVersion,
    })
    .from(revision)
    .where(thisOne(tx, jobId, id));
  return found ?? null;
}

/** Newest first, each with whom it went to and what was decided about it. */
export async function listRevisions(tx: FirmTransaction, jobId: string): Promise<RevisionWithFate[]> {
  const rows = await summaries(tx).where(ofJob(tx, jobId)).orderBy(desc(revision.no));
  const deliveries = await listDeliveries(tx, jobId);
  const decisions = await listDecisions(tx, jobId);
  return rows.map((row) => ({
    ...row,
    deliveries: deliveries.filter(({ revisionId }) => revisionId === row.id),
    decisions: decisions.filter(({ revisionId }) => revisionId === row.id),
  }));
}

/** Whether a later revision of the same job exists. */
export async function isSuperseded(tx: FirmTransaction, jobId: string, no: number): Promise<boolean> {
  const [later] = await tx.sql
    .select({ no: revision.no })
    .from(revision)
    .where(and(ofJob(tx, jobId), gt(revision.no, no)))
    .orderBy(asc(revision.no))
    .limit(1);
  return later !== undefined;
}

export async function readPdf(
  tx: FirmTransaction,
  jobId: string,
  id: string,
): Promise<{ state: PdfState; pdf: Buffer | null; lastError: string | null } | null> {
  const [found] = await tx.sql
    .select({ state: revisionPdf.state, pdf: revisionPdf.pdf, lastError: revisionPdf.lastError })
    .from(revisionPdf)
    .where(thisPdf(tx, jobId, id));
  return found ?? null;
}

/** A printed form, once made, stays as it is. */
export async function savePdf(tx: FirmTransaction, jobId: string, id: string, pdf: Buffer): Promise<void> {
  await tx.sql
    .update(revisionPdf)
    .set({ state: 'ready', pdf, lastError: null, changedAt: sql`now()` })
    .where(and(thisPdf(tx, jobId, id), sql`${revisionPdf.state} <> 'ready'`));
}

export async function failPdf(
  tx: FirmTransaction,
  jobId: string,
  id: string,
  lastError: string,
): Promise<void> {
  await tx.sql
    .update(revisionPdf)
    .set({ state: 'failed', lastError, changedAt: sql`now()` })
    .where(and(thisPdf(tx, jobId, id), sql`${revisionPdf.state} <> 'ready'`));
}
