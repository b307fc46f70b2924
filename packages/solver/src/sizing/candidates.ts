import type { Beyond, Job, Material, Scenario, Solution, Verdict } from '../job/index.ts';
import { beyondFinder, MATERIALS } from '../job/index.ts';
import { busSystems } from '../job/systems.ts';
import type { CandidateSize } from './candidate-sizes.ts';
import { candidateSizes, laidIn, withRun } from './candidate-sizes.ts';
import type { Floor, FloorLoad } from './floor.ts';
import { ampacityFloor } from './floor.ts';
import { floorLoad } from './floor-load.ts';
import type { Grounding } from './grounding-choice.ts';
import { groundingChooser } from './grounding-choice.ts';
import type { Longest } from './longest.ts';
import { longestFinder } from './longest.ts';
import type { Solve } from './solve.ts';

export interface WorstLoad {
  id: string;
  totalPercent: number;
  feederPercent: number;
  branchPercent: number;
  limitPercent: number | null;
  verdict: Verdict;
}

/** One size of a run, with all that it would do. Volts, percents and watts are of the whole network re-solved. */
export interface Candidate {
  material: Material;
  size: string;
  sets: number;
  /** The size as drawn. */
  now: boolean;
  /** Of the run itself at design demand. */
  dropVolts: number | null;
  dropPercent: number | null;
  lossWatts: number | null;
  /** The load beyond with the largest total; `null` where there is none. */
  worst: WorstLoad | null;
  /** Feeder part at every panel beyond, with its verdict. */
  panels: { id: string; feederPercent: number; verdict: Verdict }[];
  /** The worst of the panels beyond: what a feeder is judged by; `unjudged` where there are none. */
  feederVerdict: Verdict;
  /** The worst of the loads and panels beyond. */
  verdict: Verdict;
  /** Loads and panels beyond that are over. */
  overBeyond: number;
  longest: Longest | null;
  floor: Floor;
  grounding: Grounding;
  /** Below the ampacity floor: may be chosen only with an override, which is printed wherever the number is. */
  needsOverride: boolean;
}

export interface CandidateOptions {
  scenario?: Scenario;
  /** Also the other metal. */
  bothMaterials?: boolean;
  /** 1 … this many parallel sets; at least those drawn. */
  maxSets?: number;
  /** Also the longest run that still passes, which takes two more solves a size. */
  longest?: boolean;
}

export type CandidatesOutcome =
  | { ok: true; runId: string; load: FloorLoad; candidates: Candidate[] }
  | { ok: false; at: string; reason: string };

/**
 * Every size of one run side by side, each by solving the job anew with the run laid in it; `solve` is
 * `solveJob` of `@farlug/solver/judge`. Refused: an unknown run, a job that cannot be solved as drawn.
 */
export function candidates(
  job: Job,
  runId: string,
  solve: Solve,
  options: CandidateOptions = {},
): CandidatesOutcome {
  const index = job.runs.findIndex((run) => run.id === runId);
  if (index < 0) return { ok: false, at: runId, reason: 'no run of the job has this id' };
  const run = job.runs[index]!;
  const scenario = options.scenario ?? 'each-circuit';
  const drawn = solve(job, scenario);
  if (drawn.kind !== 'solved') return { ok: false, at: drawn.at, reason: drawn.reason };

  const beyond = beyondFinder(job)(index);
  const load = floorLoad(job, index, beyond, busSystems(job), drawn.solution.runs[index]!);
  const materials = options.bothMaterials ? otherLast(run.material) : [run.material];
  const sizes = candidateSizes(job, run, materials, Math.max(options.maxSets ?? 1, run.sets));
  const floors = sizes.map((size) => ampacityFloor(laidIn(run, size), load, job.conductorRows));
  const groundingOf = groundingChooser(job, run, sizes, floors);
  const longestOf = options.longest === false ? null : longestFinder(job, index, beyond, scenario, solve);

  const list = sizes.flatMap((size, i): Candidate[] => {
    const laid = withRun(job, index, laidIn(run, size));
    const outcome = isDrawn(job, index, size) ? drawn : solve(laid, scenario);
    if (outcome.kind !== 'solved') return [];
    const floor = floors[i]!;
    return [
      {
        ...figuresOf(job, index, beyond, outcome.solution),
        material: size.material,
        size: size.size,
        sets: size.sets,
        now: isDrawn(job, index, size),
        longest: longestOf?.(laid, outcome.solution) ?? null,
        floor,
        grounding: groundingOf(i),
        needsOverride: floor.status === 'below',
      },
    ];
  });
  return { ok: true, runId, load, candidates: list };
}

const otherLast = (material: Material): Material[] => [material, ...MATERIALS.filter((m) => m !== material)];

const isDrawn = (job: Job, index: number, size: CandidateSize): boolean => {
  const run = job.runs[index]!;
  return (
    run.ohms === null && run.size === size.size && run.sets === size.sets && run.material === size.material
  );
};

const GRAVITY: readonly Verdict[] = ['unjudged', 'within', 'rise', 'over', 'unserved'];
const worse = (a: Verdict, b: Verdict): Verdict => (GRAVITY.indexOf(b) > GRAVITY.indexOf(a) ? b : a);

type Figures = Pick<
  Candidate,
  'dropVolts' | 'dropPercent' | 'lossWatts' | 'worst' | 'panels' | 'feederVerdict' | 'verdict' | 'overBeyond'
>;

const figuresOf = (job: Job, index: number, beyond: Beyond | null, solution: Solution): Figures => {
  const own = solution.runs[index]!;
  const loads = (beyond?.loads ?? job.loads.map((_, i) => i)).map((i) => solution.loads[i]!);
  const panels = solution.buses.flatMap((bus) =>
    (beyond?.buses.has(bus.id) ?? true) &&
    bus.feederPercent !== undefined &&
    bus.feederPercent !== null &&
    bus.verdict
      ? [{ id: bus.id, feederPercent: bus.feederPercent, verdict: bus.verdict }]
      : [],
  );
  let worst: WorstLoad | null = null;
  for (const { id, totalPercent, feederPercent, branchPercent, limitPercent, verdict } of loads) {
    if (totalPercent === null || (worst && totalPercent <= worst.totalPercent)) continue;
    worst = {
      id,
      totalPercent,
      feederPercent: feederPercent!,
      branchPercent: branchPercent!,
      limitPercent,
      verdict,
    };
  }
  const judged = [...loads, ...panels];
  const worstOf = (list: readonly { verdict: Verdict }[]) =>
    list.reduce<Verdict>((all, { verdict }) => worse(all, verdict), 'unjudged');
  return {
    dropVolts: own.dropVolts,
    dropPercent: own.dropPercent,
    lossWatts: own.lossWatts,
    worst,
    panels,
    feederVerdict: worstOf(panels),
    verdict: worstOf(judged),
    overBeyond: judged.filter(({ verdict }) => verdict === 'over').length,
  };
};
