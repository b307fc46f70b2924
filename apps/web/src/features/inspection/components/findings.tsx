import type { InspectionView } from '@farlug/contract/routes';
import { formatPercentAgainst } from '@farlug/solver/units';
import { useState } from 'react';
import { formatCount } from '../../../lib/format.ts';
import { Button } from '../../../ui/button.tsx';
import { Verdict, VerdictFigure, VerdictSentence } from '../../../ui/verdict.tsx';
import { type Finding, reasonsOf, runOf, verdictOf } from '../finding-words.ts';

const SHOWN_FIRST = 8;

interface FindingsProps {
  view: InspectionView;
  /** Takes a circuit up in the comments of the decision. */
  onComment: (place: string) => void;
}

/** The verdict of the report in one sentence, then what exceeds or is near a limit, the worst first. */
export function Findings({ view, onComment }: FindingsProps) {
  const [all, setAll] = useState(false);
  const { digest, input } = view;
  const { exceed, lead, rest } = verdictOf(digest);
  const shown = all ? digest.findings : digest.findings.slice(0, SHOWN_FIRST);
  const more = digest.findings.length - shown.length;
  return (
    <>
      <section aria-label="Verdict">
        <VerdictSentence kind={exceed > 0 ? 'over' : 'within'} lead={lead}>
          {rest}
        </VerdictSentence>
        <p className="mt-1 text-grid text-ink-soft">
          {input.job.limits.force === 'recommendation'
            ? 'A recommendation: a miss is not a violation.'
            : 'Limits that the adopted code makes mandatory, as the firm states it.'}
        </p>
      </section>
      {digest.findings.length > 0 && (
        <section aria-label="What exceeds or is near">
          <h2 className="mb-1 text-label font-normal text-ink-soft">
            What exceeds or is near a limit, worst first
          </h2>
          <ul>
            {shown.map((finding) => (
              <Line
                key={`${finding.place} ${finding.load}`}
                finding={finding}
                view={view}
                onComment={onComment}
              />
            ))}
          </ul>
          {more > 0 && (
            <Button look="bare" onClick={() => setAll(true)}>
              {formatCount(more, 'more circuit')}
            </Button>
          )}
        </section>
      )}
    </>
  );
}

function Line({ finding, view, onComment }: FindingsProps & { finding: Finding }) {
  const { place, serves, shown, totalPercent, limitPercent } = finding;
  const run = runOf(finding, view.input);
  return (
    <li className="border-t border-hair py-2 first:border-t-0">
      <div className="flex items-baseline gap-3">
        <span className="min-w-0">
          <VerdictFigure kind={shown} bold>
            {place}
          </VerdictFigure>{' '}
          {serves}
        </span>
        {totalPercent === null ? (
          <Verdict kind={shown} className="ml-auto" />
        ) : (
          <span
            className={
              shown === 'near' ? 'ml-auto whitespace-nowrap' : 'ml-auto font-bold whitespace-nowrap text-over'
            }
          >
            {formatPercentAgainst(totalPercent, limitPercent)}
          </span>
        )}
      </div>
      <p className={shown === 'near' ? 'text-grid text-ink-soft' : 'text-grid'}>
        {reasonsOf(finding).join(', ')}
      </p>
      <div className="flex items-baseline gap-4 text-grid text-ink-soft">
        {run}
        <Button
          look="bare"
          className="ml-auto"
          aria-label={`Comment on ${place}`}
          onClick={() => onComment(place)}
        >
          Comment
        </Button>
      </div>
    </li>
  );
}
