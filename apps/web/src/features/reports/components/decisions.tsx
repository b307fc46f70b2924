import type { DecisionView } from '@farlug/contract/routes';
import { decisionWord } from '../../../lib/decision-words.ts';
import { formatMoment } from '../../../lib/format.ts';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';

export function Decisions({ decisions, letter }: { decisions: readonly DecisionView[]; letter: string }) {
  if (decisions.length === 0) return null;
  return (
    <Table stacked caption={`Decisions on revision ${letter}`} className="mt-3">
      <thead>
        <tr>
          <Th>Decision</Th>
          <Th>Name as typed, unverified</Th>
          <Th>When and how</Th>
          <Th>Comments</Th>
        </tr>
      </thead>
      <tbody>
        {decisions.map((decision) => (
          <tr key={decision.id}>
            <RowHead>
              {decisionWord(decision.decision)}
              {decision.words && <span className="block font-normal">“{decision.words}”</span>}
            </RowHead>
            <Td label="Name as typed, unverified">
              {decision.name}
              {decision.title && <span className="block text-label text-ink-soft">{decision.title}</span>}
            </Td>
            <Td label="When and how">
              {formatMoment(decision.at)}
              <span className="block text-label text-ink-soft">
                {decision.via === 'paper'
                  ? `from paper, entered by ${decision.enteredBy ?? 'somebody of the firm'}`
                  : `by the link of ${decision.recipient ?? 'an inspector'}`}
              </span>
            </Td>
            <Td label="Comments" className="min-w-48 whitespace-pre-line">
              {decision.comments}
            </Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
