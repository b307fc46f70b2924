import type { FirmRole } from '@farlug/contract/route';
import { roleOf } from '@farlug/db';
import type { Deps } from '../deps.ts';

/** What a person may be in a firm; null for everybody who is no member, and for firms that are not there. */
export function memberRole(deps: Deps, firmId: string, personId: string): Promise<FirmRole | null> {
  return deps.db.withFirm(firmId, personId, (tx) => roleOf(tx, personId));
}
