import { createHmac } from 'node:crypto';

/**
 * The secret in an inspector's link. It follows from the delivery and its epoch, so that the queue carries no secret and
 * a message that is sent again has the same link; the database holds its hash. Ids of deliveries are made by browsers,
 * so firm and job are part of it: the same id in another firm leads somewhere else.
 */
export function linkToken(
  linkSecret: string,
  { firmId, jobId, deliveryId, epoch }: { firmId: string; jobId: string; deliveryId: string; epoch: number },
): string {
  return createHmac('sha256', linkSecret)
    .update(`delivery\0${firmId}\0${jobId}\0${deliveryId}\0${epoch}`)
    .digest('base64url');
}
