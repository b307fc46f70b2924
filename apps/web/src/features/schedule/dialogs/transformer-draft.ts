import type { JobRows, Row } from '@farlug/contract/rows';
import { addTransformerEdit, type RowField, systemsOfRows } from '@farlug/contract/schedule';
import {
  type BusSystem,
  SYSTEM_CONDUCTORS,
  type System,
  type TransformerConnection,
} from '@farlug/solver/job';
import { EditChain } from './edit-chain.ts';
import { busOfFeed, type FeedValue, feedOf } from './feed-choices.ts';
import type { Settled } from './panel-draft.ts';
import { rowTexts } from './row-texts.ts';
import { NEW_RUN, type RunTexts, runTexts, typeRun } from './run-draft.ts';

const FIELDS = [
  'kva',
  'primaryVolts',
  'secondaryVolts',
  'connection',
  'primary',
  'system',
  'percentZ',
  'tapPercent',
] as const satisfies readonly RowField<'transformer'>[];

export type TransformerDraft = Record<(typeof FIELDS)[number] | 'code' | 'ratio', string> & {
  /** How the nameplate or data sheet gives it: reactance over resistance, or the other way round. */
  ratioOf: 'X/R' | 'R/X';
  feed: FeedValue;
  run: RunTexts;
};

const WORDS = {
  kva: 'Rating',
  primaryVolts: 'Primary volts',
  secondaryVolts: 'Secondary volts',
  primary: 'Primary',
  system: 'Secondary system',
  percentZ: 'Impedance',
  tapPercent: 'Tap',
};

/** Systems that a secondary of each connection can be (model of transformers, the solver's own check). */
export const SECONDARIES: Record<TransformerConnection, readonly System[]> = {
  'delta-wye': ['3ph-4w'],
  'wye-wye': ['3ph-4w'],
  'delta-delta': ['3ph-3w', '3ph-4w-delta'],
  'wye-delta': ['3ph-3w', '3ph-4w-delta'],
  'single-phase': ['1ph-3w', '1ph-2w'],
};

export function newTransformerDraft(rows: JobRows, feed: FeedValue): TransformerDraft {
  const draft: TransformerDraft = {
    code: '',
    kva: '',
    primaryVolts: '',
    secondaryVolts: '',
    connection: 'delta-wye',
    primary: 'three-phase',
    system: '3ph-4w',
    percentZ: '',
    tapPercent: '',
    ratio: '',
    ratioOf: 'X/R',
    feed,
    run: NEW_RUN,
  };
  return feed === '' ? draft : { ...draft, ...followFeed(rows, feed) };
}

/** What follows from where it is fed: the connection that fits, and the volts there. */
export function followFeed(rows: JobRows, feed: FeedValue): Partial<TransformerDraft> {
  const here = systemsOfRows(rows).get(busOfFeed(rows, feed) ?? '');
  if (!here) return {};
  const { system, volts } = here.origin;
  const three = SYSTEM_CONDUCTORS[system].includes('L3');
  return {
    ...withConnection(three ? 'delta-wye' : 'single-phase', here),
    primaryVolts: String(volts),
  };
}

/** A connection with the secondary and the primary terminals that go with it. */
export function withConnection(
  connection: TransformerConnection,
  here: BusSystem | undefined,
): Pick<TransformerDraft, 'connection' | 'system' | 'primary'> {
  const single = connection === 'single-phase';
  const pair = here && !here.conductors.includes('L2') ? 'L1-N' : 'L1-L2';
  return { connection, system: SECONDARIES[connection][0]!, primary: single ? pair : 'three-phase' };
}

export function transformerDraft(rows: JobRows, row: Row<'transformer'>): TransformerDraft {
  const texts = rowTexts(rows, 'transformer', row, FIELDS) as Pick<TransformerDraft, (typeof FIELDS)[number]>;
  const run = runTo(rows, row.fromBusId);
  return {
    ...texts,
    code: row.code,
    ratio: rowTexts(rows, 'transformer', row, ['xOverR']).xOverR!,
    ratioOf: 'X/R',
    feed: run ? `bus:${run.fromBusId}` : '',
    run: run ? runTexts(rows, run) : NEW_RUN,
  };
}

/** The run that feeds the primary. */
export function runTo(rows: JobRows, busId: string): Row<'run'> | null {
  for (const run of rows.run.values()) if (run.toBusId === busId) return run;
  return null;
}

/** A transformer as typed, new or changed, with the run to its primary, as one edit. */
export function settleTransformer(
  rows: JobRows,
  transformerId: string | null,
  draft: TransformerDraft,
): Settled {
  const chain = new EditChain(rows);
  const code = draft.code.trim();
  let id = transformerId;
  if (id === null) {
    const feed = feedOf(draft.feed);
    if (code === '') chain.refuse('code', 'Give the transformer a name, such as T2.');
    if (code.length > 60) chain.refuse('code', 'Use at most 60 characters.');
    if (!feed) chain.refuse('feed', 'Choose what feeds its primary.');
    else if (code !== '') {
      const given = {
        code,
        connection: draft.connection as TransformerConnection,
        system: draft.system as System,
      };
      const added = addTransformerEdit(rows, feed, given);
      if (chain.take(added.problem?.includes('already') ? 'code' : 'feed', added)) id = added.id;
    }
  }
  const row = chain.rows.transformer.get(id ?? '');
  if (id === null || !row) return { edit: null, errors: chain.errors, id: null };
  chain.type('transformer', id, draft, FIELDS, { words: WORDS });
  const xOverR = ratioText(draft);
  if (xOverR === null)
    chain.refuse(
      'ratio',
      `${draft.ratioOf} must be a number above 0, such as ${draft.ratioOf === 'X/R' ? '2' : '0.5'}.`,
    );
  else chain.type('transformer', id, { xOverR }, ['xOverR'], { words: { xOverR: 'X/R' } });
  if (chain.errors.xOverR) chain.refuse('ratio', chain.errors.xOverR);
  refuseMismatch(chain, id);
  const run = runTo(chain.rows, row.fromBusId);
  if (run) typeRun(chain, run.id, draft.run, transformerId === null);
  return {
    edit: chain.edit(transformerId ? `Change transformer ${row.code}` : `Add transformer ${code}`),
    errors: chain.errors,
    id,
  };
}

/** X/R as the row keeps it; null where an R/X cannot be turned over. */
function ratioText({ ratio, ratioOf }: TransformerDraft): string | null {
  if (ratioOf === 'X/R' || ratio.trim() === '') return ratio;
  const value = Number(ratio.trim());
  return value > 0 ? String(Number((1 / value).toPrecision(8))) : null;
}

/** Volts that do not fit where it stands, before the whole job is refused for them (10 %, the solver's own bound). */
function refuseMismatch(chain: EditChain, id: string): void {
  const row = chain.rows.transformer.get(id)!;
  const here = systemsOfRows(chain.rows).get(row.fromBusId);
  const volts = Number(row.primaryVolts);
  if (!here || !(volts > 0)) return;
  const { system, volts: nominal } = here.origin;
  const across = row.primary.endsWith('-N') && system !== '1ph-2w' && system !== 'dc-2w' ? null : nominal;
  if (system === 'dc-2w') chain.refuse('feed', 'A transformer cannot be fed with direct current.');
  else if (across !== null && Math.abs(volts - across) > 0.1 * across)
    chain.refuse(
      'primaryVolts',
      `Primary volts must be within 10 % of the ${Math.round(across)} V at its primary; is ${row.primaryVolts}.`,
    );
}
