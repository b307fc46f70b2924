import type { FirmRole } from '@farlug/contract/route';
import {
  type FirmView,
  inviteMember,
  removeFirmConductor,
  removeMember,
  removePreset,
  saveFirmConductor,
  saveFirmDefaults,
  saveFirmSettings,
  savePreset,
  setMemberRole,
  withdrawInvitation,
} from '@farlug/contract/routes';
import { useQueryClient } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { z } from 'zod';
import type { ApiError } from '../../../lib/api-error.ts';
import { call } from '../../../lib/call.ts';
import { firmKey } from './use-firm.ts';

type Refusal = Promise<ApiError | null>;

export interface FirmActions {
  invite: (email: string, role: FirmRole) => Refusal;
  withdraw: (invitation: string) => Refusal;
  setRole: (person: string, role: FirmRole) => Refusal;
  remove: (person: string) => Refusal;
  saveSettings: (body: z.input<typeof saveFirmSettings.body>) => Refusal;
  saveDefaults: (body: z.input<typeof saveFirmDefaults.body>) => Refusal;
  savePreset: (preset: string, body: z.input<typeof savePreset.body>) => Refusal;
  removePreset: (preset: string) => Refusal;
  saveConductor: (conductor: string, body: z.input<typeof saveFirmConductor.body>) => Refusal;
  removeConductor: (conductor: string) => Refusal;
}

/** What an administrator changes; each answer is the whole firm, which the cache takes over. */
export function useFirmActions(firm: string): FirmActions {
  const cache = useQueryClient();
  return useMemo(() => {
    const keep = async (
      asked: Promise<{ ok: true; data: FirmView } | { ok: false; error: ApiError }>,
    ): Refusal => {
      const outcome = await asked;
      if (!outcome.ok) return outcome.error;
      cache.setQueryData(firmKey(firm), outcome.data);
      return null;
    };
    return {
      invite: (email, role) => keep(call(inviteMember, { params: { firm }, body: { email, role } })),
      withdraw: (invitation) => keep(call(withdrawInvitation, { params: { firm, invitation } })),
      setRole: (person, role) => keep(call(setMemberRole, { params: { firm, person }, body: { role } })),
      remove: (person) => keep(call(removeMember, { params: { firm, person } })),
      saveSettings: (body) => keep(call(saveFirmSettings, { params: { firm }, body })),
      saveDefaults: (body) => keep(call(saveFirmDefaults, { params: { firm }, body })),
      savePreset: (preset, body) => keep(call(savePreset, { params: { firm, preset }, body })),
      removePreset: (preset) => keep(call(removePreset, { params: { firm, preset } })),
      saveConductor: (conductor, body) =>
        keep(call(saveFirmConductor, { params: { firm, conductor }, body })),
      removeConductor: (conductor) => keep(call(removeFirmConductor, { params: { firm, conductor } })),
    };
  }, [cache, firm]);
}
