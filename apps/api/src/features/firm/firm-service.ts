import type { FirmView, presetBody } from '@farlug/contract/routes';
import type { Row } from '@farlug/contract/rows';
import {
  type FirmSettings,
  type FirmTransaction,
  listAudit,
  recordAudit,
  removeConductor as removeConductorRow,
  removePreset as removePresetRow,
  saveConductor as saveConductorRow,
  saveDefaults as saveDefaultRows,
  saveFirmSettings,
  savePreset as savePresetRows,
} from '@farlug/db';
import type { z } from 'zod';
import type { Deps } from '../../deps.ts';
import type { Member } from '../../platform/caller.ts';
import { type Refusal, refusalAsValue, refuse, refuseField } from '../../platform/refusal.ts';
import { firmViewOf } from './firm-view.ts';

/** Changes something and answers the firm as it is then; a thrown refusal undoes the change. */
export function changeFirm(
  deps: Deps,
  { firmId, person }: Member,
  change: (tx: FirmTransaction) => Promise<void>,
): Promise<FirmView | Refusal> {
  return refusalAsValue(() =>
    deps.db.withFirm(firmId, person.id, async (tx) => {
      await change(tx);
      return firmViewOf(tx, person.id);
    }),
  );
}

export function getFirm(deps: Deps, member: Member): Promise<FirmView | Refusal> {
  return changeFirm(deps, member, async () => {});
}

export function saveSettings(deps: Deps, member: Member, settings: FirmSettings) {
  return changeFirm(deps, member, async (tx) => {
    await saveFirmSettings(tx, settings);
    await recordAudit(tx, 'changed the settings', settings.name);
  });
}

export function saveDefaults(deps: Deps, member: Member, values: Record<string, string>) {
  return changeFirm(deps, member, async (tx) => {
    await saveDefaultRows(tx, values);
    await recordAudit(tx, 'changed the starting values', Object.keys(values).join(', ').slice(0, 400));
  });
}

export function savePreset(deps: Deps, member: Member, id: string, preset: z.output<typeof presetBody>) {
  return changeFirm(deps, member, async (tx) => {
    await savePresetRows(tx, { id, ...preset });
    await recordAudit(tx, 'saved the limit preset', preset.name);
  });
}

export function removePreset(deps: Deps, member: Member, id: string) {
  return changeFirm(deps, member, async (tx) => {
    if (!(await removePresetRow(tx, id))) throw refuse('not_found', 'There is no such preset in this firm.');
    await recordAudit(tx, 'removed a limit preset', id);
  });
}

export function saveConductor(deps: Deps, member: Member, row: Row<'conductor'>) {
  return changeFirm(deps, member, async (tx) => {
    if ((await saveConductorRow(tx, row)) === 'name-taken')
      throw refuseField('conflict', 'name', `The firm has a conductor named ${row.name} already.`);
    await recordAudit(tx, 'saved the conductor', row.name);
  });
}

export function removeConductor(deps: Deps, member: Member, id: string) {
  return changeFirm(deps, member, async (tx) => {
    if (!(await removeConductorRow(tx, id)))
      throw refuse('not_found', 'There is no such conductor in this firm.');
    await recordAudit(tx, 'removed a conductor', id);
  });
}

export async function auditTrail(deps: Deps, { firmId, person }: Member, before: string | undefined) {
  const events = await deps.db.withFirm(firmId, person.id, (tx) =>
    listAudit(tx, before === undefined ? {} : { before: new Date(before) }),
  );
  return { events: events.map((event) => ({ ...event, at: event.at.toISOString() })) };
}
