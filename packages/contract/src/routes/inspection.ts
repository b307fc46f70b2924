import { jobSchema } from '@farlug/solver/job';
import { z } from 'zod';
import { EVERYONE, INSPECTION, route } from '../route.ts';
import { LENGTH_STATES } from '../rows/index.ts';
import { empty, instant, none, ok, token } from './common.ts';
import { decisionBody, decisionView, PAPER_SIZES, PDF_STATES } from './reports.ts';

/**
 * What a revision pins: `sha256` is of the RFC 8785 canonical JSON of exactly this. Everything that the report
 * prints follows from it and the solver version.
 */
export const revisionInput = z.strictObject({
  format: z.literal('farlug-revision/1'),
  job: jobSchema,
  scenario: z.string(),
  seq: z.int(),
  paper: z.enum(PAPER_SIZES),
  note: z.string(),
  titleBlock: z.strictObject({
    firm: z.string(),
    heading: z.string(),
    job: z.string(),
    address: z.string().nullable(),
    building: z.string().nullable(),
    area: z.string().nullable(),
    codeEdition: z.string().nullable(),
    authority: z.string().nullable(),
    permitNumber: z.string().nullable(),
    issuedBy: z.string(),
    issuedAt: instant,
    revision: z.int(),
  }),
  wireUnit: z.enum(['awg', 'mm2']),
  equationsPanel: z.string().nullable(),
  /** What was assumed, by job-file place: printed with a raised a. */
  assumed: z.array(z.strictObject({ kind: z.string(), id: z.string(), field: z.string(), text: z.string() })),
  /** Ampacity-floor overrides with the reason that was given. */
  overrides: z.array(z.strictObject({ run: z.string(), reason: z.string() })),
  tables: z.array(z.strictObject({ id: z.string(), source: z.string(), sha256: z.string() })),
  /** How each run's length was come by, where it is said. */
  lengths: z.array(z.strictObject({ run: z.string(), state: z.enum(LENGTH_STATES) })),
  /** What the schedule says of a row beyond the job file, by its place in `job.panels[panel].circuits[row]`. */
  rowWords: z.array(
    z.strictObject({
      panel: z.int(),
      row: z.int(),
      code: z.string(),
      room: z.string(),
      loadType: z.string(),
      notes: z.string(),
    }),
  ),
  notices: z.array(z.string()),
  firmWording: z.string(),
});
export type RevisionInput = z.output<typeof revisionInput>;

/** The token of the mailed link against a cookie; the link's page then moves to the clean address `/inspection`. */
export const openInspection = route({
  name: 'openInspection',
  method: 'POST',
  path: '/api/inspection/open',
  access: EVERYONE,
  kind: 'json',
  idempotent: true,
  params: none,
  query: none,
  body: z.strictObject({ token }),
  response: ok,
  errors: ['invalid', 'link_gone', 'too_many'],
});

/** What a report says in a few lines: counts by circuit, and what exceeds or is near a limit, worst first. */
export const reportDigest = z.strictObject({
  counts: z.strictObject({
    over: z.int(),
    rise: z.int(),
    near: z.int(),
    within: z.int(),
    unjudged: z.int(),
    unserved: z.int(),
  }),
  findings: z.array(
    z.strictObject({
      /** `LP-2-20` or, of a load in no circuit, its own id. */
      place: z.string(),
      serves: z.string(),
      load: z.string(),
      shown: z.enum(['over', 'rise', 'near']),
      feederPercent: z.number().nullable(),
      branchPercent: z.number().nullable(),
      totalPercent: z.number().nullable(),
      limitPercent: z.number().nullable(),
      reasons: z.array(z.string()),
    }),
  ),
});
export type ReportDigest = z.output<typeof reportDigest>;

export const inspectionView = z.strictObject({
  recipientName: z.string(),
  revisionNo: z.int(),
  sha256: z.string(),
  solverVersion: z.string(),
  issuedAt: instant,
  pdf: z.enum(PDF_STATES),
  linkExpiresAt: instant,
  /** A later revision exists: this one is no longer the newest. */
  superseded: z.boolean(),
  input: revisionInput,
  digest: reportDigest,
  decisions: z.array(decisionView),
});
export type InspectionView = z.output<typeof inspectionView>;

export const getInspection = route({
  name: 'getInspection',
  method: 'GET',
  path: '/api/inspection',
  access: INSPECTION,
  kind: 'json',
  idempotent: true,
  params: none,
  query: none,
  body: empty,
  response: inspectionView,
  errors: ['link_gone'],
});

export const downloadInspectionPdf = route({
  name: 'downloadInspectionPdf',
  method: 'GET',
  path: '/api/inspection/pdf',
  access: INSPECTION,
  kind: 'file',
  idempotent: true,
  params: none,
  query: none,
  body: empty,
  response: z.unknown(),
  errors: ['link_gone', 'unavailable'],
});

export const recordDecision = route({
  name: 'recordDecision',
  method: 'POST',
  path: '/api/inspection/decisions',
  access: INSPECTION,
  kind: 'json',
  idempotent: true,
  params: none,
  query: none,
  body: decisionBody.extend({ id: z.uuid() }),
  response: ok,
  errors: ['invalid', 'link_gone', 'conflict', 'too_many'],
});
