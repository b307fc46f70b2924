import type { DeliveryView } from '@farlug/contract/routes';
import type { DeliveryRow } from '@farlug/db';

export function linkState(
  { linkRevokedAt, linkExpiresAt }: Pick<DeliveryRow, 'linkRevokedAt' | 'linkExpiresAt'>,
  now: Date,
): DeliveryView['link'] {
  if (linkRevokedAt !== null) return 'revoked';
  return linkExpiresAt <= now ? 'expired' : 'open';
}
