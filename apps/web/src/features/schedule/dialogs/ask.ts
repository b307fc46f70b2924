import type { FeedValue } from './feed-choices.ts';

/** What the person asked to add, change or delete. An `id` of null adds. */
export type ScheduleAsk =
  | { kind: 'panel'; id: string | null; feed?: FeedValue }
  | { kind: 'duplicate-panel'; id: string }
  | { kind: 'delete-panel'; id: string }
  | { kind: 'transformer'; id: string | null; feed?: FeedValue }
  | { kind: 'feeder'; id: string | null; feed?: FeedValue }
  | { kind: 'source' };
