import { type JobSummary, listJobs } from '@farlug/contract/routes';
import { keepPreviousData, type UseQueryResult, useQuery } from '@tanstack/react-query';
import { ask } from '../../../lib/call.ts';

export const jobsKey = (firm: string) => ['firm', firm, 'jobs'] as const;

/** The jobs of a firm that match, the one changed last first. */
export function useJobs(firm: string, search: string, archived: boolean): UseQueryResult<JobSummary[]> {
  return useQuery({
    queryKey: [...jobsKey(firm), { search, archived }],
    queryFn: async ({ signal }) => {
      const query = { ...(search ? { search } : {}), archived: archived ? 'yes' : 'no' } as const;
      return (await ask(listJobs, { params: { firm }, query, signal })).jobs;
    },
    placeholderData: keepPreviousData,
    refetchOnMount: 'always',
  });
}
