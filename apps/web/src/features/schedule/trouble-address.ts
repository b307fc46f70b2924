import type { JobRows } from '@farlug/contract/rows';
import type { Trouble } from '../../workers/results.ts';
import type { ScheduleAddress } from './hooks/use-schedule-address.ts';

/** Where the row of a trouble is put right; null where the schedule has no place for it. */
export function troubleAddress(
  rows: JobRows,
  at: NonNullable<Trouble['at']>,
  to: ScheduleAddress['to'],
): string | null {
  if (at.table === 'circuit') return to({ circuit: at.row });
  if (at.table === 'panel') return to({ panel: at.row });
  if (at.table === 'bus') {
    const panel = [...rows.panel.values()].find((one) => one.busId === at.row);
    return panel ? to({ panel: panel.id }) : null;
  }
  if (at.table !== 'run' && at.table !== 'load') return null;
  const circuitId = rows[at.table].get(at.row)?.circuitId;
  return circuitId ? to({ circuit: circuitId }) : null;
}
