import { reportVerdict } from '@farlug/contract/routes';
import { useQueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { useOpenJob, useReplica } from '../../../job/open-job.tsx';
import { useResult } from '../../../job/use-result.ts';
import { ask } from '../../../lib/call.ts';

const SETTLED_MS = 1_500;

/** Tells the job list what the default scenario says of the job as it is saved, once things have come to rest. */
export function useReportVerdict(): void {
  const { firm, job, archived } = useOpenJob();
  const { settled, headSeq } = useReplica();
  const { result, solving } = useResult();
  const client = useQueryClient();
  useEffect(() => {
    if (archived || !settled || solving || result?.state !== 'solved' || result.scenario !== 'each-circuit')
      return;
    const { counts, worst, solverVersion, leftOutCount } = result;
    const timer = setTimeout(() => {
      const body = {
        atSeq: headSeq,
        solverVersion,
        worstPercent: worst?.worst.totalPercent ?? null,
        over: counts.over + counts.rise,
        near: counts.near,
        within: counts.within,
        leftOut: leftOutCount,
      };
      ask(reportVerdict, { params: { firm, job }, body }).then(
        () => client.invalidateQueries({ queryKey: ['jobs', firm] }),
        () => {}, // The list shows the verdict as out of date until the next one arrives.
      );
    }, SETTLED_MS);
    return () => clearTimeout(timer);
  }, [firm, job, archived, settled, headSeq, result, solving, client]);
}
