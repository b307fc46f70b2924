import { reportDigest, revisionInput } from '@farlug/contract/routes';
import {
  type Attempt,
  backToQueue,
  beginSending,
  deliveryById,
  markFailed,
  markSent,
  markUncertain,
  type QueuePayloads,
  readPdf,
  revisionContent,
} from '@farlug/db';
import { linkState } from '../features/reports/link-state.ts';
import { reportFileName, revisionLetter } from '../features/reports/report-file-name.ts';
import { reportLetter } from '../mail/report-letter.ts';
import { sendBySmtp } from '../mail/smtp-send.ts';
import { linkToken } from '../platform/link-token.ts';
import type { WorkerDeps } from './worker-deps.ts';

/**
 * Sends one delivery. `sending` is committed before a byte goes out; what is lost from then on is uncertain and never
 * tried again by itself. Throws where another attempt is worth it.
 */
export async function sendReport(
  { db, config, log }: WorkerDeps,
  { firmId, jobId, deliveryId }: QueuePayloads['send-report'],
  attempt: Attempt,
): Promise<void> {
  const inFirm = <T>(run: Parameters<typeof db.withFirm<T>>[2]) => db.withFirm(firmId, null, run);
  const ready = await inFirm(async (tx) => {
    const delivery = await deliveryById(tx, jobId, deliveryId);
    if (delivery?.state !== 'queued') return null;
    const content = await revisionContent(tx, jobId, delivery.revisionId);
    const pdf = await readPdf(tx, jobId, delivery.revisionId);
    if (!content || !pdf) return null;
    if (pdf.pdf === null) {
      if (pdf.state === 'waiting' && !attempt.last) return 'printing' as const;
      await markFailed(
        tx,
        jobId,
        deliveryId,
        `The report could not be printed: ${pdf.lastError ?? 'it took too long'}`,
      );
      return null;
    }
    if (linkState(delivery, new Date()) !== 'open') {
      await markFailed(
        tx,
        jobId,
        deliveryId,
        'Its link ended before the message went out. Renew it to send.',
      );
      return null;
    }
    return {
      no: content.no,
      sha256: content.sha256,
      solverVersion: content.solverVersion,
      input: revisionInput.parse(content.input),
      digest: reportDigest.parse((content.result as { digest: unknown }).digest),
      bytes: pdf.pdf,
    };
  });
  if (ready === null) return;
  if (ready === 'printing') throw new Error('the report is still being printed');

  const taken = await inFirm((tx) => beginSending(tx, jobId, deliveryId));
  if (taken === null) return;
  const { no, input, bytes, ...facts } = ready;
  const letter = reportLetter({
    from: config.mailFrom,
    to: { name: taken.recipientName, address: taken.recipientEmail },
    messageId: taken.messageId,
    message: taken.message,
    input,
    ...facts,
    revisionLetter: revisionLetter(no),
    link: `${config.publicUrl}/i#${linkToken(config.linkSecret, { firmId, jobId, deliveryId, epoch: taken.epoch })}`,
    linkExpiresAt: taken.linkExpiresAt,
    pdf: { name: reportFileName(input, no, 'pdf'), bytes },
  });
  const outcome = await sendBySmtp(config.smtpUrl, letter);
  log.info({ deliveryId, outcome: outcome.kind }, 'report mail');
  if (outcome.kind === 'sent') {
    await inFirm((tx) => markSent(tx, jobId, deliveryId));
  } else if (outcome.kind === 'lost') {
    await inFirm((tx) => markUncertain(tx, jobId, deliveryId, outcome.reason));
  } else if (outcome.retry && !attempt.last) {
    await inFirm((tx) => backToQueue(tx, jobId, deliveryId, outcome.reason));
    throw new Error(outcome.reason);
  } else {
    await inFirm((tx) => markFailed(tx, jobId, deliveryId, outcome.reason));
  }
}
