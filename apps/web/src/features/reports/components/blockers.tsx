import { Link } from 'react-router-dom';
import { formatCount } from '../../../lib/format.ts';
import { MissingBox } from '../../../ui/missing-box.tsx';
import type { JobStanding } from '../job-standing.ts';

const SHOWN_MAX = 12;

/** What stands between the job and a report, each with the way to it. */
export function Blockers({ standing }: { standing: JobStanding }) {
  const { leftOut, unsolvable, archived } = standing;
  if (leftOut.length === 0 && unsolvable === null && !archived) return null;
  return (
    <section aria-label="Before a report can be issued" className="border-b border-rule bg-sheet px-4 py-3">
      <h2 className="text-body">Before a report can be issued</h2>
      {archived && <p className="text-grid">The job is archived. Bring it back in the list of jobs first.</p>}
      {unsolvable !== null && <p className="text-grid text-over">{unsolvable}</p>}
      {leftOut.length > 0 && (
        <>
          <p className="text-grid text-ink-soft">
            {formatCount(leftOut.length, 'row')} of the schedule {leftOut.length === 1 ? 'is' : 'are'} left
            out of every result.
          </p>
          <ul className="mt-1 text-grid">
            {leftOut.slice(0, SHOWN_MAX).map((row) => (
              <li key={row.key} className="flex flex-wrap items-center gap-x-3 border-t border-hair py-1">
                <Link to={row.to} className="inline-flex min-h-11 items-center desk:min-h-0">
                  {row.label}
                </Link>
                <MissingBox what={row.reason} />
              </li>
            ))}
          </ul>
          {leftOut.length > SHOWN_MAX && (
            <p className="text-label text-ink-soft">
              and {leftOut.length - SHOWN_MAX} more, in the Schedule.
            </p>
          )}
        </>
      )}
    </section>
  );
}
