import { radialRuns } from '../job/index.ts';
import type { Core } from '../judge/core.ts';
import { judgedBuses } from '../judge/load-split.ts';

/**
 * Runs whose impedance the drop of a load can depend on, by index. A radial run counts on the way to the load, and on
 * the way to any load whose current follows its voltage, since a longer way there takes less current everywhere. A run
 * in a loop or between sources counts for every load. All others hang aside: what the load draws never comes by.
 */
export function relevantRuns(core: Core): (load: number) => number[] {
  const { job, network } = core;
  const radial = radialRuns(job);
  const always = new Set<number>();
  for (let run = 0; run < job.runs.length; run++)
    if (network.feeding.runLive[run] && !radial.has(run)) always.add(run);
  const onTheWay = (load: number, into: Set<number>): void => {
    const { along } = core.loads[load]!;
    if (along >= 0) into.add(along);
    for (const bus of judgedBuses(core, load))
      for (const step of core.pathTo(bus) ?? []) if (step.kind !== 'transformer') into.add(step.index);
  };
  for (const [load, { served }] of core.loads.entries()) {
    const { behaviour } = job.loads[load]!;
    const follows = behaviour !== 'current' || job.angle === 'local';
    if (served && follows) onTheWay(load, always);
  }
  const known: (number[] | undefined)[] = [];
  return (load) => {
    if (!known[load]) {
      const runs = new Set(always);
      onTheWay(load, runs);
      known[load] = [...runs];
    }
    return known[load];
  };
}
