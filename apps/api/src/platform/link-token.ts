import { createHmac } from 'node:crypto';

/**
 * The secret in an inspector's link. It follows from the delivery and its epoch, so that the queue carries no secret and
 * a message that is sent again has the same link; the database holds its hash.
 */
export function linkToken(linkSecret: string, deliveryId: string, epoch: number): string {
  return createHmac('sha256', linkSecret).update(`delivery\0${deliveryId}\0${epoch}`).digest('base64url');
}
