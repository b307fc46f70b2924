import type { Job } from '@farlug/solver/job';
import type { JobRows } from '../rows/index.ts';
import type { JobIndex } from './job-index.ts';
import type { Assumed } from './left-out.ts';

/** Every value of the job that nobody stated: marked wherever it counts. */
export function assumedValues(rows: JobRows, index: JobIndex, job: Job): Assumed[] {
  const found: Assumed[] = [];
  index.runs.forEach((id, i) => {
    const row = rows.run.get(id)!;
    const run = job.runs[i]!;
    const add = (field: Assumed['field'], value: string, reason: string) =>
      found.push({ table: 'run', row: id, code: row.code, circuitId: row.circuitId, field, value, reason });
    if (row.lengthState === 'assumed')
      add('length', row.length ?? '', 'The length is assumed, not measured.');
    const fromTable = run.size !== null && run.ohms === null && !/mm(2|²)$/.test(run.size);
    if (row.raceway === null && fromTable && job.frequency > 0)
      add('raceway', run.raceway, 'The raceway is not stated: PVC is taken.');
  });
  index.loads.forEach((id, i) => {
    const row = rows.load.get(id)!;
    const load = job.loads[i]!;
    const add = (field: Assumed['field'], value: string, reason: string) =>
      found.push({ table: 'load', row: id, code: row.code, circuitId: row.circuitId, field, value, reason });
    if (row.sizeAssumed) add('size', row.size ?? '', 'The load is assumed, not stated.');
    if (job.frequency === 0) return;
    if (load.powerFactor === null) {
      const value = load.hp === null ? '1' : '0.85';
      add('powerFactor', value, `The power factor is not stated: ${value} is taken.`);
    } else if (row.powerFactorAssumed)
      add('powerFactor', row.powerFactor ?? '', 'The power factor is assumed from the kind of load.');
  });
  return found;
}
