import type { Edit, EditConflict } from '@farlug/contract/edit';
import { applyEdit, editsSince } from '@farlug/db';
import type { Deps } from '../../deps.ts';
import type { Member } from '../../platform/caller.ts';
import { type Refusal, type RefusalDetail, refuse } from '../../platform/refusal.ts';
import { editOf } from './jobs-presenter.ts';

const DETAILS_MAX = 500;

export async function postEdit(
  deps: Deps,
  { firmId, person }: Member,
  jobId: string,
  edit: Edit,
): Promise<{ seq: number; headSeq: number } | Refusal> {
  const result = await deps.db.withFirm(firmId, person.id, (tx) => applyEdit(tx, jobId, edit));
  switch (result.kind) {
    case 'applied':
    case 'already':
      return { seq: result.seq, headSeq: result.headSeq };
    case 'conflict':
      return refuse(
        'conflict',
        'Somebody else changed the same values in the meantime.',
        result.conflicts.slice(0, DETAILS_MAX).map(conflictDetail),
      );
    case 'invalid':
      return refuse(
        'invalid',
        'The change holds values that cannot be kept.',
        result.problems.slice(0, DETAILS_MAX).map(({ path, message }) => ({ path, message })),
      );
    case 'archived':
      return refuse('archived', 'This job is archived. Take it out of the archive to change it.');
    case 'missing':
      return noJob();
  }
}

export async function listEdits(deps: Deps, { firmId, person }: Member, jobId: string, since: number) {
  const found = await deps.db.withFirm(firmId, person.id, (tx) => editsSince(tx, jobId, since));
  return found === null ? noJob() : { headSeq: found.headSeq, edits: found.edits.map(editOf) };
}

const noJob = () => refuse('not_found', 'There is no such job in this firm.');

function conflictDetail(conflict: EditConflict): RefusalDetail {
  const { op, field } = conflict;
  return {
    ...conflict,
    path: field === null ? `ops[${op}]` : `ops[${op}].set.${field}`,
    message: field === null ? 'the row is not as it was' : 'the value is not what it was',
  };
}
