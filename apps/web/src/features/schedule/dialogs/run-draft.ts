import type { JobRows, LengthState, Row } from '@farlug/contract/rows';
import { type RowField, setLengthEdit } from '@farlug/contract/schedule';
import type { EditChain } from './edit-chain.ts';
import { draftText, rowTexts, type Texts } from './row-texts.ts';

/** Sets and material come before the size, whose text may name both and then wins. */
const FIELDS = [
  'name',
  'material',
  'sets',
  'size',
  'neutral',
  'ground',
  'raceway',
  'insulation',
  'terminals',
  'ambient',
  'bundled',
  'temperature',
  'method',
  'protection',
  'demand',
  'open',
  'locked',
  'floorOverride',
  'notes',
] as const satisfies readonly RowField<'run'>[];

/** A run as it is typed. `breaker` only counts where no circuit has the run. */
export type RunTexts = Record<(typeof FIELDS)[number] | 'length' | 'lengthState' | 'breaker', string>;

export const RUN_WORDS: Texts = {
  name: 'Name',
  material: 'Material',
  sets: 'Parallel sets',
  size: 'Size',
  neutral: 'Neutral',
  ground: 'Grounding conductor',
  raceway: 'Raceway',
  insulation: 'Insulation',
  terminals: 'Terminals',
  ambient: 'Ambient',
  bundled: 'Current-carrying conductors',
  temperature: 'Conductor temperature',
  method: 'Installation method',
  protection: 'Protection',
  demand: 'Demand of what lies beyond',
  open: 'Open',
  locked: 'Locked',
  floorOverride: 'Reason',
  notes: 'Notes',
  length: 'Length',
  breaker: 'Breaker',
};

export const NEW_RUN: RunTexts = {
  name: '',
  material: 'copper',
  sets: '1',
  size: '',
  neutral: 'same',
  ground: '',
  raceway: '',
  insulation: '',
  terminals: '',
  ambient: '',
  bundled: '',
  temperature: '',
  method: '',
  protection: 'general',
  demand: '',
  open: 'no',
  locked: 'no',
  floorOverride: '',
  notes: '',
  length: '',
  lengthState: '',
  breaker: '',
};

export function runTexts(rows: JobRows, run: Row<'run'>): RunTexts {
  const texts = rowTexts(rows, 'run', run, [...FIELDS, 'length', 'breaker']);
  return { ...(texts as RunTexts), lengthState: run.lengthState ?? '' };
}

/** Writes a run as typed; errors stand at `run.size` and so on. A new run keeps the neutral that its feed gave it. */
export function typeRun(chain: EditChain, runId: string, texts: RunTexts, isNew = false): void {
  const run = chain.rows.run.get(runId);
  if (!run) return;
  const own =
    isNew && texts.neutral.trim() === 'same' ? FIELDS.filter((field) => field !== 'neutral') : FIELDS;
  chain.type('run', runId, texts, own, { at: 'run.', words: RUN_WORDS });
  if (run.circuitId === null) chain.type('run', runId, texts, ['breaker'], { at: 'run.', words: RUN_WORDS });
  const length = texts.length.trim();
  const state = (texts.lengthState || null) as LengthState | null;
  const same = length === (run.length ?? '') && (length === '' || state === run.lengthState);
  if (same && draftText(chain.rows, 'run', runId, 'length') === null) return;
  const change = setLengthEdit(chain.rows, runId, length, state);
  chain.take('run.length', { ...change, problem: change.problem && `Length ${change.problem}.` });
}
