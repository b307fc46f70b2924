import type { JobSummary } from '@farlug/contract/routes';
import { formatCount, formatPercent } from '../../../lib/format.ts';
import type { VerdictKind } from '../../../ui/glyph.tsx';
import { Verdict, VerdictFigure } from '../../../ui/verdict.tsx';

type JobFigures = NonNullable<JobSummary['verdict']>;

const worstKind = ({ over, near, within }: JobFigures): VerdictKind =>
  over > 0 ? 'over' : near > 0 ? 'near' : within > 0 ? 'within' : 'unjudged';

/** The worst drop of a job. */
export function WorstDrop({ job }: { job: JobSummary }) {
  if (!job.verdict || job.verdict.worstPercent === null) return <Verdict kind="unjudged" />;
  return (
    <VerdictFigure kind={worstKind(job.verdict)}>{formatPercent(job.verdict.worstPercent)}</VerdictFigure>
  );
}

/** How many are over, near, and left out; figures older than the job say so. */
export function JobCounts({ job }: { job: JobSummary }) {
  const { verdict } = job;
  if (!verdict) return <span className="text-ink-soft">Open it to have it judged</span>;
  if (worstKind(verdict) === 'unjudged' && verdict.leftOut === 0)
    return <span className="text-ink-soft">Nothing to judge yet</span>;
  const stale = verdict.atSeq < job.headSeq;
  return (
    <span className="flex flex-wrap gap-x-4">
      {worstKind(verdict) !== 'unjudged' && (
        <VerdictFigure kind={verdict.over > 0 ? 'over' : 'within'} word="">
          {verdict.over} over
        </VerdictFigure>
      )}
      {verdict.near > 0 && (
        <VerdictFigure kind="near" word="">
          {verdict.near} near
        </VerdictFigure>
      )}
      {verdict.leftOut > 0 && (
        <VerdictFigure kind="unjudged" word="">
          {verdict.leftOut} left out
        </VerdictFigure>
      )}
      {stale && (
        <span className="text-label text-ink-soft">
          as of {formatCount(job.headSeq - verdict.atSeq, 'change')} ago
        </span>
      )}
    </span>
  );
}
