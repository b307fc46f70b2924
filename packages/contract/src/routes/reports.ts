import { SCENARIOS } from '@farlug/solver/job';
import { z } from 'zod';
import { ISSUER, MEMBER, route } from '../route.ts';
import { email, empty, freeText, instant, jobParams, name, none, ok } from './common.ts';

export const PAPER_SIZES = ['letter', 'a4'] as const;
export const DECISIONS = ['no-exceptions', 'corrections-needed', 'other'] as const;
export type DecisionKind = (typeof DECISIONS)[number];
export const DELIVERY_STATES = ['queued', 'sending', 'sent', 'failed', 'uncertain'] as const;
export type DeliveryState = (typeof DELIVERY_STATES)[number];
export const PDF_STATES = ['waiting', 'ready', 'failed'] as const;

export const decisionBody = z.strictObject({
  decision: z.enum(DECISIONS),
  /** The authority's own words; needed where `decision` is `other`. */
  words: freeText(2000),
  comments: freeText(8000),
  /** As typed, shown as unverified. */
  name: name,
  title: freeText(200),
});
export const decisionView = decisionBody.extend({
  id: z.uuid(),
  at: instant,
  via: z.enum(['link', 'paper']),
  /** Who entered it, for one that came on paper. */
  enteredBy: z.string().nullable(),
  recipient: z.string().nullable(),
});
export type DecisionView = z.output<typeof decisionView>;

export const deliveryView = z.strictObject({
  id: z.uuid(),
  recipientName: z.string(),
  recipientEmail: z.string(),
  state: z.enum(DELIVERY_STATES),
  attempts: z.int(),
  lastError: z.string().nullable(),
  queuedAt: instant,
  sentAt: instant.nullable(),
  openedAt: instant.nullable(),
  link: z.enum(['open', 'expired', 'revoked']),
  linkExpiresAt: instant,
});
export type DeliveryView = z.output<typeof deliveryView>;

export const revisionSummary = z.strictObject({
  id: z.uuid(),
  no: z.int(),
  seq: z.int(),
  sha256: z.string(),
  solverVersion: z.string(),
  issuedAt: instant,
  issuedBy: z.string(),
  scenario: z.enum(SCENARIOS),
  paper: z.enum(PAPER_SIZES),
  pdf: z.enum(PDF_STATES),
  over: z.int(),
  near: z.int(),
  within: z.int(),
  worstPercent: z.number().nullable(),
  deliveries: z.array(deliveryView),
  decisions: z.array(decisionView),
});
export type RevisionSummary = z.output<typeof revisionSummary>;

const revisionParams = jobParams.extend({ revision: z.uuid() });
const deliveryParams = jobParams.extend({ delivery: z.uuid() });
const revisions = z.strictObject({ headSeq: z.int(), revisions: z.array(revisionSummary) });

export const listRevisions = route({
  name: 'listRevisions',
  method: 'GET',
  path: '/api/firms/:firm/jobs/:job/revisions',
  access: MEMBER,
  kind: 'json',
  idempotent: true,
  params: jobParams,
  query: none,
  body: empty,
  response: revisions,
  errors: ['not_found'],
});

/**
 * Issues the job as it stands at `seq`, the number that the person saw: `job_moved_on` when it is no longer the
 * head, `incomplete` while rows are left out, `unsolvable` with the bus or load and why. `revision` is made by the
 * client, so that a repeated call issues once.
 */
export const issueRevision = route({
  name: 'issueRevision',
  method: 'POST',
  path: '/api/firms/:firm/jobs/:job/revisions',
  access: ISSUER,
  kind: 'json',
  idempotent: true,
  params: jobParams,
  query: none,
  body: z.strictObject({
    revision: z.uuid(),
    seq: z.int().nonnegative(),
    scenario: z.enum(SCENARIOS),
    paper: z.enum(PAPER_SIZES),
    /** The panel whose node equations are written out; `null` takes the one with the worst load. */
    equationsPanel: z.uuid().nullable(),
    note: freeText(2000),
  }),
  response: revisionSummary,
  errors: [
    'invalid',
    'job_moved_on',
    'incomplete',
    'unsolvable',
    'archived',
    'forbidden',
    'not_found',
    'conflict',
  ],
});

export const downloadRevisionPdf = route({
  name: 'downloadRevisionPdf',
  method: 'GET',
  path: '/api/firms/:firm/jobs/:job/revisions/:revision/pdf',
  access: MEMBER,
  kind: 'file',
  idempotent: true,
  params: revisionParams,
  query: none,
  body: empty,
  response: z.unknown(),
  errors: ['not_found', 'unavailable'],
});

/** The pinned input whose canonical JSON has the printed hash. */
export const downloadRevisionInput = route({
  name: 'downloadRevisionInput',
  method: 'GET',
  path: '/api/firms/:firm/jobs/:job/revisions/:revision/input',
  access: MEMBER,
  kind: 'file',
  idempotent: true,
  params: revisionParams,
  query: none,
  body: empty,
  response: z.unknown(),
  errors: ['not_found'],
});

export const sendRevision = route({
  name: 'sendRevision',
  method: 'POST',
  path: '/api/firms/:firm/jobs/:job/revisions/:revision/deliveries',
  access: ISSUER,
  kind: 'json',
  idempotent: true,
  params: revisionParams,
  query: none,
  body: z.strictObject({
    delivery: z.uuid(),
    recipientName: name,
    recipientEmail: email,
    message: freeText(4000),
    linkDays: z.int().min(1).max(365),
  }),
  response: deliveryView,
  errors: ['invalid', 'forbidden', 'not_found', 'conflict', 'too_many'],
});

/** Sends an uncertain or failed delivery once more, with the same Message-ID. */
export const resendDelivery = route({
  name: 'resendDelivery',
  method: 'POST',
  path: '/api/firms/:firm/jobs/:job/deliveries/:delivery/resend',
  access: ISSUER,
  kind: 'json',
  idempotent: false,
  params: deliveryParams,
  query: none,
  body: empty,
  response: deliveryView,
  errors: ['forbidden', 'not_found', 'conflict'],
});

/** A new epoch: the old link stops, a new one is mailed. */
export const renewLink = route({
  name: 'renewLink',
  method: 'POST',
  path: '/api/firms/:firm/jobs/:job/deliveries/:delivery/renew',
  access: ISSUER,
  kind: 'json',
  idempotent: false,
  params: deliveryParams,
  query: none,
  body: z.strictObject({ linkDays: z.int().min(1).max(365) }),
  response: deliveryView,
  errors: ['invalid', 'forbidden', 'not_found', 'conflict'],
});

export const revokeLink = route({
  name: 'revokeLink',
  method: 'POST',
  path: '/api/firms/:firm/jobs/:job/deliveries/:delivery/revoke',
  access: ISSUER,
  kind: 'json',
  idempotent: true,
  params: deliveryParams,
  query: none,
  body: empty,
  response: deliveryView,
  errors: ['forbidden', 'not_found'],
});

export const recordPaperDecision = route({
  name: 'recordPaperDecision',
  method: 'POST',
  path: '/api/firms/:firm/jobs/:job/revisions/:revision/decisions',
  access: ISSUER,
  kind: 'json',
  idempotent: true,
  params: revisionParams,
  query: none,
  body: decisionBody.extend({ id: z.uuid() }),
  response: ok,
  errors: ['invalid', 'forbidden', 'not_found', 'conflict'],
});
