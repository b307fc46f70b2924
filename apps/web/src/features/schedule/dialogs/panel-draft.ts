import type { Edit } from '@farlug/contract/edit';
import type { JobRows, Row } from '@farlug/contract/rows';
import {
  addPanelEdit,
  circuitParts,
  type Feed,
  fieldText,
  panelTree,
  type RowField,
  refeedPanelEdit,
  renamePointEdit,
  scheduleView,
} from '@farlug/contract/schedule';
import type { FieldErrors } from '../../../lib/form-errors.ts';
import { typeBreaker, withBreaker } from './breaker-draft.ts';
import { EditChain } from './edit-chain.ts';
import { busOfFeed, type FeedValue, feedOf, firstFeed } from './feed-choices.ts';
import { rowTexts } from './row-texts.ts';
import { NEW_RUN, type RunTexts, runTexts, typeRun } from './run-draft.ts';
import { usualLines } from './usual-lines.ts';

const PANEL_FIELDS = [
  'layout',
  'spaces',
  'lines',
  'mainAmps',
  'building',
  'area',
  'mounting',
  'notes',
] as const satisfies readonly RowField<'panel'>[];

export type PanelDraft = Record<(typeof PANEL_FIELDS)[number] | 'code' | 'name', string> & {
  feed: FeedValue;
  /** By the lugs at the far end of that panel's bus bars, without a breaker. */
  feedThrough: boolean;
  /** In the panel that feeds it. */
  breaker: string;
  breakerSpaces: string;
  run: RunTexts;
};

const PANEL_WORDS = { spaces: 'Spaces', lines: 'Lines', mainAmps: 'Main breaker' };

export const newPanelDraft = (rows: JobRows, feed: FeedValue): PanelDraft => ({
  code: '',
  name: '',
  layout: 'two-column',
  spaces: '42',
  lines: usualLines(rows).join(', '),
  mainAmps: '',
  building: '',
  area: '',
  mounting: '',
  notes: '',
  feed: feed || firstFeed(rows),
  feedThrough: false,
  breaker: '',
  breakerSpaces: '',
  run: NEW_RUN,
});

export function panelDraft(rows: JobRows, panel: Row<'panel'>): PanelDraft {
  const bus = rows.bus.get(panel.busId)!;
  const circuit = feedingCircuit(rows, panel.id);
  const run = feederOf(rows, panel.id);
  return {
    ...(rowTexts(rows, 'panel', panel, PANEL_FIELDS) as Pick<PanelDraft, (typeof PANEL_FIELDS)[number]>),
    code: bus.code,
    name: bus.name ?? '',
    feed: feedValue(rows, panel.id),
    feedThrough: circuit?.circuit.kind === 'feed-through',
    breaker: circuit ? fieldText(circuit, 'breaker') : '',
    breakerSpaces: circuit ? fieldText(circuit, 'spaces') : '',
    run: run ? runTexts(rows, run) : NEW_RUN,
  };
}

/** What feeds a panel now, as it stands in the list. */
export function feedValue(rows: JobRows, panelId: string): FeedValue {
  const fed = panelTree(rows).find((node) => node.panel.id === panelId)?.fedFrom;
  if (!fed) return '';
  if (fed.panelId !== null) return `panel:${fed.panelId}`;
  const source = rows.source.get(fed.sourceId ?? '');
  return source ? `bus:${source.busId}` : '';
}

/** The run that ends at the panel. */
export function feederOf(rows: JobRows, panelId: string): Row<'run'> | null {
  const fed = panelTree(rows).find((node) => node.panel.id === panelId)?.fedFrom;
  return rows.run.get(fed?.runIds.at(-1) ?? '') ?? null;
}

function feedingCircuit(rows: JobRows, panelId: string) {
  const fed = panelTree(rows).find((node) => node.panel.id === panelId)?.fedFrom;
  return fed?.circuitId ? circuitParts(rows, fed.circuitId) : null;
}

export interface Settled {
  edit: Edit | null;
  errors: FieldErrors;
  /** Of what was added or changed. */
  id: string | null;
}

/** A panel as typed, new or changed, as one edit. */
export function settlePanel(rows: JobRows, panelId: string | null, draft: PanelDraft): Settled {
  const chain = new EditChain(rows);
  const id = panelId ?? addPanel(chain, draft);
  const panel = chain.rows.panel.get(id ?? '');
  if (!id || !panel) return { edit: null, errors: chain.errors, id: null };
  if (panelId) {
    if (draft.code.trim() !== rows.bus.get(panel.busId)!.code)
      chain.take('code', renamePointEdit(chain.rows, panel.busId, draft.code));
    refeed(chain, id, draft);
  }
  chain.type('bus', panel.busId, { name: draft.name }, ['name'], { words: { name: 'Name' } });
  // Lines follow from the feed of a new panel, unless they were typed.
  const follows = !panelId && draft.feed !== '' && draft.lines === usualLines(rows).join(', ');
  const fields = follows ? PANEL_FIELDS.filter((one) => one !== 'lines') : PANEL_FIELDS;
  chain.type('panel', id, draft, fields, { words: PANEL_WORDS });
  refuseHiddenSpaces(chain, id);
  const old = panelId ? feedingCircuit(rows, panelId) : null;
  const moved = panelId !== null && busOfFeed(rows, feedValue(rows, panelId)) !== busOfFeed(rows, draft.feed);
  const stays = moved && old !== null && draft.breakerSpaces === fieldText(old, 'spaces');
  const feeding = draft.feed.startsWith('panel:') ? feedingCircuit(chain.rows, id) : null;
  if (feeding) typeBreaker(chain, feeding.circuit.id, stays ? { ...draft, breakerSpaces: '' } : draft);
  const feeder = feederOf(chain.rows, id);
  if (feeder && draft.feed !== '') typeRun(chain, feeder.id, draft.run, feederOf(rows, id) === null);
  const code = draft.code.trim();
  return {
    edit: chain.edit(panelId ? `Change panel ${code}` : `Add panel ${code}`),
    errors: chain.errors,
    id,
  };
}

function addPanel(chain: EditChain, draft: PanelDraft): string | null {
  const feed = placeOf(draft);
  if (feed === 'refused') chain.refuse('breaker', NO_BREAKER);
  const added = addPanelEdit(chain.rows, { code: draft.code, feed: feed === 'refused' ? null : feed });
  const field = added.problem?.includes('open spaces') ? 'feed' : 'code';
  return chain.take(field, added) ? added.id : null;
}

function refeed(chain: EditChain, panelId: string, draft: PanelDraft): void {
  const now = feedValue(chain.rows, panelId);
  if (busOfFeed(chain.rows, now) === busOfFeed(chain.rows, draft.feed)) return;
  const feed = placeOf(draft);
  if (feed === 'refused') chain.refuse('breaker', NO_BREAKER);
  else if (feed) chain.take('feed', refeedPanelEdit(chain.rows, panelId, feed));
}

const NO_BREAKER = 'Breaker must be amps and poles, such as 200/3.';

function placeOf({ feed: value, breaker, feedThrough }: PanelDraft): Feed | null | 'refused' {
  const feed = feedOf(value);
  if (!feed) return null;
  if (feedThrough && 'panelId' in feed) return { ...feed, feedThrough: true };
  return withBreaker(feed, breaker) ?? 'refused';
}

/** A panel cannot be smaller than the spaces that its circuits take. */
function refuseHiddenSpaces(chain: EditChain, panelId: string): void {
  const view = scheduleView(chain.rows).panels.find((one) => one.id === panelId);
  const most = Math.max(0, ...(view?.circuits ?? []).flatMap((circuit) => circuit.spaces));
  if (view && most > view.panel.spaces)
    chain.refuse('spaces', `Spaces must be at least ${most}: a circuit stands in space ${most}.`);
}
