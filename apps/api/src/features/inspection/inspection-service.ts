import { type InspectionView, reportDigest, revisionInput } from '@farlug/contract/routes';
import {
  type DeliveryRow,
  deliveryById,
  type FirmTransaction,
  isSuperseded,
  linkTarget,
  markOpened,
  readPdf,
  recordAudit,
  revisionById,
  revisionContent,
} from '@farlug/db';
import type { Deps } from '../../deps.ts';
import { tokenHash } from '../../platform/account-token.ts';
import type { InspectionGrant } from '../../platform/caller.ts';
import { DONE, type Done } from '../../platform/done.ts';
import type { FileAnswer } from '../../platform/file-answer.ts';
import { type Refusal, refusalAsValue, refuse } from '../../platform/refusal.ts';
import { decisionsOfDelivery, type GivenDecision, putDecision } from '../reports/decisions-service.ts';
import { linkState } from '../reports/link-state.ts';
import { pdfAnswer } from '../reports/reports-service.ts';

const gone = () =>
  refuse('link_gone', 'This link is not good any more. Ask whoever sent the report for a new one.');

/** What a link leads to, while it is the delivery's newest, not revoked and not expired. */
async function withLink<T>(
  deps: Deps,
  { firmId, jobId, deliveryId, epoch }: InspectionGrant & { jobId: string },
  run: (tx: FirmTransaction, jobId: string, delivery: DeliveryRow) => Promise<T>,
): Promise<T | Refusal> {
  return refusalAsValue(() =>
    deps.db.withFirm(firmId, null, async (tx) => {
      const delivery = await deliveryById(tx, jobId, deliveryId);
      if (!delivery || delivery.epoch !== epoch || linkState(delivery, deps.now()) !== 'open') throw gone();
      return run(tx, jobId, delivery);
    }),
  );
}

/** Exchanges the mailed secret for what the session remembers, and notes that the report was opened. */
export async function openLink(deps: Deps, token: string): Promise<InspectionGrant | Refusal> {
  const target = await deps.db.global((tx) => linkTarget(tx, tokenHash(token)));
  if (target === null) return gone();
  return withLink(deps, target, async (tx, jobId) => {
    await markOpened(tx, jobId, target.deliveryId);
    const { firmId, deliveryId, epoch } = target;
    return { firmId, jobId, deliveryId, epoch };
  });
}

export function inspectionOf(deps: Deps, grant: InspectionGrant): Promise<InspectionView | Refusal> {
  return withLink(deps, grant, async (tx, jobId, delivery) => {
    const revision = await revisionById(tx, jobId, delivery.revisionId);
    const content = await revisionContent(tx, jobId, delivery.revisionId);
    const pdf = await readPdf(tx, jobId, delivery.revisionId);
    if (!revision || !content || !pdf) throw gone();
    return {
      recipientName: delivery.recipientName,
      revisionNo: revision.no,
      sha256: revision.sha256,
      solverVersion: revision.solverVersion,
      issuedAt: revision.issuedAt.toISOString(),
      pdf: pdf.state,
      linkExpiresAt: delivery.linkExpiresAt.toISOString(),
      superseded: await isSuperseded(tx, jobId, revision.no),
      input: revisionInput.parse(content.input),
      digest: reportDigest.parse((content.result as { digest: unknown }).digest),
      decisions: await decisionsOfDelivery(tx, jobId, delivery),
    };
  });
}

export function inspectionPdf(deps: Deps, grant: InspectionGrant): Promise<FileAnswer | Refusal> {
  return withLink(deps, grant, async (tx, jobId, delivery) => {
    const content = await revisionContent(tx, jobId, delivery.revisionId);
    if (content === null) throw gone();
    return pdfAnswer(tx, jobId, delivery.revisionId, content);
  });
}

/** What the inspector decides, on the revision that was sent; name and title as typed. */
export function decide(deps: Deps, grant: InspectionGrant, given: GivenDecision): Promise<Done | Refusal> {
  return withLink(deps, grant, async (tx, jobId, delivery) => {
    const recorded = await putDecision(tx, jobId, {
      ...given,
      revisionId: delivery.revisionId,
      deliveryId: delivery.id,
      via: 'link',
      enteredBy: null,
    });
    if (recorded) await recordAudit(tx, 'decision.received', `${delivery.recipientEmail}: ${given.decision}`);
    return DONE;
  });
}
