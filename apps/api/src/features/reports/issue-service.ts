import { jobFromRows } from '@farlug/contract/job';
import type { RevisionSummary } from '@farlug/contract/routes';
import { type JobRows, rowsFromLists } from '@farlug/contract/rows';
import {
  enqueue,
  type FirmTransaction,
  firmSettings,
  insertRevision,
  listRevisions,
  lockJob,
  nextRevisionNo,
  openJob,
  recordAudit,
  revisionById,
} from '@farlug/db';
import type { Scenario } from '@farlug/solver/job';
import { solveJob } from '@farlug/solver/judge';
import { SOLVER_VERSION } from '@farlug/solver/version';
import type { Deps } from '../../deps.ts';
import type { Member } from '../../platform/caller.ts';
import { canonicalHash } from '../../platform/canonical-hash.ts';
import { Refusal, refusalAsValue, refuse } from '../../platform/refusal.ts';
import { reportDigest } from './report-digest.ts';
import { revisionSummaryOf } from './reports-presenter.ts';
import { revisionInputOf } from './revision-input.ts';

export interface IssueRequest {
  revision: string;
  seq: number;
  scenario: Scenario;
  paper: 'letter' | 'a4';
  equationsPanel: string | null;
  note: string;
}

/**
 * Issues the job as the person saw it, in one transaction under the job's lock: what is pinned is what is hashed,
 * stored and, later, printed. The same revision id issues once.
 */
export function issueRevision(
  deps: Deps,
  { firmId, person }: Member,
  jobId: string,
  wanted: IssueRequest,
): Promise<RevisionSummary | Refusal> {
  return refusalAsValue(() =>
    deps.db.withFirm(firmId, person.id, async (tx) => {
      if ((await lockJob(tx, jobId)) === null)
        throw refuse('not_found', 'There is no such job in this firm.');
      const known = await revisionById(tx, jobId, wanted.revision);
      if (known !== null) {
        if (known.seq !== wanted.seq)
          throw refuse('conflict', 'A report with this id was issued from another state of the job.');
        return summary(tx, jobId, wanted.revision, deps.now());
      }
      const job = await openJob(tx, jobId);
      if (job === null) throw refuse('not_found', 'There is no such job in this firm.');
      if (job.archivedAt !== null)
        throw refuse(
          'archived',
          'The job is archived. Take it out of the archive before you issue a report.',
        );
      if (job.headSeq !== wanted.seq)
        throw new Refusal(
          'job_moved_on',
          'The job was changed since you looked at it. Look at it again, then issue.',
          [{ path: 'seq', message: `The job is at change ${job.headSeq}.`, headSeq: job.headSeq }],
        );
      const rows = rowsFromLists(job.rows);
      const firm = await firmSettings(tx);
      if (firm === null) throw new Error('a firm without settings');
      const no = await nextRevisionNo(tx, jobId);
      const issuedAt = deps.now();
      const made = makeRevision(rows, wanted, {
        firm,
        seq: job.headSeq,
        no,
        issuedBy: person.name,
        issuedAt,
      });
      await insertRevision(tx, jobId, {
        id: wanted.revision,
        no,
        seq: job.headSeq,
        scenario: wanted.scenario,
        paper: wanted.paper,
        ...made,
        solverVersion: SOLVER_VERSION,
        issuedBy: person.id,
        issuedAt,
      });
      await enqueue(tx, 'render-report', { firmId, jobId, revisionId: wanted.revision });
      await recordAudit(tx, 'report.issued', `${firm.name}: ${made.input.titleBlock.job}, revision ${no}`);
      return summary(tx, jobId, wanted.revision, deps.now());
    }),
  );
}

async function summary(
  tx: FirmTransaction,
  jobId: string,
  revisionId: string,
  now: Date,
): Promise<RevisionSummary> {
  const all = await listRevisions(tx, jobId);
  return revisionSummaryOf(all.find(({ id }) => id === revisionId)!, now);
}

type Standing = Pick<Parameters<typeof revisionInputOf>[0], 'firm' | 'seq' | 'no' | 'issuedBy' | 'issuedAt'>;

/** Builds, solves and hashes. Refused: rows that are left out, a job that cannot be solved, a panel that is not there. */
function makeRevision(rows: JobRows, wanted: IssueRequest, standing: Standing) {
  const built = jobFromRows(rows);
  if (built.leftOutCount > 0)
    throw new Refusal(
      'incomplete',
      `${built.leftOutCount === 1 ? 'One row is' : `${built.leftOutCount} rows are`} left out of the results. A report needs every row finished or deleted.`,
      built.leftOut.slice(0, 100).map(({ code, field, reason }) => ({
        path: `${code ?? 'row'}${field ? `.${field}` : ''}`,
        message: reason,
      })),
    );
  if (built.problems.length > 0) {
    const [problem] = built.problems;
    throw new Refusal(
      'unsolvable',
      `${problem!.path}: ${problem!.message}.`,
      built.problems.map(({ path, message }) => ({ path, message })),
    );
  }
  if (built.job.sources.length === 0)
    throw new Refusal('incomplete', 'The job has no service yet. Add one in the job settings.', [
      { path: 'sources', message: 'must have at least one source' },
    ]);
  const outcome = solveJob(built.job, { scenario: wanted.scenario });
  if (outcome.kind !== 'solved')
    throw new Refusal('unsolvable', `${capital(outcome.at)}: ${outcome.reason}.`, [
      { path: outcome.at, message: outcome.reason },
    ]);
  const input = revisionInputOf({
    rows,
    built,
    ...standing,
    scenario: wanted.scenario,
    paper: wanted.paper,
    note: wanted.note,
    equationsPanel: equationsBus(rows, wanted.equationsPanel),
  });
  const digest = reportDigest(rows, built, outcome.solution);
  const worst = Math.max(...outcome.solution.loads.flatMap(({ totalPercent }) => totalPercent ?? []));
  return {
    input,
    result: { solution: outcome.solution, digest },
    sha256: canonicalHash(input),
    worstPercent: Number.isFinite(worst) ? worst : null,
    over: digest.counts.over + digest.counts.rise,
    near: digest.counts.near,
    within: digest.counts.within,
  };
}

function equationsBus(rows: JobRows, panelId: string | null): string | null {
  if (panelId === null) return null;
  const panel = rows.panel.get(panelId);
  if (!panel)
    throw new Refusal('invalid', 'The panel whose equations are wanted is not in the job.', [
      { path: 'equationsPanel', message: 'must be a panel of the job' },
    ]);
  return rows.bus.get(panel.busId)?.code ?? null;
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
