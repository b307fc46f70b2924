import { listRevisions } from '@farlug/contract/routes';
import { type UseQueryResult, useQuery } from '@tanstack/react-query';
import { type Answer, ask } from '../../../lib/call.ts';

export const revisionsKey = (firm: string, job: string) => ['firm', firm, 'job', job, 'revisions'] as const;
type Revisions = Answer<typeof listRevisions>;

const UNDER_WAY_MS = 1500;
const AT_REST_MS = 20_000;

const underWay = (list: Revisions) =>
  list.revisions.some(
    (revision) =>
      revision.pdf === 'waiting' ||
      revision.deliveries.some((delivery) => delivery.state === 'queued' || delivery.state === 'sending'),
  );

/** The revisions of a job, newest first; asked for often while a PDF or a message is on its way. */
export function useRevisions(firm: string, job: string): UseQueryResult<Revisions> {
  return useQuery({
    queryKey: revisionsKey(firm, job),
    queryFn: async ({ signal }) => {
      const list = await ask(listRevisions, { params: { firm, job }, signal });
      return { ...list, revisions: list.revisions.toSorted((a, b) => b.no - a.no) };
    },
    refetchInterval: (query) => (query.state.data && underWay(query.state.data) ? UNDER_WAY_MS : AT_REST_MS),
  });
}
