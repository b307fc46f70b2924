import type { JobRows } from '@farlug/contract/rows';
import { addSourceEdit, systemsOfRows } from '@farlug/contract/schedule';
import type { System } from '@farlug/solver/job';
import { parseAmps, parseNumber, parseVolts } from '@farlug/solver/units';
import { EditChain } from './edit-chain.ts';
import { busOfFeed, type FeedValue } from './feed-choices.ts';
import type { Settled } from './panel-draft.ts';
import { NEW_RUN, type RunTexts, typeRun } from './run-draft.ts';

export interface SourceDraft {
  code: string;
  system: System;
  volts: string;
  openVolts: string;
  strength: 'fault' | 'impedance' | 'stiff';
  faultAmps: string;
  faultXOverR: string;
  impedanceR: string;
  impedanceX: string;
  off: boolean;
  to: FeedValue;
  run: RunTexts;
}

export const newSourceDraft = (rows: JobRows): SourceDraft => {
  const first = [...rows.source.values()][0];
  return {
    code: '',
    system: first?.system ?? '3ph-4w',
    volts: first?.volts ?? '',
    openVolts: '',
    strength: 'fault',
    faultAmps: '',
    faultXOverR: '',
    impedanceR: '',
    impedanceX: '',
    off: true,
    to: '',
    run: NEW_RUN,
  };
};

/** System and volts of the point that it is to feed. */
export function followPoint(rows: JobRows, to: FeedValue): Pick<SourceDraft, 'system' | 'volts'> | null {
  const there = systemsOfRows(rows).get(busOfFeed(rows, to) ?? '');
  return there ? { system: there.origin.system, volts: String(there.origin.volts) } : null;
}

type Read = { ok: true; value: string } | { ok: false; message: string };

/** A further source as typed, with its run, as one edit. */
export function settleSource(rows: JobRows, draft: SourceDraft): Settled {
  const chain = new EditChain(rows);
  const decimal = (field: keyof SourceDraft, word: string, read: (text: string) => Read, needed = false) => {
    const text = String(draft[field]).trim();
    if (text === '') {
      if (needed) chain.refuse(field, `${word} must be given.`);
      return null;
    }
    const outcome = read(text);
    if (!outcome.ok) chain.refuse(field, `${word} ${outcome.message}.`);
    return outcome.ok ? outcome.value : null;
  };
  const ohms = (text: string) => parseNumber(text.replace(/\s*(ohms?|Ω)$/i, ''), { min: 0, max: 1e6 });
  const ratio = (text: string) => parseNumber(text, { min: 0, max: 1000 });
  const fault = draft.strength === 'fault';
  const impedance = draft.strength === 'impedance';
  const direct = draft.system === 'dc-2w';
  const given = {
    code: draft.code,
    system: draft.system,
    volts: decimal('volts', 'Nominal volts', parseVolts, true),
    openVolts: decimal('openVolts', 'Volts at no load', parseVolts),
    off: draft.off,
    faultAmps: fault ? decimal('faultAmps', 'Fault current', parseAmps, true) : null,
    faultXOverR: fault && !direct ? decimal('faultXOverR', 'X/R', ratio) : null,
    impedanceR: impedance ? decimal('impedanceR', 'R', ohms, true) : null,
    impedanceX: impedance && !direct ? decimal('impedanceX', 'X', ohms) : null,
  };
  const to = busOfFeed(rows, draft.to);
  if (to === null) chain.refuse('to', 'Choose the panel or point that it feeds.');
  refuseMismatch(chain, draft, given.volts);
  if (to === null) return { edit: null, errors: chain.errors, id: null };
  const added = addSourceEdit(rows, given, to);
  if (!chain.take('code', added)) return { edit: null, errors: chain.errors, id: null };
  typeRun(chain, added.runId!, draft.run, true);
  return { edit: chain.edit(`Add source ${draft.code.trim()}`), errors: chain.errors, id: added.id };
}

/** Sources of different volts on one network are refused by the solver: said here, before they are written. */
function refuseMismatch(chain: EditChain, { system, to }: SourceDraft, volts: string | null): void {
  const there = systemsOfRows(chain.rows).get(busOfFeed(chain.rows, to) ?? '');
  if (!there || volts === null) return;
  const { system: own, volts: nominal } = there.origin;
  if (own !== system) return;
  if (Math.abs(Number(volts) - nominal) > 0.1 * nominal)
    chain.refuse(
      'volts',
      `Nominal volts must be within 10 % of the ${nominal} V of the point that it feeds.`,
    );
}
