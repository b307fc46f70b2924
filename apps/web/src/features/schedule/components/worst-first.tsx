import { digitsAgainst, formatFixed } from '@farlug/solver/units';
import { Link } from 'react-router-dom';
import { DropBar } from '../../../ui/drop-bar.tsx';
import { EmptyState } from '../../../ui/empty-state.tsx';
import { Scroller } from '../../../ui/scroller.tsx';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import { Verdict } from '../../../ui/verdict.tsx';
import type { JobResult, LoadFigures, RunFigures } from '../../../workers/results.ts';
import type { JobSchedule } from '../hooks/use-schedule-view.ts';
import { loadsWorstFirst, runsWorstFirst } from '../worst-first.ts';

interface WorstFirstProps {
  what: 'loads' | 'runs';
  result: JobResult | null;
  schedule: JobSchedule;
  /** The address that shows a circuit beside its panel. */
  to: (circuitId: string) => string;
}

/** Every load, or every run, of the job with its figures and reasons, the worst at the top. */
export function WorstFirst({ what, result, schedule, to }: WorstFirstProps) {
  if (!result || (result.loads.size === 0 && result.runs.size === 0))
    return (
      <EmptyState title="Nothing computed yet">Rows with a length, a size and a load appear here.</EmptyState>
    );
  return (
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
    <Table caption="Loads, worst first">
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
            <Td numeric>{percent(load.totalPercent, load.limitPercent)}</Td>
            <Td className="w-24">
              {load.feederPercent !== null && load.branchPercent !== null && (
                <DropBar
                  feederPercent={load.feederPercent}
                  branchPercent={load.branchPercent}
                  limitPercent={load.limitPercent}
                />
              )}
            </Td>
            <Td numeric>{percent(load.feederPercent)}</Td>
            <Td numeric>{percent(load.branchPercent)}</Td>
            <Td numeric>{load.volts === null ? '' : formatFixed(load.volts, 1)}</Td>
            <Td numeric>{load.dropVolts === null ? '' : formatFixed(load.dropVolts, 2)}</Td>
            <Td>{load.reasons.join(', ')}</Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function Runs({ runs, schedule, to }: PartProps & { runs: readonly RunFigures[] }) {
  return (
    <Table caption="Runs, worst first">
      <thead>
        <tr>
          <Th>Run</Th>
          <Th>Verdict</Th>
          <Th numeric>Drop %</Th>
          <Th numeric>Drop V</Th>
          <Th numeric>Amps, L1 L2 L3 N</Th>
          <Th numeric>Loss W</Th>
        </tr>
      </thead>
      <tbody>
        {runs.map((run) => (
          <tr key={run.row}>
            <RowHead>
              {run.id}{' '}
              {run.circuitId !== null && (
                <span className="font-normal">
                  <Name circuitId={run.circuitId} row={run.row} id={run.id} schedule={schedule} to={to} />
                </span>
              )}
            </RowHead>
            <Td>
              <Verdict kind={run.shown} />
            </Td>
            <Td numeric>{percent(run.dropPercent)}</Td>
            <Td numeric>{run.dropVolts === null ? '' : formatFixed(run.dropVolts, 2)}</Td>
            <Td numeric>
              {run.amps === null
                ? ''
                : Object.values(run.amps)
                    .map((amps) => formatFixed(amps, 1))
                    .join('  ')}
            </Td>
            <Td numeric>{run.lossWatts === null ? '' : formatFixed(run.lossWatts, 1)}</Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

const percent = (value: number | null, limit: number | null = null): string =>
  value === null ? '' : formatFixed(value, digitsAgainst(value, limit));
