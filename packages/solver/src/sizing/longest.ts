import type { Beyond, Job, Scenario, Solution } from '../job/index.ts';
import { withRun } from './candidate-sizes.ts';
import type { Solve } from './candidates.ts';

/** The longest run that still passes, in the job's unit of length, to the whole unit below. */
export type Longest =
  | { kind: 'up-to'; length: number }
  /** No length passes: what lies before it is too much already, or another limit fails. */
  | { kind: 'none' }
  /** No limit depends on the length. */
  | { kind: 'any' };

const FARTHEST = 1e6;

/** Every percentage beyond a run that a limit holds: its value in one solution, in a fixed order. */
const measures = (
  job: Job,
  beyond: Beyond | null,
  solution: Solution,
): { value: number; limit: number }[] => {
  const { limits } = job;
  const list: { value: number; limit: number }[] = [];
  const add = (value: number | null | undefined, limit: number | null | undefined) =>
    list.push({ value: value ?? 0, limit: limit ?? Number.POSITIVE_INFINITY });
  solution.loads.forEach((load, i) => {
    if (beyond && !beyond.loads.includes(i)) return;
    const own = limits.byClass[job.loads[i]!.class];
    add(load.totalPercent, load.limitPercent);
    add(load.branchPercent, own?.branch ?? limits.branch);
    add(load.feederPercent, own?.feeder ?? limits.feeder);
  });
  for (const bus of solution.buses)
    if (!beyond || beyond.buses.has(bus.id)) add(bus.feederPercent, limits.feeder);
  return list;
};

const passes = (beyond: Beyond | null, solution: Solution): boolean =>
  solution.loads.every((load, i) => (beyond && !beyond.loads.includes(i)) || load.verdict !== 'over') &&
  solution.buses.every((bus) => (beyond && !beyond.buses.has(bus.id)) || bus.verdict !== 'over');

/**
 * Longest length by the straight line of every measure between length 0 (one solve, shared by all sizes, since no
 * size counts there) and the length as drawn, then held against the verdict itself and bisected where they part.
 */
export function longestFinder(
  job: Job,
  index: number,
  beyond: Beyond | null,
  scenario: Scenario,
  solve: Solve,
): (laid: Job, asDrawn: Solution) => Longest {
  const length = job.runs[index]!.length;
  const at = (laid: Job, newLength: number): Solution | null => {
    const outcome = solve(withRun(laid, index, { ...laid.runs[index]!, length: newLength }), scenario);
    return outcome.kind === 'solved' ? outcome.solution : null;
  };
  const zero = at(job, 0);
  const atZero = zero && passes(beyond, zero) ? measures(job, beyond, zero) : null;

  return (laid, asDrawn) => {
    if (!atZero) return { kind: 'none' };
    const passesAt = (newLength: number): boolean => {
      const solution = newLength === length ? asDrawn : at(laid, newLength);
      return solution !== null && passes(beyond, solution);
    };
    let guess = Number.POSITIVE_INFINITY;
    if (length > 0)
      measures(job, beyond, asDrawn).forEach(({ value, limit }, i) => {
        const slope = (value - atZero[i]!.value) / length;
        if (slope > 0 && Number.isFinite(limit)) guess = Math.min(guess, (limit - atZero[i]!.value) / slope);
      });
    return searchFrom(Number.isFinite(guess) ? Math.floor(guess) : FARTHEST, passesAt);
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
