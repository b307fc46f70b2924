import { digitsAgainst, formatFixed } from '@farlug/solver/units';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { DropBar } from '../../../ui/drop-bar.tsx';
import { EmptyState } from '../../../ui/empty-state.tsx';
import { PageHeading } from '../../../ui/page-heading.tsx';
import { Scroller } from '../../../ui/scroller.tsx';
import { Segmented } from '../../../ui/segmented.tsx';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import { Verdict } from '../../../ui/verdict.tsx';
import type { JobResult, LoadFigures, RunFigures } from '../../../workers/results.ts';
import type { JobSchedule } from '../hooks/use-schedule-view.ts';
import { loadsWorstFirst, runsWorstFirst } from '../worst-first.ts';

interface WorstFirstProps {
  what: 'loads' | 'runs';
  result: JobResult | null;
  schedule: JobSchedule;
  actions: ReactNode;
  onWhat: (what: 'loads' | 'runs') => void;
  /** The address that shows a circuit beside its panel. */
  to: (circuitId: string) => string;
}

const CHOICES = [
  { value: 'loads', label: 'Loads' },
  { value: 'runs', label: 'Runs' },
] as const;

/** Every load, or every run, of the job with its figures and reasons, the worst at the top. */
export function WorstFirst({ what, result, schedule, actions, onWhat, to }: WorstFirstProps) {
  const empty = !result || (result.loads.size === 0 && result.runs.size === 0);
  return (
    <>
      <PageHeading
        title="Worst first"
        aside="the whole job"
        detail="A load is judged by its own worst turn; a run by what lies beyond it."
        actions={
          <>
            <Segmented label="Loads or runs" value={what} onValue={onWhat} choices={CHOICES} />
            {actions}
          </>
        }
      />
      {empty ? (
        <div className="min-h-0 flex-1 border-t border-ink bg-sheet">
          <EmptyState title="Nothing computed yet">
            Rows with a length, a size and a load appear here.
          </EmptyState>
        </div>
      ) : (
        <Scroller
          label="Worst first, scrolls"
          className="min-h-0 flex-1 overflow-auto border-t border-ink bg-sheet"
        >
          {what === 'loads' ? (
            <Loads loads={loadsWorstFirst(result)} schedule={schedule} to={to} />
          ) : (
            <Runs runs={runsWorstFirst(result)} schedule={schedule} to={to} />
          )}
        </Scroller>
      )}
    </>
  );
}

interface PartProps {
  schedule: JobSchedule;
  to: (circuitId: string) => string;
}

function Name({
  circuitId,
  row,
  id,
  schedule,
  to,
}: PartProps & { circuitId: string | null; row: string; id: string }) {
  if (circuitId === null) return schedule.nameOf(row) === row ? id : schedule.nameOf(row);
  return <Link to={to(circuitId)}>{schedule.nameOf(circuitId)}</Link>;
}

function Loads({ loads, schedule, to }: PartProps & { loads: readonly LoadFigures[] }) {
  return (
    <Table caption="Loads, worst first" stacked>
      <thead>
        <tr>
          <Th>Load</Th>
          <Th>Verdict</Th>
          <Th numeric>Total %</Th>
          <Th>Drop</Th>
          <Th numeric>Feeder %</Th>
          <Th numeric>Branch %</Th>
          <Th numeric>Volts</Th>
          <Th numeric>Drop V</Th>
          <Th>Reasons</Th>
        </tr>
      </thead>
      <tbody>
        {loads.map((load) => (
          <tr key={load.row}>
            <RowHead>
              <Name circuitId={load.circuitId} row={load.row} id={load.id} schedule={schedule} to={to} />
              <span className="ml-1.5 text-label font-normal text-ink-soft">{load.terminals}</span>
            </RowHead>
            <Td>
              <Verdict kind={load.shown} />
            </Td>
            <Td numeric label="Total %">
              {percent(load.totalPercent, load.limitPercent)}
            </Td>
            <Td className="desk:w-24" label="Drop">
              {load.feederPercent !== null && load.branchPercent !== null && (
                <DropBar
                  feederPercent={load.feederPercent}
                  branchPercent={load.branchPercent}
                  limitPercent={load.limitPercent}
                />
              )}
            </Td>
            <Td numeric label="Feeder %">
              {percent(load.feederPercent)}
            </Td>
            <Td numeric label="Branch %">
              {percent(load.branchPercent)}
            </Td>
            <Td numeric label="Volts">
              {load.volts === null ? '' : formatFixed(load.volts, 1)}
            </Td>
            <Td numeric label="Drop V">
              {load.dropVolts === null ? '' : formatFixed(load.dropVolts, 2)}
            </Td>
            <Td label="Reasons">{load.reasons.join(', ')}</Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function Runs({ runs, schedule, to }: PartProps & { runs: readonly RunFigures[] }) {
  return (
    <Table caption="Runs, worst first" stacked>
      <thead>
        <tr>
          <Th>Run</Th>
          <Th>Verdict</Th>
          <Th numeric>Drop %</Th>
          <Th numeric>Drop V</Th>
          <Th numeric>Amps</Th>
          <Th numeric>Loss W</Th>
        </tr>
      </thead>
      <tbody>
        {runs.map((run) => (
          <tr key={run.row}>
            <RowHead>
              {run.circuitId === null || schedule.circuit(run.circuitId)?.code !== run.id
                ? `${run.id} `
                : null}
              {run.circuitId !== null && (
                <Name circuitId={run.circuitId} row={run.row} id={run.id} schedule={schedule} to={to} />
              )}
            </RowHead>
            <Td>
              <Verdict kind={run.shown} />
            </Td>
            <Td numeric label="Drop %">
              {percent(run.dropPercent)}
            </Td>
            <Td numeric label="Drop V">
              {run.dropVolts === null ? '' : formatFixed(run.dropVolts, 2)}
            </Td>
            <Td numeric label="Amps">
              {Object.entries(run.amps ?? {}).map(([line, amps]) => (
                <span key={line} className="ml-3 first:ml-0">
                  <span className="text-label text-ink-soft">{line} </span>
                  {formatFixed(amps, 1)}
                </span>
              ))}
            </Td>
            <Td numeric label="Loss W">
              {run.lossWatts === null ? '' : formatFixed(run.lossWatts, 1)}
            </Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

const percent = (value: number | null, limit: number | null = null): string =>
  value === null ? '' : formatFixed(value, digitsAgainst(value, limit));
