import { bridgesOf } from './bridges.ts';
import type { Report } from './draft.ts';
import type { Job } from './schema.ts';

/**
 * Runs with a diversity factor that are not the only way to their far side: such a run must be a bridge with every
 * source that is on upon one side.
 */
export function checkDiversity(job: Job, report: Report): void {
  const wanted = job.runs.flatMap((run, i) => (run.demand < 1 && !run.open ? [i] : []));
  if (wanted.length === 0) return;
  const { bridges, sourcesBelow, sourcesInPiece } = bridgesOf(job);
  for (const i of wanted) {
    const run = job.runs[i]!;
    const below = bridges.get(i);
    const total = sourcesInPiece.get(run.from) ?? 0;
    const sources = below === undefined ? 0 : sourcesBelow.get(below)!;
    if (below !== undefined && (sources === 0 || sources === total)) continue;
    report(
      `runs[${i}].demand`,
      `must be 1 where the run is not the only way to its far side; "${run.id}" is ${below === undefined ? 'part of a loop' : 'fed from both ends'}`,
    );
  }
}
