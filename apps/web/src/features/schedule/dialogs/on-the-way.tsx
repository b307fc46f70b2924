import type { JobRows, Row } from '@farlug/contract/rows';
import { panelTree } from '@farlug/contract/schedule';
import { Button } from '../../../ui/button.tsx';
import type { ScheduleAsk } from './ask.ts';

interface OnTheWayProps {
  rows: JobRows;
  panelId: string;
  onAsk: (ask: ScheduleAsk) => void;
}

/** What else leads to the panel: runs before a transformer, the transformer, and runs beside its feeder. */
export function OnTheWay({ rows, panelId, onAsk }: OnTheWayProps) {
  const fed = panelTree(rows).find((node) => node.panel.id === panelId)?.fedFrom;
  const runs = (fed?.runIds ?? []).slice(0, -1).flatMap((id) => rows.run.get(id) ?? []);
  const transformers = (fed?.transformerIds ?? []).flatMap((id) => rows.transformer.get(id) ?? []);
  const others = otherRuns(rows, panelId, fed?.runIds ?? []);
  const runButton = (run: Row<'run'>) => (
    <Button key={run.id} look="bare" onClick={() => onAsk({ kind: 'feeder', id: run.id })}>
      run {run.code}
    </Button>
  );
  if (runs.length + transformers.length + others.length === 0) return null;
  return (
    <div className="flex flex-wrap items-center gap-x-3 text-grid text-ink-soft">
      {runs.length + transformers.length > 0 && <span>On the way to it:</span>}
      {runs.map(runButton)}
      {transformers.map((one) => (
        <Button key={one.id} look="bare" onClick={() => onAsk({ kind: 'transformer', id: one.id })}>
          transformer {one.code}
        </Button>
      ))}
      {others.length > 0 && <span>Other runs at it:</span>}
      {others.map(runButton)}
    </div>
  );
}

/** Runs that meet the panel without a row of its own schedule: a second feeder, a tie. */
function otherRuns(rows: JobRows, panelId: string, onTheWay: readonly string[]): Row<'run'>[] {
  const busId = rows.panel.get(panelId)?.busId;
  return [...rows.run.values()].filter(
    (run) =>
      (run.toBusId === busId || (run.fromBusId === busId && run.circuitId === null)) &&
      run.kind !== 'branch' &&
      !onTheWay.includes(run.id),
  );
}
