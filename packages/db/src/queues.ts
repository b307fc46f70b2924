import { createHash } from 'node:crypto';

/** The queues of long work. Payloads hold ids only; whoever takes one up reads the rest as the firm that it names. */
export const QUEUES = {
  'render-report': { retryLimit: 2, retryDelay: 5, expireInSeconds: 300 },
  'send-report': { retryLimit: 5, retryDelay: 10, retryBackoff: true, expireInSeconds: 120 },
  'send-account-mail': { retryLimit: 5, retryDelay: 10, retryBackoff: true, expireInSeconds: 120 },
} as const;
export type QueueName = keyof typeof QUEUES;
export const QUEUE_NAMES = Object.keys(QUEUES) as [QueueName, ...QueueName[]];

export interface QueuePayloads {
  'render-report': { firmId: string; jobId: string; revisionId: string };
  'send-report': { firmId: string; jobId: string; deliveryId: string };
  'send-account-mail': { tokenId: string };
}

export const QUEUE_SCHEMA = 'pgboss';

/** pg-boss keeps each queue's work in a partition of this name. */
export function partitionOf(queue: string): string {
  return `j${createHash('sha224').update(queue).digest('hex')}`;
}
