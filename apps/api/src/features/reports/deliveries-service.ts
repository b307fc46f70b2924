import type { DeliveryView } from '@farlug/contract/routes';
import {
  addLink,
  createDelivery,
  type DeliveryRow,
  deliveryById,
  enqueue,
  type FirmTransaction,
  lockJob,
  recordAudit,
  renewLink as renewDeliveryLink,
  resend,
  revisionById,
  revokeLink as revokeDeliveryLink,
} from '@farlug/db';
import type { Deps } from '../../deps.ts';
import { messageIdFor } from '../../mail/message-id.ts';
import { tokenHash } from '../../platform/account-token.ts';
import type { Member } from '../../platform/caller.ts';
import { linkToken } from '../../platform/link-token.ts';
import { type Refusal, refusalAsValue, refuse } from '../../platform/refusal.ts';
import { deliveryViewOf } from './reports-presenter.ts';

const DAY_MS = 86_400_000;
const noRevision = () => refuse('not_found', 'There is no such report in this job.');
const noDelivery = () => refuse('not_found', 'There is no such delivery in this job.');

const asMember = <T>(deps: Deps, { firmId, person }: Member, run: (tx: FirmTransaction) => Promise<T>) =>
  refusalAsValue(() => deps.db.withFirm(firmId, person.id, run));

/** Where the mailed link will lead, by the hash of its secret. */
function keepLink(deps: Deps, tx: FirmTransaction, jobId: string, { id, epoch }: DeliveryRow): Promise<void> {
  const place = { jobId, deliveryId: id, epoch };
  const token = linkToken(deps.config.linkSecret, { firmId: tx.firmId, ...place });
  return addLink(tx, tokenHash(token), place);
}

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
