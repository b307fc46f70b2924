import type { RevisionSummary } from '@farlug/contract/routes';
import { type FirmTransaction, listRevisions, openJob, readPdf, revisionContent } from '@farlug/db';
import type { Deps } from '../../deps.ts';
import type { Member } from '../../platform/caller.ts';
import { canonicalJson } from '../../platform/canonical-hash.ts';
import type { FileAnswer } from '../../platform/file-answer.ts';
import { type Refusal, refusalAsValue, refuse } from '../../platform/refusal.ts';
import { reportFileName } from './report-file-name.ts';
import { revisionSummaryOf } from './reports-presenter.ts';

const noRevision = () => refuse('not_found', 'There is no such report in this job.');

const asMember = <T>(deps: Deps, { firmId, person }: Member, run: (tx: FirmTransaction) => Promise<T>) =>
  refusalAsValue(() => deps.db.withFirm(firmId, person.id, run));

export function listReports(
  deps: Deps,
  member: Member,
  jobId: string,
): Promise<{ headSeq: number; revisions: RevisionSummary[] } | Refusal> {
  return asMember(deps, member, async (tx) => {
    const job = await openJob(tx, jobId);
    if (job === null) throw refuse('not_found', 'There is no such job in this firm.');
    const revisions = await listRevisions(tx, jobId);
    return { headSeq: job.headSeq, revisions: revisions.map((one) => revisionSummaryOf(one, deps.now())) };
  });
}

export function revisionPdf(
  deps: Deps,
  member: Member,
  jobId: string,
  revisionId: string,
): Promise<FileAnswer | Refusal> {
  return asMember(deps, member, async (tx) => {
    const content = await revisionContent(tx, jobId, revisionId);
    if (content === null) throw noRevision();
    return pdfAnswer(tx, jobId, revisionId, content);
  });
}

/** The printed form, or why there is none yet. */
export async function pdfAnswer(
  tx: FirmTransaction,
  jobId: string,
  revisionId: string,
  content: { input: unknown; no: number },
): Promise<FileAnswer> {
  const found = await readPdf(tx, jobId, revisionId);
  if (!found?.pdf)
    throw refuse(
      'unavailable',
      found?.state === 'failed'
        ? `The report could not be printed: ${found.lastError ?? 'the reason is not known'}.`
        : 'The report is being printed. Try again in a moment.',
    );
  return {
    type: 'application/pdf',
    name: reportFileName(content.input, content.no, 'pdf'),
    bytes: found.pdf,
    inline: true,
  };
}

/** Exactly the bytes whose hash is printed. */
export function revisionInputFile(
  deps: Deps,
  member: Member,
  jobId: string,
  revisionId: string,
): Promise<FileAnswer | Refusal> {
  return asMember(deps, member, async (tx) => {
    const content = await revisionContent(tx, jobId, revisionId);
    if (content === null) throw noRevision();
    return {
      type: 'application/json; charset=utf-8',
      name: reportFileName(content.input, content.no, 'input.json'),
      bytes: Buffer.from(canonicalJson(content.input)),
    };
  });
}
