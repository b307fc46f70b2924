import type { CircuitView } from '@farlug/contract/schedule';
import { digitsAgainst, formatFixed } from '@farlug/solver/units';
import { AssumedMark } from '../../../ui/assumed-mark.tsx';
import { cx } from '../../../ui/cx.ts';
import { DropBar } from '../../../ui/drop-bar.tsx';
import { MissingBox } from '../../../ui/missing-box.tsx';
import { Verdict } from '../../../ui/verdict.tsx';
import type { CircuitFigures, PanelFigures } from '../../../workers/results.ts';
import { breakerText, type GridColumn, lineText, spacesText, wireText } from '../columns.ts';

export interface CellContext {
  circuit: CircuitView;
  figures: CircuitFigures | null;
  /** Amps of the circuit's first run in its own worst turn. */
  amps: number | null;
  leftOut: string | null;
  racewayAssumed: boolean;
  /** Of the panel that it feeds. */
  feeds: PanelFigures | null;
}

/** What a cell shows: text as typed, figures as computed, a box where something is missing. */
export function CircuitCell({ column, ...cell }: CellContext & { column: GridColumn }) {
  return column.field === null ? (
    <Computed column={column} {...cell} />
  ) : (
    <TypedCell column={column} {...cell} />
  );
}

function TypedCell({ column, circuit, racewayAssumed }: CellContext & { column: GridColumn }) {
  const field = column.field!;
  const view = circuit.fields[field];
  if (view.draft)
    return (
      <span className="border border-dashed border-over px-1 text-over" title="not understood; kept as typed">
        {view.text}
        <span className="sr-only"> not understood</span>
      </span>
    );
  if (view.text === '' && circuit.next?.field === field)
    return <MissingBox what={column.label.toLowerCase()} />;
  if (field === 'spaces') return spacesText(circuit);
  if (field === 'breaker') return breakerText(circuit);
  if (field === 'description')
    return (
      <>
        {view.text}
        {circuit.fields.room.text && !column.plain && (
          <span className="ml-1.5 text-label text-ink-soft">{circuit.fields.room.text}</span>
        )}
      </>
    );
  if (field === 'size' && column.label === 'Wire') {
    const raceway = circuit.fields.raceway.text;
    return (
      <>
        {wireText(circuit)}{' '}
        {racewayAssumed ? (
          <span className="text-label text-ink-soft">
            <AssumedMark why="the raceway is not stated: PVC is taken">pvc</AssumedMark>
          </span>
        ) : (
          <span className="text-label text-ink-soft">{raceway}</span>
        )}
      </>
    );
  }
  if (view.assumed) return <AssumedMark>{view.text}</AssumedMark>;
  return view.text;
}

function Computed({ column, circuit, figures, amps, leftOut, feeds }: CellContext & { column: GridColumn }) {
  if (column.key === 'line') return <span className="text-ink-soft">{lineText(circuit)}</span>;
  if (column.key === 'amps')
    return amps === null ? null : <span className="text-ink-soft">{formatFixed(amps, 1)}</span>;
  if (column.key === 'verdict') {
    if (leftOut !== null)
      return (
        <span title={leftOut}>
          <Verdict kind="unjudged" word="left out" />
        </span>
      );
    if (figures) return <Verdict kind={figures.shown} />;
    if (feeds) return <Verdict kind={feeds.shown} />;
    return circuit.circuit.kind === 'spare' || circuit.circuit.kind === 'reserved' ? (
      <span className="text-ink-soft">{circuit.circuit.kind}</span>
    ) : null;
  }
  if (leftOut !== null) return null;
  if (!figures) return column.key === 'feeder' ? <FeederPart feeds={feeds} /> : null;
  const { feederPercent, branchPercent, totalPercent, limitPercent, reasons } = figures.worst;
  if (column.key === 'bar')
    return feederPercent === null || branchPercent === null ? null : (
      <DropBar feederPercent={feederPercent} branchPercent={branchPercent} limitPercent={limitPercent} />
    );
  const value = { feeder: feederPercent, branch: branchPercent, total: totalPercent }[column.key];
  if (value === null || value === undefined) return null;
  const missed = reasons.find((reason) => reason.startsWith(column.key));
  const limit = missed ? Number(/> ([\d.]+)/.exec(missed)?.[1] ?? Number.NaN) : Number.NaN;
  const digits = Number.isNaN(limit) ? 2 : digitsAgainst(value, limit);
  return (
    <span className={cx(missed ? 'font-bold text-over' : column.key === 'feeder' && 'text-ink-soft')}>
      {formatFixed(value, digits)}
    </span>
  );
}

/** What is dropped up to the panel that a feeder ends at. */
function FeederPart({ feeds }: { feeds: PanelFigures | null }) {
  if (!feeds || feeds.feederPercent === null) return null;
  const missed = feeds.shown === 'over' || feeds.shown === 'rise';
  return (
    <span className={missed ? 'font-bold text-over' : 'text-ink-soft'}>
      {formatFixed(feeds.feederPercent, 2)}
    </span>
  );
}
