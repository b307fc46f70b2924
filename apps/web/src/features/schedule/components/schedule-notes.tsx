import type { PanelView } from '@farlug/contract/schedule';
import type { ReactNode } from 'react';
import { AssumedMark } from '../../../ui/assumed-mark.tsx';
import type { JobResult } from '../../../workers/results.ts';
import { assumedWords } from '../assumed-words.ts';

interface ScheduleNotesProps {
  panel: PanelView | null;
  result: JobResult | null;
  /** What was done or refused last, in words. */
  said: string | null;
  leftOut: ReactNode;
  next: ReactNode;
}

/** Under the schedule: what its marks mean, what is assumed, what was just done, what comes next. */
export function ScheduleNotes({ panel, result, said, leftOut, next }: ScheduleNotesProps) {
  const assumed = result && panel && assumedWords(result.assumed, panel);
  return (
    <div className="flex min-h-8 flex-none flex-wrap items-center gap-x-5 border-t border-rule px-4 py-1 text-label text-ink-soft">
      {assumed && (
        <span>
          <AssumedMark>assumed</AssumedMark> {assumed} in {panel?.code}
        </span>
      )}
      <span className="hidden desk:inline">Bar: feeder, then branch; tick at the limit</span>
      <span role="status" className="text-ink">
        {said}
      </span>
      <span className="ml-auto flex flex-wrap gap-x-5">
        {leftOut}
        {next}
      </span>
    </div>
  );
}
