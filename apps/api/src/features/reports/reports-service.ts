import type { DeliveryView, RevisionSummary } from '@farlug/contract/routes';
import {
  addLink,
  createDelivery,
  type DecisionRow,
  type DeliveryRow,
  deliveryById,
  enqueue,
  type FirmTransaction,
  listDecisions,
  listRevisions,
  lockJob,
  openJob,
  readPdf,
  recordAudit,
  recordDecision,
  renewLink as renewDeliveryLink,
  resend,
  revisionById,
  revisionContent,
  revokeLink as revokeDeliveryLink,
} from '@farlug/db';
import type { Deps } from '../../deps.ts';
import type { FileAnswer } from '../../http/call.ts';
import { messageIdFor } from '../../mail/message-id.ts';
import { tokenHash } from '../../platform/account-token.ts';
import type { Member } from '../../platform/caller.ts';
import { canonicalJson } from '../../platform/canonical-hash.ts';
import { DONE, type Done } from '../../platform/done.ts';
import { linkToken } from '../../platform/link-token.ts';
import { type Refusal, refusalAsValue, refuse } from '../../platform/refusal.ts';
import { reportFileName } from './report-file-name.ts';
import { deliveryViewOf, revisionSummaryOf } from './reports-presenter.ts';

const DAY_MS = 86_400_000;
const noRevision = () => refuse('not_found', 'There is no such report in this job.');
const noDelivery = () => refuse('not_found', 'There is no such delivery in this job.');

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

/** Where the mailed link will lead, by the hash of its secret. */
const keepLink = (deps: Deps, tx: FirmTransaction, jobId: string, { id, epoch }: DeliveryRow) =>
  addLink(tx, tokenHash(linkToken(deps.config.linkSecret, id, epoch)), { jobId, deliveryId: id, epoch });

export interface NewSending {
  delivery: string;
  recipientName: string;
  recipientEmail: string;
  message: string;
  linkDays: number;
}

export function sendRevision(
  deps: Deps,
  member: Member,
  jobId: string,
  revisionId: string,
  sending: NewSending,
): Promise<DeliveryView | Refusal> {
  return asMember(deps, member, async (tx) => {
    if ((await lockJob(tx, jobId)) === null) throw noRevision();
    const revision = await revisionById(tx, jobId, revisionId);
    if (revision === null) throw noRevision();
    const { delivery: id, linkDays, ...to } = sending;
    const made = await createDelivery(tx, jobId, {
      id,
      revisionId,
      ...to,
      messageId: messageIdFor(deps.config.mailFrom),
      queuedBy: member.person.id,
      linkExpiresAt: new Date(deps.now().getTime() + linkDays * DAY_MS),
    });
    const delivery = await deliveryById(tx, jobId, id);
    if (!made) {
      const same =
        delivery?.revisionId === revisionId &&
        delivery.recipientEmail === to.recipientEmail &&
        delivery.message === to.message;
      if (!same)
        throw refuse('conflict', 'There is a delivery with this id already. Send it under a new id.');
    } else {
      await keepLink(deps, tx, jobId, delivery!);
      await enqueue(tx, 'send-report', { firmId: member.firmId, jobId, deliveryId: id });
      await recordAudit(tx, 'report.sent', `revision ${revision.no} to ${to.recipientEmail}`);
    }
    return deliveryViewOf(delivery!, deps.now());
  });
}

/** Once more, under the same Message-ID: a server that had it already can tell. */
export function resendDelivery(
  deps: Deps,
  member: Member,
  jobId: string,
  deliveryId: string,
): Promise<DeliveryView | Refusal> {
  return asMember(deps, member, async (tx) => {
    const before = await deliveryById(tx, jobId, deliveryId);
    if (before === null) throw noDelivery();
    const queued = await resend(tx, jobId, deliveryId);
    if (queued === null)
      throw refuse(
        'conflict',
        `Only a failed or uncertain delivery is sent again; this one is ${before.state}.`,
      );
    await enqueue(tx, 'send-report', { firmId: member.firmId, jobId, deliveryId });
    await recordAudit(tx, 'report.resent', queued.recipientEmail);
    return deliveryViewOf(queued, deps.now());
  });
}

export function renewLink(
  deps: Deps,
  member: Member,
  jobId: string,
  deliveryId: string,
  linkDays: number,
): Promise<DeliveryView | Refusal> {
  return asMember(deps, member, async (tx) => {
    if ((await deliveryById(tx, jobId, deliveryId)) === null) throw noDelivery();
    const renewed = await renewDeliveryLink(tx, jobId, deliveryId, {
      linkExpiresAt: new Date(deps.now().getTime() + linkDays * DAY_MS),
      messageId: messageIdFor(deps.config.mailFrom),
    });
    if (renewed === null)
      throw refuse('conflict', 'The message is on its way this moment. Renew its link when it has arrived.');
    await keepLink(deps, tx, jobId, renewed);
    await enqueue(tx, 'send-report', { firmId: member.firmId, jobId, deliveryId });
    await recordAudit(tx, 'link.renewed', renewed.recipientEmail);
    return deliveryViewOf(renewed, deps.now());
  });
}

export function revokeLink(
  deps: Deps,
  member: Member,
  jobId: string,
  deliveryId: string,
): Promise<DeliveryView | Refusal> {
  return asMember(deps, member, async (tx) => {
    const revoked = await revokeDeliveryLink(tx, jobId, deliveryId);
    if (revoked === null) throw noDelivery();
    await recordAudit(tx, 'link.revoked', revoked.recipientEmail);
    return deliveryViewOf(revoked, deps.now());
  });
}

export interface GivenDecision {
  id: string;
  decision: DecisionRow['decision'];
  words: string;
  comments: string;
  name: string;
  title: string;
}

/** A decision that came on paper, as the person who holds it enters it. */
export function enterPaperDecision(
  deps: Deps,
  member: Member,
  jobId: string,
  revisionId: string,
  given: GivenDecision,
): Promise<Done | Refusal> {
  return asMember(deps, member, async (tx) => {
    const revision = await revisionById(tx, jobId, revisionId);
    if (revision === null) throw noRevision();
    await putDecision(tx, jobId, {
      ...given,
      revisionId,
      deliveryId: null,
      via: 'paper',
      enteredBy: member.person.id,
    });
    await recordAudit(tx, 'decision.entered', `revision ${revision.no}: ${given.decision}`);
    return DONE;
  });
}

/** Written once: the same decision again changes nothing, another one under its id is a conflict. */
export async function putDecision(
  tx: FirmTransaction,
  jobId: string,
  values: Parameters<typeof recordDecision>[2],
): Promise<void> {
  if (values.decision === 'other' && values.words.trim() === '')
    throw refuse('invalid', 'Write the decision in the authority’s own words.', [
      { path: 'words', message: 'must say what was decided' },
    ]);
  if (await recordDecision(tx, jobId, values)) return;
  const known = (await listDecisions(tx, jobId, values.revisionId)).find(({ id }) => id === values.id);
  const same =
    known?.decision === values.decision && known.comments === values.comments && known.name === values.name;
  if (!same)
    throw refuse('conflict', 'A decision with this id is on record already, and none is ever changed.');
}
