import { formatPercent } from '@farlug/solver/units';
import { DropBar } from '../../../ui/drop-bar.tsx';
import { MissingBox } from '../../../ui/missing-box.tsx';
import { Verdict } from '../../../ui/verdict.tsx';
import { breakerText, lineText, spacesText, wireText } from '../columns.ts';
import type { CellContext } from './circuit-cell.tsx';

interface CircuitCardsProps {
  label: string;
  rows: readonly CellContext[];
  onChoose: (circuitId: string) => void;
}

/** On a phone: a card for each circuit; choosing one opens its fields. */
export function CircuitCards({ label, rows, onChoose }: CircuitCardsProps) {
  return (
    <ul aria-label={label} className="border-t border-ink bg-sheet">
      {rows.map(({ circuit, figures, leftOut, feeds }) => (
        <li key={circuit.id} className="border-b border-rule">
          <button
            type="button"
            onClick={() => onChoose(circuit.id)}
            className="block w-full px-4 py-2.5 text-left"
          >
            <span className="flex items-baseline justify-between gap-3">
              <span className="min-w-0 truncate font-bold">
                {spacesText(circuit) || circuit.code}{' '}
                <span className="font-normal">{circuit.fields.description.text}</span>
              </span>
              {leftOut !== null ? (
                <Verdict kind="unjudged" word="left out" />
              ) : figures ? (
                <Verdict kind={figures.shown} />
              ) : feeds ? (
                <Verdict kind={feeds.shown} />
              ) : (
                <span className="text-ink-soft">{circuit.circuit.kind}</span>
              )}
            </span>
            <span className="mt-0.5 flex flex-wrap items-baseline gap-x-3 text-grid text-ink-soft">
              <span>{lineText(circuit)}</span>
              <span>{breakerText(circuit)}</span>
              <span>{wireText(circuit)}</span>
              <span>{circuit.fields.length.text}</span>
              <span>{circuit.fields.load.text}</span>
              {circuit.next && <MissingBox what={circuit.next.field ?? 'value'} />}
            </span>
            {figures && leftOut === null && figures.worst.feederPercent !== null && (
              <span className="mt-1 grid grid-cols-[minmax(0,1fr)_auto] items-center gap-3">
                <DropBar
                  feederPercent={figures.worst.feederPercent}
                  branchPercent={figures.worst.branchPercent ?? 0}
                  limitPercent={figures.worst.limitPercent}
                />
                <span className="text-grid">{formatPercent(figures.worst.totalPercent ?? 0)}</span>
              </span>
            )}
          </button>
        </li>
      ))}
    </ul>
  );
}
