import type { Beyond, Job, Scenario, Solution } from '../job/index.ts';
import { withRun } from './candidate-sizes.ts';
import type { Solve } from './solve.ts';

/** The longest run that still passes, in the job's unit of length, to the whole unit below. */
export type Longest =
  | { kind: 'up-to'; length: number }
  /** No length passes: what lies before the run is too much already, or another limit fails. */
  | { kind: 'none' }
  /** No limit depends on the length. */
  | { kind: 'any' };

const FARTHEST = 1e6;

/** Whose limits bound the length of a run, as indices in the solution. */
interface Bound {
  loads: readonly number[];
  buses: readonly number[];
}

/**
 * A branch run is bounded by every limit of the loads beyond. Any other run by the feeder part at the panels beyond,
 * since a branch that is too long by itself says nothing about its feeder; by the loads where no panel lies beyond.
 */
const boundOf = (job: Job, index: number, beyond: Beyond | null, solution: Solution): Bound => {
  const buses = solution.buses.flatMap((bus, i) =>
    bus.verdict !== undefined && (!beyond || beyond.buses.has(bus.id)) ? [i] : [],
  );
  const loads = beyond ? beyond.loads : job.loads.map((_, i) => i);
  return job.runs[index]!.kind !== 'branch' && buses.length > 0 ? { loads: [], buses } : { loads, buses };
};

/** Every percentage that bounds the length, with its limit, in a fixed order. */
const measures = (job: Job, bound: Bound, solution: Solution): { value: number; limit: number }[] => {
  const { limits } = job;
  const measure = (value: number | null | undefined, limit: number | null | undefined) => ({
    value: value ?? 0,
    limit: limit ?? Number.POSITIVE_INFINITY,
  });
  const ofLoads = bound.loads.flatMap((i) => {
    const load = solution.loads[i]!;
    const own = limits.byClass[job.loads[i]!.class];
    return [
      measure(load.totalPercent, load.limitPercent),
      measure(load.branchPercent, own?.branch ?? limits.branch),
      measure(load.feederPercent, own?.feeder ?? limits.feeder),
    ];
  });
  return [...ofLoads, ...bound.buses.map((i) => measure(solution.buses[i]!.feederPercent, limits.feeder))];
};

const passes = (bound: Bound, solution: Solution): boolean =>
  bound.loads.every((i) => solution.loads[i]!.verdict !== 'over') &&
  bound.buses.every((i) => solution.buses[i]!.verdict !== 'over');

/**
 * Longest length by the straight line of every measure between length 0 (one solve, shared by all sizes, since no
 * size counts there) and the length as drawn, then held against the verdict itself.
 */
export function longestFinder(
  job: Job,
  index: number,
  beyond: Beyond | null,
  scenario: Scenario,
  solve: Solve,
): (laid: Job, asDrawn: Solution) => Longest {
  const { length } = job.runs[index]!;
  const at = (laid: Job, newLength: number): Solution | null => {
    const outcome = solve(withRun(laid, index, { ...laid.runs[index]!, length: newLength }), scenario);
    return outcome.kind === 'solved' ? outcome.solution : null;
  };
  const zero = at(job, 0);
  const bound = zero && boundOf(job, index, beyond, zero);
  if (!zero || !bound || !passes(bound, zero)) return () => ({ kind: 'none' });
  const atZero = measures(job, bound, zero);

  return (laid, asDrawn) => {
    const passesAt = (newLength: number): boolean => {
      const solution = newLength === length ? asDrawn : at(laid, newLength);
      return solution !== null && passes(bound, solution);
    };
    let guess = FARTHEST;
    if (length > 0)
      measures(job, bound, asDrawn).forEach(({ value, limit }, i) => {
        const slope = (value - atZero[i]!.value) / length;
        if (slope > 0) guess = Math.min(guess, Math.floor((limit - atZero[i]!.value) / slope));
      });
    return searchFrom(guess, passesAt);
  };
}

/**
 * The largest whole length that passes, length 0 being known to pass: gallops away from the guess in doubling steps
 * until the verdict turns, then halves. A good guess costs two solves.
 */
function searchFrom(guess: number, passesAt: (length: number) => boolean): Longest {
  let low = 0;
  let high = FARTHEST + 1;
  let next = Math.min(Math.max(guess, 1), FARTHEST);
  for (let step = 1; high - low > 1; step *= 2) {
    if (passesAt(next)) low = next;
    else high = next;
    const bracketed = low > 0 && high <= FARTHEST;
    const gallop = low === next ? Math.min(next + step, FARTHEST) : Math.max(next - step, 1);
    next = bracketed || gallop <= low || gallop >= high ? Math.floor((low + high) / 2) : gallop;
  }
  return low === FARTHEST ? { kind: 'any' } : { kind: 'up-to', length: low };
}
