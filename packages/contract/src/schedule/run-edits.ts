import type { JobRows, LengthState, Row } from '../rows/index.ts';
import { jobRowOf } from './build-circuit.ts';
import { codeOf, type ScheduleChange } from './circuit-edits.ts';
import { circuitParts } from './circuit-parts.ts';
import { readLength } from './distances.ts';
import { dropDraft, keepDraft } from './drafts.ts';
import { RowChanges } from './row-changes.ts';

export type RunSize = Partial<
  Pick<
    Row<'run'>,
    'material' | 'size' | 'sets' | 'neutralSize' | 'groundingSize' | 'floorOverride' | 'locked'
  >
>;

/** A size for a run and, where it is of a branch circuit, for every segment of that circuit, in one edit. */
export function setRunSizeEdit(rows: JobRows, runId: string, size: RunSize): ScheduleChange {
  const run = rows.run.get(runId);
  if (!run) return { edit: null, problem: 'The run is gone.' };
  const parts = run.circuitId === null ? null : circuitParts(rows, run.circuitId);
  const changes = new RowChanges(rows);
  const ohms = size.size === undefined || size.size === null ? {} : NO_OHMS;
  for (const one of parts?.circuit.kind === 'branch' ? parts.runs : [run]) {
    const neutral = one.conductors.includes('N') ? {} : { neutralSize: null };
    changes.update('run', one.id, { ...ohms, ...size, ...neutral });
  }
  const what = size.size ? `${size.size} for` : 'Size of';
  return { edit: changes.edit(`${what} ${parts ? codeOf(rows, parts) : run.code}`), problem: null };
}

const NO_OHMS: Partial<Row<'run'>> = {
  ohmsR: null,
  ohmsX: null,
  ohmsPer: null,
  ohmsNeutralR: null,
  ohmsNeutralX: null,
};

/** The length of one run as typed, and how it was come by. */
export function setLengthEdit(
  rows: JobRows,
  runId: string,
  typed: string,
  lengthState: LengthState | null = null,
): ScheduleChange {
  const run = rows.run.get(runId);
  if (!run) return { edit: null, problem: 'The run is gone.' };
  const label = `Length of ${run.code}`;
  const changes = new RowChanges(rows);
  const text = typed.trim();
  const read = text === '' ? null : readLength(text, jobRowOf(rows).lengthUnit);
  if (read && !read.ok) {
    keepDraft(changes, 'run', runId, 'length', text);
    return { edit: changes.edit(label), problem: read.message };
  }
  dropDraft(changes, 'run', runId, 'length');
  if (run.circuitId !== null) dropDraft(changes, 'circuit', run.circuitId, 'length');
  changes.update('run', runId, { length: read?.length ?? null, lengthState: read ? lengthState : null });
  return { edit: changes.edit(label), problem: null };
}
