import type { FirmRole } from '@farlug/contract/route';
import type { FirmView } from '@farlug/contract/routes';
import {
  type FirmTransaction,
  firmSettings,
  listConductors,
  listInvitations,
  listMembers,
  listPresets,
  readDefaults,
  roleOf,
} from '@farlug/db';

/** The firm as a member sees it; whom it invited is for administrators. */
export async function firmViewOf(tx: FirmTransaction, personId: string): Promise<FirmView> {
  const settings = await firmSettings(tx);
  if (settings === null) throw new Error('a member of a firm that is not there');
  const role: FirmRole = (await roleOf(tx, personId)) ?? 'estimator';
  const invitations = role === 'admin' ? await listInvitations(tx) : [];
  return {
    id: tx.firmId,
    settings,
    role,
    members: await listMembers(tx),
    invitations: invitations.map(({ expiresAt, ...rest }) => ({
      ...rest,
      expiresAt: expiresAt.toISOString(),
    })),
    presets: await listPresets(tx),
    defaults: await readDefaults(tx),
    conductors: await listConductors(tx),
  };
}
