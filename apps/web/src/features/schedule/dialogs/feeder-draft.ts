import type { JobRows, Row } from '@farlug/contract/rows';
import { addFeederEdit, circuitParts, fieldText } from '@farlug/contract/schedule';
import { type BreakerDraft, typeBreaker, withBreaker } from './breaker-draft.ts';
import { EditChain } from './edit-chain.ts';
import { busOfFeed, type FeedValue, feedOf } from './feed-choices.ts';
import type { Settled } from './panel-draft.ts';
import { NEW_RUN, type RunTexts, runTexts, typeRun } from './run-draft.ts';

export interface FeederDraft extends BreakerDraft {
  code: string;
  from: FeedValue;
  to: FeedValue;
  run: RunTexts;
}

export const newFeederDraft = (from: FeedValue): FeederDraft => ({
  code: '',
  from,
  to: '',
  breaker: '',
  breakerSpaces: '',
  run: NEW_RUN,
});

export function feederDraft(rows: JobRows, run: Row<'run'>): FeederDraft {
  const circuit = circuitParts(rows, run.circuitId ?? '');
  return {
    code: run.code,
    from: `bus:${run.fromBusId}`,
    to: `bus:${run.toBusId}`,
    breaker: circuit ? fieldText(circuit, 'breaker') : '',
    breakerSpaces: circuit ? fieldText(circuit, 'spaces') : '',
    run: runTexts(rows, run),
  };
}

/** A run as typed: a new one between two points, or one that stands, as one edit. */
export function settleFeeder(rows: JobRows, runId: string | null, draft: FeederDraft): Settled {
  const chain = new EditChain(rows);
  const id = runId ?? addFeeder(chain, draft);
  const run = chain.rows.run.get(id ?? '');
  if (id === null || !run) return { edit: null, errors: chain.errors, id: null };
  if (run.circuitId !== null) typeBreaker(chain, run.circuitId, draft);
  typeRun(chain, id, draft.run, runId === null);
  return {
    edit: chain.edit(runId ? `Change run ${run.code}` : `Add run ${run.code}`),
    errors: chain.errors,
    id,
  };
}

function addFeeder(chain: EditChain, draft: FeederDraft): string | null {
  const feed = feedOf(draft.from);
  const to = busOfFeed(chain.rows, draft.to);
  if (!feed) chain.refuse('from', 'Choose where the run starts.');
  if (to === null) chain.refuse('to', 'Choose where the run ends.');
  if (draft.code.trim() === '') chain.refuse('code', 'Give the run a name, such as F7.');
  const place = feed && withBreaker(feed, draft.breaker);
  if (feed && !place) chain.refuse('breaker', 'Breaker must be amps and poles, such as 200/3.');
  if (!place || to === null || draft.code.trim() === '') return null;
  const added = addFeederEdit(chain.rows, place, to, draft.code);
  const field = added.problem?.includes('name')
    ? 'code'
    : added.problem?.includes('open spaces')
      ? 'from'
      : 'to';
  return chain.take(field, added) ? added.id : null;
}
