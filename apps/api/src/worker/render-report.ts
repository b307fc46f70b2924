import { revisionInput } from '@farlug/contract/routes';
import { type Attempt, failPdf, type QueuePayloads, readPdf, revisionContent, savePdf } from '@farlug/db';
import { revisionLetter } from '../features/reports/report-file-name.ts';
import type { WorkerDeps } from './worker-deps.ts';

/** Prints a revision once. Throws where another attempt is worth it; after the last one the revision says why. */
export async function renderRevision(
  { db, log, render }: WorkerDeps,
  { firmId, jobId, revisionId }: QueuePayloads['render-report'],
  attempt: Attempt,
): Promise<void> {
  const content = await db.withFirm(firmId, null, async (tx) => {
    const pdf = await readPdf(tx, jobId, revisionId);
    return pdf === null || pdf.state === 'ready' ? null : revisionContent(tx, jobId, revisionId);
  });
  if (content === null) return;
  try {
    const input = revisionInput.parse(content.input);
    const { bytes, pages } = await render(input, {
      revisionNo: content.no,
      revisionLetter: revisionLetter(content.no),
      sha256: content.sha256,
      solverVersion: content.solverVersion,
      issuedAt: input.titleBlock.issuedAt,
      issuedBy: input.titleBlock.issuedBy,
    });
    await db.withFirm(firmId, null, (tx) => savePdf(tx, jobId, revisionId, bytes));
    log.info({ revisionId, pages, bytes: bytes.length }, 'report printed');
  } catch (error) {
    if (!attempt.last) throw error;
    log.error({ err: error, revisionId }, 'a report could not be printed');
    const reason = error instanceof Error ? error.message : String(error);
    await db.withFirm(firmId, null, (tx) => failPdf(tx, jobId, revisionId, reason));
  }
}
