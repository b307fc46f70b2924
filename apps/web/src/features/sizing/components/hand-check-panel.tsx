import type { HandCheck } from '@farlug/solver/hand-check';
import { formatFixed } from '@farlug/solver/units';
import { useState } from 'react';
import { useAnswer } from '../../../job/use-result.ts';
import { SheetSection } from '../../../ui/side-sheet.tsx';

/** The formula that a person would work by pencil beside the nodal result, and why the two part. */
export function HandCheckPanel({ run }: { run: string }) {
  const answer = useAnswer({ kind: 'hand-check', runs: [run] });
  if (answer === null) return null;
  return (
    <SheetSection title="Hand check">
      {answer.kind === 'none' ? (
        <p className="text-grid text-ink-soft">{answer.reason}</p>
      ) : (
        answer.checks.map(({ row, check }) => <HandCheckText key={row} check={check} />)
      )}
    </SheetSection>
  );
}

/** The hand checks of many runs, folded until they are asked for. */
export function HandCheckList({ runs }: { runs: string[] }) {
  const [open, setOpen] = useState(false);
  const answer = useAnswer(open && runs.length > 0 ? { kind: 'hand-check', runs } : null);
  return (
    <details
      className="border-t border-rule px-4 py-2"
      onToggle={(event) => setOpen((event.target as HTMLDetailsElement).open)}
    >
      <summary className="tap content-center text-grid text-copper">Hand check of each run</summary>
      {answer?.kind === 'none' && <p className="text-grid text-ink-soft">{answer.reason}</p>}
      {answer?.kind === 'hand-check' &&
        answer.checks.map(({ row, check }) => (
          <section key={row} className="border-b border-hair py-2">
            <h3 className="text-grid font-bold">{check.runId}</h3>
            <HandCheckText check={check} />
          </section>
        ))}
    </details>
  );
}

function HandCheckText({ check }: { check: HandCheck }) {
  if (!check.ok)
    return (
      <p className="text-grid text-ink-soft">
        {check.runId}: {check.reason}
      </p>
    );
  const { hand, byCircularMils, nodal, difference, reasons, wire, constants } = check;
  return (
    <div className="text-grid">
      <p className="text-label text-ink-soft">
        {wire}. {constants}
      </p>
      <p className="mt-1 overflow-x-auto font-code text-label whitespace-pre">{`${hand.formula}\n${hand.filled}`}</p>
      <dl className="mt-1 grid grid-cols-[minmax(0,1fr)_auto_auto] gap-x-4">
        <Result word="By hand" volts={hand.volts} percent={hand.percent} />
        {byCircularMils && (
          <Result word="By 2·K·I·D/cmil" volts={byCircularMils.volts} percent={byCircularMils.percent} />
        )}
        <Result word={`Node equations, ${nodal.pair}`} volts={nodal.volts} percent={nodal.percent} strong />
      </dl>
      {reasons.length > 0 && (
        <p className="mt-1 text-label text-ink-soft">
          {difference.percent >= 0 ? '+' : '−'}
          {formatFixed(Math.abs(difference.percent), 2)} %: {reasons.map(({ words }) => words).join('; ')}.
        </p>
      )}
    </div>
  );
}

function Result({
  word,
  volts,
  percent,
  strong = false,
}: {
  word: string;
  volts: number;
  percent: number;
  strong?: boolean;
}) {
  return (
    <>
      <dt className={strong ? 'font-bold' : 'text-ink-soft'}>{word}</dt>
      <dd className="text-right">{formatFixed(volts, 2)} V</dd>
      <dd className={strong ? 'text-right font-bold' : 'text-right'}>{formatFixed(percent, 2)} %</dd>
    </>
  );
}
