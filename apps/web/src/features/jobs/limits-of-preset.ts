import type { LimitPreset } from '@farlug/contract/presets';
import type { presetBody } from '@farlug/contract/routes';
import type { WireUnit } from '@farlug/contract/rows';
import type { z } from 'zod';
import { type LimitsDraft, limitDrafts } from './job-draft.ts';

/** A firm’s own, or one of a code or standard that says how far it was seen. */
export type Preset = z.output<typeof presetBody> &
  Partial<Pick<LimitPreset, 'edition' | 'standing' | 'verified'>>;

export const isOwn = (preset: Preset): boolean => preset.edition === undefined;

/** What the limit fields of a form hold once the preset is taken. */
export function limitsOfPreset(preset: z.output<typeof presetBody>): LimitsDraft {
  return {
    limitBasis: preset.clause,
    limitForce: preset.force,
    includeService: preset.includeService,
    includeTransformer: preset.includeTransformer,
    includeSource: preset.includeSource,
    longRun: preset.longRun,
    ...limitDrafts(preset.limits),
  };
}

/** What a new job starts from: the firm’s own first preset, else the usual one where its sizes are used. */
export function startingPreset(presets: readonly Preset[], wireUnit: WireUnit): Preset | undefined {
  const codes = presets.filter((preset) => !isOwn(preset));
  return (
    presets.find(isOwn) ??
    (wireUnit === 'mm2' ? codes.find((preset) => preset.clause.startsWith('IEC ')) : undefined) ??
    codes[0]
  );
}
