import type { DecisionView } from '@farlug/contract/routes';
import { decisionWord } from '../../../lib/decision-words.ts';
import { formatMoment } from '../../../lib/format.ts';

/** What is on record against this revision. */
export function DecisionList({ decisions }: { decisions: readonly DecisionView[] }) {
  if (decisions.length === 0) return null;
  return (
    <section aria-label="On record">
      <h2 className="mb-1 text-label font-normal text-ink-soft">On record against this revision</h2>
      <ul>
        {decisions.map((decision) => (
          <li key={decision.id} className="border-t border-hair py-2 first:border-t-0">
            <b>{decisionWord(decision.decision)}</b>
            {decision.words && <span>: “{decision.words}”</span>}
            <p className="text-grid text-ink-soft">
              {decision.name}
              {decision.title && `, ${decision.title}`} (unverified), {formatMoment(decision.at)},{' '}
              {decision.via === 'paper'
                ? `from paper, entered by ${decision.enteredBy ?? 'the firm'}`
                : 'by the link'}
            </p>
            {decision.comments && <p className="mt-1 text-grid whitespace-pre-line">{decision.comments}</p>}
          </li>
        ))}
      </ul>
    </section>
  );
}
