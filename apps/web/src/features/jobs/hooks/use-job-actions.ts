import { newId } from '@farlug/contract/edit';
import { archiveJob, createJob, deleteJob, duplicateJob } from '@farlug/contract/routes';
import type { JobRowLists } from '@farlug/contract/rows';
import { useQueryClient } from '@tanstack/react-query';
import { useMemo } from 'react';
import { call, type Outcome } from '../../../lib/call.ts';
import { jobsKey } from './use-jobs.ts';

interface JobActions {
  create: (rows: JobRowLists) => Promise<Outcome<typeof createJob>>;
  duplicate: (job: string, name: string) => Promise<Outcome<typeof duplicateJob>>;
  archive: (job: string, archived: boolean) => Promise<Outcome<typeof archiveJob>>;
  remove: (job: string) => Promise<Outcome<typeof deleteJob>>;
}

/** What can be done to whole jobs; the list is fetched anew after each. */
export function useJobActions(firm: string): JobActions {
  const cache = useQueryClient();
  return useMemo(() => {
    const after = async <T>(outcome: Promise<T>): Promise<T> => {
      const result = await outcome;
      await cache.invalidateQueries({ queryKey: jobsKey(firm) });
      return result;
    };
    return {
      create: (rows) => after(call(createJob, { params: { firm }, body: { rows } })),
      duplicate: (job, name) =>
        after(call(duplicateJob, { params: { firm, job }, body: { id: newId(), name } })),
      archive: (job, archived) => after(call(archiveJob, { params: { firm, job }, body: { archived } })),
      remove: (job) => after(call(deleteJob, { params: { firm, job } })),
    };
  }, [cache, firm]);
}
