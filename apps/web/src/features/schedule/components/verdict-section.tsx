import type { Row } from '@farlug/contract/rows';
import { formatLimit, formatPercentAgainst } from '@farlug/solver/units';
import { SheetSection } from '../../../ui/side-sheet.tsx';
import { VerdictSentence } from '../../../ui/verdict.tsx';
import type { CircuitFigures } from '../../../workers/results.ts';
import { forceSentence, verdictSentence } from '../verdict-words.ts';

/** The verdict of a circuit's worst load as a sentence, and what force the limit has that it misses. */
export function VerdictSection({ figures, job }: { figures: CircuitFigures; job: Row<'job'> }) {
  const { worst, shown } = figures;
  const total = worst.totalPercent;
  const sentence = verdictSentence(
    shown,
    worst.reasons,
    total === null ? '' : formatPercentAgainst(total, worst.limitPercent),
    worst.limitPercent === null ? null : formatLimit(worst.limitPercent),
  );
  const force = forceSentence(shown, job.limitForce, job.limitBasis);
  return (
    <SheetSection>
      <VerdictSentence kind={shown} lead={sentence.lead}>
        {sentence.rest}
      </VerdictSentence>
      {force && <p className="mt-1 text-label text-ink-soft">{force}</p>}
    </SheetSection>
  );
}
