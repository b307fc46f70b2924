import { deleteOp, type Edit, type EditOp, editOf, insertOp, newId, updateOp } from '@farlug/contract/edit';
import { blankBus, blankJob, blankSource, orderKeys } from '@farlug/contract/job';
import {
  JOB_TABLE_NAMES,
  type JobRowLists,
  type JobRows,
  type LimitKind,
  type Row,
} from '@farlug/contract/rows';
import { CLASS_LIMITS, type JobDraft, PLAIN_LIMITS, type SourceDraft } from './job-draft.ts';
import {
  decimalOrNull,
  type Reader,
  readAmps,
  readHertz,
  readOhms,
  readPercent,
  readRatio,
  readShare,
  readVolts,
} from './typed-number.ts';

const textOrNull = (text: string): string | null => text.trim() || null;

type JobFields = Omit<Row<'job'>, 'id' | 'angle'>;

function jobFields(draft: JobDraft): JobFields {
  const direct = draft.sources.some((source) => source.system === 'dc-2w');
  return {
    name: draft.name.trim(),
    address: textOrNull(draft.address),
    building: textOrNull(draft.building),
    area: textOrNull(draft.area),
    codeEdition: textOrNull(draft.codeEdition),
    authority: textOrNull(draft.authority),
    permitNumber: textOrNull(draft.permitNumber),
    frequency: direct ? '0' : (decimalOrNull(draft.frequency, readHertz) ?? '60'),
    basis: draft.basis,
    lengthUnit: draft.lengthUnit,
    wireUnit: draft.wireUnit,
    limitPreset: textOrNull(draft.preset),
    limitBasis: textOrNull(draft.limitBasis),
    limitForce: draft.limitForce,
    includeService: draft.includeService,
    includeTransformer: draft.includeTransformer,
    includeSource: draft.includeSource,
    longRun: draft.longRun,
  };
}

type SourceFields = Pick<
  Row<'source'>,
  'system' | 'volts' | 'openVolts' | 'off' | 'impedanceR' | 'impedanceX' | 'faultAmps' | 'faultXOverR'
>;

function sourceFields(source: SourceDraft): SourceFields {
  const fault = source.strength === 'fault';
  const impedance = source.strength === 'impedance';
  return {
    system: source.system,
    volts: decimalOrNull(source.volts, readVolts),
    openVolts: decimalOrNull(source.openVolts, readVolts),
    off: source.off,
    impedanceR: impedance ? decimalOrNull(source.impedanceR, readOhms) : null,
    impedanceX: impedance ? (decimalOrNull(source.impedanceX, readOhms) ?? '0') : null,
    faultAmps: fault ? decimalOrNull(source.faultAmps, readAmps) : null,
    faultXOverR: fault ? (decimalOrNull(source.faultXOverR, readRatio) ?? '0') : null,
  };
}

type LimitFields = Omit<Row<'limit'>, 'id'>;

const readerOf = (kind: LimitKind): Reader =>
  kind.endsWith('volts') ? readVolts : kind.startsWith('rating') ? readShare : readPercent;

/** Only for drafts that nothing is wrong with. */
export function limitFields(draft: Pick<JobDraft, 'limits' | 'byClass' | 'atVolts'>): LimitFields[] {
  const found: LimitFields[] = [];
  const add = (text: string, read: Reader, fields: Omit<LimitFields, 'value'>) => {
    const value = decimalOrNull(text, read);
    if (value !== null) found.push({ ...fields, value });
  };
  for (const kind of PLAIN_LIMITS)
    add(draft.limits[kind], readerOf(kind), { class: null, kind, atVolts: null });
  for (const entry of draft.byClass)
    for (const kind of CLASS_LIMITS)
      add(entry[kind], readPercent, { class: entry.class, kind, atVolts: null });
  for (const entry of draft.atVolts)
    add(entry.value, readVolts, {
      class: null,
      kind: entry.kind,
      atVolts: decimalOrNull(entry.atVolts, readVolts),
    });
  return found;
}

/** The rows of a new job: its service and nothing behind it yet. */
export function rowsOfDraft(draft: JobDraft): JobRowLists {
  const lists = Object.fromEntries(JOB_TABLE_NAMES.map((table) => [table, []])) as unknown as JobRowLists;
  const { name, lengthUnit, wireUnit, ...rest } = jobFields(draft);
  lists.job.push(blankJob({ id: newId(), name, lengthUnit, wireUnit, ...rest }));
  for (const fields of limitFields(draft)) lists.limit.push({ id: newId(), ...fields });
  const keys = orderKeys(draft.sources.length);
  draft.sources.forEach((source, index) => {
    const busId = newId();
    const orderKey = keys[index]!;
    lists.bus.push(blankBus({ id: busId, code: source.code, orderKey, kind: 'service' }));
    lists.source.push(
      blankSource({ id: newId(), code: source.code, orderKey, busId, ...sourceFields(source) }),
    );
  });
  return lists;
}

const limitKey = (row: LimitFields) =>
  `${row.class ?? ''} ${row.kind} ${row.atVolts === null ? '' : Number(row.atVolts)}`;

/** The edit that makes the job what the form says; `null` where it says nothing new. */
export function editOfDraft(rows: JobRows, draft: JobDraft): Edit | null {
  const job = [...rows.job.values()][0];
  if (!job) throw new Error('rows without a job');
  const ops: (EditOp | null)[] = [updateOp('job', job, jobFields(draft))];
  for (const source of draft.sources) {
    const row = source.id === null ? undefined : rows.source.get(source.id);
    if (row) ops.push(updateOp('source', row, sourceFields(source)));
  }
  const wanted = new Map(limitFields(draft).map((fields) => [limitKey(fields), fields]));
  for (const row of rows.limit.values()) {
    const fields = wanted.get(limitKey(row));
    wanted.delete(limitKey(row));
    ops.push(fields ? updateOp('limit', row, { value: fields.value }) : deleteOp('limit', row));
  }
  for (const fields of wanted.values()) ops.push(insertOp('limit', { id: newId(), ...fields }));
  return editOf('job settings', ops);
}
