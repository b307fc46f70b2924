import type { Job } from '@farlug/solver/job';
import { busCodes } from '../src/job/index.ts';

/**
 * A job with its implied parts written out, so that two jobs that say the same are equal: buses that only other
 * entries name, empty limits, the order of readings and sizes. What only panels show is compared apart.
 */
export function spelledOut(job: Job): Omit<Job, 'panels'> {
  const { panels: _, ...network } = job;
  const listed = new Map(job.buses.map((bus) => [bus.id, bus]));
  const { rating } = job.limits;
  return {
    ...network,
    limits: {
      ...job.limits,
      byClass: Object.fromEntries(
        Object.entries(job.limits.byClass).filter(([, own]) =>
          Object.values(own ?? {}).some((v) => v !== null),
        ),
      ),
      rating: rating && (rating.low !== null || rating.high !== null) ? rating : null,
    },
    buses: busCodes(job).map((id) => listed.get(id) ?? { id, name: null, kind: 'junction' }),
    runs: job.runs.map((run) => ({ ...run, circuit: null })),
    conductorRows: [...job.conductorRows].sort((a, b) => (a.name < b.name ? -1 : 1)),
    readings: [...job.readings].sort((a, b) => (a.at < b.at ? -1 : 1)),
  };
}

/** The panels of `after` with what `before` does not list taken away. */
export function panelsAsListed(after: Job, before: Job): Job['panels'] {
  const listed = new Map(before.panels.map((panel) => [panel.bus, panel]));
  return after.panels
    .filter((panel) => listed.has(panel.bus))
    .map((panel) => ({
      ...panel,
      circuits: panel.circuits.filter((circuit) =>
        listed
          .get(panel.bus)!
          .circuits.some((one) => one.run === circuit.run && same(one.spaces, circuit.spaces)),
      ),
    }));
}

const same = (a: readonly number[], b: readonly number[]) =>
  a.length === b.length && a.every((v, i) => v === b[i]);
