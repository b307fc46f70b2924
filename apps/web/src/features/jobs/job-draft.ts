import { inOrder } from '@farlug/contract/job';
import type { JobRows, LimitKind, Row, WireUnit } from '@farlug/contract/rows';
import type { Basis, Force, LengthUnit, LoadClass, System } from '@farlug/solver/job';

/** How firm the service stands behind its terminals. */
export const STRENGTHS = ['fault', 'impedance', 'stiff'] as const;
export type Strength = (typeof STRENGTHS)[number];

export interface SourceDraft {
  /** The row; `null` where the job is yet to be made. */
  id: string | null;
  code: string;
  system: System;
  volts: string;
  openVolts: string;
  strength: Strength;
  impedanceR: string;
  impedanceX: string;
  faultAmps: string;
  faultXOverR: string;
  off: boolean;
}

export const PLAIN_LIMITS = [
  'feeder',
  'branch',
  'total',
  'starting',
  'rise',
  'lowest-volts',
  'highest-volts',
  'rating-low',
  'rating-high',
] as const satisfies readonly LimitKind[];
export const CLASS_LIMITS = ['feeder', 'branch', 'total'] as const satisfies readonly LimitKind[];
export type ClassLimit = { class: LoadClass } & Record<(typeof CLASS_LIMITS)[number], string>;
export interface VoltsLimit {
  kind: 'lowest-volts' | 'highest-volts';
  atVolts: string;
  value: string;
}

/** Everything that the job form holds, as typed. */
export interface JobDraft {
  name: string;
  address: string;
  building: string;
  area: string;
  codeEdition: string;
  authority: string;
  permitNumber: string;
  sources: SourceDraft[];
  frequency: string;
  basis: Basis;
  lengthUnit: LengthUnit;
  wireUnit: WireUnit;
  preset: string;
  limitBasis: string;
  limitForce: Force;
  includeService: boolean;
  includeTransformer: boolean;
  includeSource: boolean;
  longRun: boolean;
  limits: Record<LimitKind, string>;
  byClass: ClassLimit[];
  atVolts: VoltsLimit[];
}

/** The part of a job, or of a preset, that says how far the volts may fall. */
export type LimitsDraft = Pick<
  JobDraft,
  | 'limitBasis'
  | 'limitForce'
  | 'includeService'
  | 'includeTransformer'
  | 'includeSource'
  | 'longRun'
  | 'limits'
  | 'byClass'
  | 'atVolts'
>;
export type PresetDraft = LimitsDraft & { name: string };

export const noLimits = (): Record<LimitKind, string> =>
  Object.fromEntries(PLAIN_LIMITS.map((kind) => [kind, ''])) as Record<LimitKind, string>;

export function blankDraft(units: { lengthUnit: LengthUnit; wireUnit: WireUnit }): JobDraft {
  const metric = units.wireUnit === 'mm2';
  return {
    name: '',
    address: '',
    building: '',
    area: '',
    codeEdition: '',
    authority: '',
    permitNumber: '',
    sources: [
      {
        id: null,
        code: 'service',
        system: '3ph-4w',
        volts: '',
        openVolts: '',
        strength: 'fault',
        impedanceR: '',
        impedanceX: '',
        faultAmps: '',
        faultXOverR: '',
        off: false,
      },
    ],
    frequency: metric ? '50' : '60',
    basis: 'impedance',
    lengthUnit: units.lengthUnit,
    wireUnit: units.wireUnit,
    preset: '',
    limitBasis: '',
    limitForce: 'recommendation',
    includeService: false,
    includeTransformer: false,
    includeSource: false,
    longRun: false,
    limits: noLimits(),
    byClass: [],
    atVolts: [],
  };
}

/** The form of a job that exists. */
export function draftFromRows(rows: JobRows): JobDraft {
  const job = [...rows.job.values()][0];
  if (!job) throw new Error('rows without a job');
  const said = (value: string | null) => value ?? '';
  const limits = [...rows.limit.values()];
  return {
    name: job.name,
    address: said(job.address),
    building: said(job.building),
    area: said(job.area),
    codeEdition: said(job.codeEdition),
    authority: said(job.authority),
    permitNumber: said(job.permitNumber),
    sources: inOrder(rows.source.values()).map(sourceDraft),
    frequency: job.frequency,
    basis: job.basis,
    lengthUnit: job.lengthUnit,
    wireUnit: job.wireUnit,
    preset: said(job.limitPreset),
    limitBasis: said(job.limitBasis),
    limitForce: job.limitForce,
    includeService: job.includeService,
    includeTransformer: job.includeTransformer,
    includeSource: job.includeSource,
    longRun: job.longRun,
    ...limitDrafts(limits),
  };
}

function sourceDraft(row: Row<'source'>): SourceDraft {
  const said = (value: string | null) => value ?? '';
  const strength =
    row.faultAmps !== null
      ? 'fault'
      : row.impedanceR !== null || row.impedanceX !== null
        ? 'impedance'
        : 'stiff';
  return {
    id: row.id,
    code: row.code,
    system: row.system,
    volts: said(row.volts),
    openVolts: said(row.openVolts),
    strength,
    impedanceR: said(row.impedanceR),
    impedanceX: said(row.impedanceX),
    faultAmps: said(row.faultAmps),
    faultXOverR: said(row.faultXOverR),
    off: row.off,
  };
}

type LimitOf = Omit<Row<'limit'>, 'id'>;

/** The limit fields of a form from rows or from a preset. */
export function limitDrafts(rows: readonly LimitOf[]): Pick<JobDraft, 'limits' | 'byClass' | 'atVolts'> {
  const limits = noLimits();
  const byClass: ClassLimit[] = [];
  const atVolts: VoltsLimit[] = [];
  for (const row of rows) {
    if (row.atVolts !== null && (row.kind === 'lowest-volts' || row.kind === 'highest-volts'))
      atVolts.push({ kind: row.kind, atVolts: row.atVolts, value: row.value });
    else if (row.class === null) limits[row.kind] = row.value;
    else if (row.kind === 'feeder' || row.kind === 'branch' || row.kind === 'total') {
      let own = byClass.find((entry) => entry.class === row.class);
      if (!own) {
        own = { class: row.class, feeder: '', branch: '', total: '' };
        byClass.push(own);
      }
      own[row.kind] = row.value;
    }
  }
  return { limits, byClass, atVolts };
}
