import type { DecisionView } from '@farlug/contract/routes';
import {
  type DecisionRow,
  type FirmTransaction,
  listDecisions,
  recordAudit,
  recordDecision,
  revisionById,
} from '@farlug/db';
import type { Deps } from '../../deps.ts';
import type { Member } from '../../platform/caller.ts';
import { DONE, type Done } from '../../platform/done.ts';
import { type Refusal, refusalAsValue, refuse } from '../../platform/refusal.ts';
import { decisionViewOf } from './reports-presenter.ts';

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
  const { firmId, person } = member;
  return refusalAsValue(() =>
    deps.db.withFirm(firmId, person.id, async (tx) => {
      const revision = await revisionById(tx, jobId, revisionId);
      if (revision === null) throw refuse('not_found', 'There is no such report in this job.');
      const recorded = await putDecision(tx, jobId, {
        ...given,
        revisionId,
        deliveryId: null,
        via: 'paper',
        enteredBy: person.id,
      });
      if (recorded) await recordAudit(tx, 'decision.entered', `revision ${revision.no}: ${given.decision}`);
      return DONE;
    }),
  );
}

const TYPED = ['decision', 'words', 'comments', 'name', 'title', 'via', 'deliveryId'] as const;

/** Written once: the same decision again changes nothing (false), another one under its id is a conflict. */
export async function putDecision(
  tx: FirmTransaction,
  jobId: string,
  values: Parameters<typeof recordDecision>[2],
): Promise<boolean> {
  if (values.decision === 'other' && values.words.trim() === '')
    throw refuse('invalid', 'Write the decision in the authority’s own words.', [
      { path: 'words', message: 'must say what was decided' },
    ]);
  if (await recordDecision(tx, jobId, values)) return true;
  const known = (await listDecisions(tx, jobId, values.revisionId)).find(({ id }) => id === values.id);
  if (known === undefined || !TYPED.every((field) => known[field] === values[field]))
    throw refuse('conflict', 'A decision with this id is on record already, and none is ever changed.');
  return false;
}

/** Decisions that came by one delivery's link. */
export async function decisionsOfDelivery(
  tx: FirmTransaction,
  jobId: string,
  { id, revisionId }: { id: string; revisionId: string },
): Promise<DecisionView[]> {
  const all = await listDecisions(tx, jobId, revisionId);
  return all.filter(({ deliveryId }) => deliveryId === id).map(decisionViewOf);
}
