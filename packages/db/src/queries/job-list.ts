import { and, desc, eq, ilike, isNotNull, isNull, or, sql } from 'drizzle-orm';
import type { FirmTransaction } from '../database.ts';
import { circuit, decision, job, jobVerdict, person, revision } from '../schema/index.ts';
import type { Verdict } from './jobs.ts';

export interface ListedJob {
  id: string;
  name: string;
  address: string | null;
  changedAt: Date;
  changedBy: string | null;
  archivedAt: Date | null;
  headSeq: number;
  circuits: number;
  verdict: Verdict | null;
  /** The newest revision, and the newest decision on it. */
  revision: { no: number; issuedAt: Date; decision: string | null } | null;
}

/** The firm's jobs, last changed first; `search` is looked for in name and address. */
export async function listJobs(
  tx: FirmTransaction,
  { search = '', archived = false }: { search?: string; archived?: boolean } = {},
): Promise<ListedJob[]> {
  const pattern = `%${search.replaceAll('\0', '').replace(/[\\%_]/g, '\\$&')}%`;
  const newest = tx.sql
    .selectDistinctOn([revision.jobId], {
      jobId: revision.jobId,
      id: revision.id,
      no: revision.no,
      issuedAt: revision.issuedAt,
    })
    .from(revision)
    .where(eq(revision.firmId, tx.firmId))
    .orderBy(revision.jobId, desc(revision.no))
    .as('newest');
  const rows = await tx.sql
    .select({
      id: job.id,
      name: job.name,
      address: job.address,
      changedAt: job.changedAt,
      changedBy: person.name,
      archivedAt: job.archivedAt,
      headSeq: job.headSeq,
      circuits: sql<number>`(select count(*)::int from ${circuit}
        where ${circuit.firmId} = ${job.firmId} and ${circuit.jobId} = ${job.id})`,
      verdict: jobVerdict,
      no: newest.no,
      issuedAt: newest.issuedAt,
      decision: sql<string | null>`(select ${decision.decision} from ${decision}
        where ${decision.firmId} = ${job.firmId} and ${decision.jobId} = ${job.id} and ${decision.revisionId} = ${newest.id}
        order by ${decision.at} desc, ${decision.id} limit 1)`,
    })
    .from(job)
    .leftJoin(person, eq(person.id, job.changedBy))
    .leftJoin(jobVerdict, and(eq(jobVerdict.firmId, job.firmId), eq(jobVerdict.jobId, job.id)))
    .leftJoin(newest, eq(newest.jobId, job.id))
    .where(
      and(
        eq(job.firmId, tx.firmId),
        archived ? isNotNull(job.archivedAt) : isNull(job.archivedAt),
        search === '' ? undefined : or(ilike(job.name, pattern), ilike(job.address, pattern)),
      ),
    )
    .orderBy(desc(job.changedAt), job.id);
  return rows.map(({ no, issuedAt, decision: decided, verdict, ...rest }) => ({
    ...rest,
    verdict: verdict && withoutKeys(verdict),
    revision: no === null || issuedAt === null ? null : { no, issuedAt, decision: decided },
  }));
}

function withoutKeys({ firmId: _firm, jobId: _job, ...verdict }: typeof jobVerdict.$inferSelect): Verdict {
  return verdict;
}
