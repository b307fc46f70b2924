import type { JobFile, Solution } from '@farlug/solver/job';
import { SCENARIOS } from '@farlug/solver/job';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { outcomeOf, runs, seeds } from './support/against-dense.ts';
import { randomFrom } from './support/random.ts';
import { randomJob, type Wanted } from './support/random-job.ts';
import { SOLVERS } from './support/solvers.ts';
import { doubled, inOtherUnit, relabelled, reordered } from './support/variants.ts';

const [, solve] = SOLVERS[0]!;

const LINEAR: Wanted = { iterated: false };

const busesOf = (solution: Solution) => new Map(solution.buses.map((bus) => [bus.id, bus]));
const sameVolts = (a: Solution, b: Solution, epsilon: number, rename = (id: string) => id) => {
  const others = busesOf(b);
  for (const bus of a.buses) {
    const other = others.get(rename(bus.id))!;
    for (const [c, [re, im]] of Object.entries(bus.phasors ?? {})) {
      const [re2, im2] = other.phasors![c as 'L1']!;
      expect(Math.hypot(re - re2, im - im2), `${bus.id} ${c}`).toBeLessThan(epsilon);
    }
    expect(bus.phasors === null).toBe(other.phasors === null);
  }
};
const scaleOf = (job: JobFile) => Math.max(...job.sources.map((s) => s.volts));

describe('laws of the solution', () => {
  it('source power equals loads plus losses, and Kirchhoff’s current law closes', () => {
    fc.assert(
      fc.property(seeds, fc.constantFrom('design', 'everything-on', 'light'), (seed, scenario) => {
        const job = randomJob(seed);
        const solution = outcomeOf(() => solve(job, scenario as 'design'));
        if (!solution) return;
        const { sourceWatts, loadWatts, lossWatts, kclResidual } = solution.totals;
        // The largest power that flows anywhere: between unequal sources it is more than what is consumed.
        const most = Math.max(...solution.runs.flatMap((run) => Object.values(run.amps ?? {})), 1);
        const scale = Math.max(Math.abs(sourceWatts), Math.abs(loadWatts), scaleOf(job) * most);
        expect(Math.abs(sourceWatts - loadWatts - lossWatts)).toBeLessThan(1e-9 * scale);
        expect(kclResidual).toBeLessThan(1e-9);
      }),
      runs(40),
    );
  });

  it('drops of current sinks add up (superposition)', () => {
    fc.assert(
      fc.property(seeds, (seed) => {
        const job = randomJob(seed, { ...LINEAR, diversity: false });
        const fixed = job.loads!.map((load) => ({ ...load, behaviour: 'current' as const }));
        const part = (keep: (index: number) => boolean) =>
          busesOf(
            solve(
              {
                ...job,
                loads: fixed.map((load, k) => (keep(k) ? load : { ...load, demand: 0, demandVa: null })),
              },
              'design',
            ),
          );
        const none = part(() => false);
        const odd = part((k) => k % 2 === 1);
        const even = part((k) => k % 2 === 0);
        for (const [id, bus] of part(() => true))
          for (const [c, [re, im]] of Object.entries(bus.phasors ?? {})) {
            const at = (list: typeof none) => list.get(id)!.phasors![c as 'L1']!;
            expect(Math.abs(re - (at(odd)[0] + at(even)[0] - at(none)[0]))).toBeLessThan(1e-9 * scaleOf(job));
            expect(Math.abs(im - (at(odd)[1] + at(even)[1] - at(none)[1]))).toBeLessThan(1e-9 * scaleOf(job));
          }
      }),
      runs(20),
    );
  });

  it('the order of rows and the names of buses and runs change nothing', () => {
    fc.assert(
      fc.property(seeds, (seed) => {
        const job = randomJob(seed, { ...LINEAR, meshed: false });
        const random = randomFrom(seed);
        const plain = solve(job, 'everything-on');
        const { job: other, bus } = relabelled(random, job);
        sameVolts(plain, solve(reordered(random, other), 'everything-on'), 1e-9 * scaleOf(job), bus);
        const full = solve(job, 'each-circuit');
        const moved = new Map(solve(reordered(random, other), 'each-circuit').loads.map((l) => [l.id, l]));
        for (const load of full.loads) {
          const twin = moved.get(load.id)!;
          expect(twin.verdict).toBe(load.verdict);
          expect(twin.totalPercent ?? 0).toBeCloseTo(load.totalPercent ?? 0, 7);
        }
      }),
      runs(20),
    );
  });

  it('feet and metres give the same volts', () => {
    fc.assert(
      fc.property(seeds, fc.constantFrom(...SCENARIOS), (seed, scenario) => {
        const job = randomJob(seed, LINEAR);
        sameVolts(solve(job, scenario), solve(inOtherUnit(job), scenario), 1e-9 * scaleOf(job));
      }),
      runs(20),
    );
  });

  it('a radial job solved as a mesh: every run laid twice at twice the length', () => {
    fc.assert(
      fc.property(seeds, (seed) => {
        const job = randomJob(seed, { ...LINEAR, meshed: false, diversity: false });
        job.loads = job.loads!.filter((load) => load.along == null);
        sameVolts(solve(job, 'design'), solve(doubled(job), 'design'), 1e-9 * scaleOf(job));
      }),
      runs(20),
    );
  });

  it('generation never lowers a drop outside the scenario light', () => {
    fc.assert(
      fc.property(seeds, (seed) => {
        const job = randomJob(seed, LINEAR);
        const without = {
          ...job,
          loads: job.loads!.filter((l) => (l.amps ?? l.va ?? l.watts ?? l.kw ?? 1) >= 0),
        };
        for (const scenario of ['design', 'everything-on'] as const)
          sameVolts(solve(without, scenario), solve(job, scenario), 1e-9 * scaleOf(job));
      }),
      runs(15),
    );
  });
});
