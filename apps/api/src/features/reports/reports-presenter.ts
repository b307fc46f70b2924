import type { DecisionView, DeliveryView, RevisionSummary } from '@farlug/contract/routes';
import type { DecisionRow, DeliveryRow, RevisionWithFate } from '@farlug/db';
import { linkState } from './link-state.ts';

export function revisionSummaryOf(revision: RevisionWithFate, now: Date): RevisionSummary {
  return {
    ...revision,
    issuedAt: revision.issuedAt.toISOString(),
    deliveries: revision.deliveries.map((delivery) => deliveryViewOf(delivery, now)),
    decisions: revision.decisions.map(decisionViewOf),
  };
}

export function deliveryViewOf(delivery: DeliveryRow, now: Date): DeliveryView {
  return {
    id: delivery.id,
    recipientName: delivery.recipientName,
    recipientEmail: delivery.recipientEmail,
    state: delivery.state,
    attempts: delivery.attempts,
    lastError: delivery.lastError,
    queuedAt: delivery.queuedAt.toISOString(),
    sentAt: delivery.sentAt?.toISOString() ?? null,
    openedAt: delivery.openedAt?.toISOString() ?? null,
    link: linkState(delivery, now),
    linkExpiresAt: delivery.linkExpiresAt.toISOString(),
  };
}

export function decisionViewOf(decision: DecisionRow): DecisionView {
  return {
    id: decision.id,
    decision: decision.decision,
    words: decision.words,
    comments: decision.comments,
    name: decision.name,
    title: decision.title,
    at: decision.at.toISOString(),
    via: decision.via,
    enteredBy: decision.enteredBy,
    recipient: decision.recipient,
  };
}
