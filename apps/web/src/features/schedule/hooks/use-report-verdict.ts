import { reportVerdict } from '@farlug/contract/routes';
import { useEffect, useRef } from 'react';
import { useOpenJob, useReplica } from '../../../job/open-job.tsx';
import { useResult } from '../../../job/use-result.ts';
import { call } from '../../../lib/call.ts';
import { verdictOf } from '../verdict-of-result.ts';

const SETTLED_MS = 1_500;

/** Tells the job list what the default scenario says of the job as it is saved, once things have come to rest. */
export function useReportVerdict(): void {
  const { firm, job, archived } = useOpenJob();
  const { headSeq, settled } = useReplica();
  const { result, solving } = useResult();
  const told = useRef<string | null>(null);
  const verdict = settled && !solving && !archived && result ? verdictOf(result, headSeq) : null;
  const text = verdict && JSON.stringify(verdict);
  useEffect(() => {
    if (text === null || told.current === text) return;
    const timer = setTimeout(async () => {
      const sent = await call(reportVerdict, { params: { firm, job }, body: JSON.parse(text) });
      if (sent.ok) told.current = text;
    }, SETTLED_MS);
    return () => clearTimeout(timer);
  }, [firm, job, text]);
}
