import type { Job, LoadResult, RunResult, Scenario, Solution, SolveOutcome } from '../job/index.ts';
import { jobWarnings } from '../job/warnings.ts';
import type { Refusal } from '../network/index.ts';
import { busResults } from './bus-results.ts';
import { lowestCarried } from './carried.ts';
import { buildCore, type Core, coreLike } from './core.ts';
import { type Credits, diversityCredits } from './credits.ts';
import { designDemand, scenarioDemand } from './demand.ts';
import { type Judge, judgeOf, type LoadFigures } from './load-figures.ts';
import { solveDemand, solveFrom } from './operating.ts';
import { runElements, runFlow } from './run-results.ts';
import { runsInTurns } from './run-turns.ts';
import type { State } from './solve-state.ts';
import { totalsOf } from './totals.ts';
import { type TurnFigures, turnFigures, type Wanted } from './turn-figures.ts';
import { turnSolver } from './turn-solver.ts';
import { reasonsOf, VERDICT_ORDER, verdictOf } from './verdict.ts';

/** A job whose network, design state and turns are found once and serve every scenario. */
export interface Prepared {
  kind: 'prepared';
  job: Job;
  solve: (scenario: Scenario) => SolveOutcome;
  /** Runs as pages show them: in `each-circuit` a branch run is shown in the turn of its circuit that drops it most. `only`: the index of the one run that is wanted so. */
  shownRuns: (solution: Solution, only?: number) => RunResult[];
}

const EVERYTHING: Wanted = { headroom: true, loads: null };

/**
 * Builds and solves what all scenarios share. Refused, as a value that names the place: what the network refuses, a
 * job that no solution serves at design demand or in some turn of a circuit.
 */
export function prepareJob(job: Job, wanted: Wanted = EVERYTHING): Prepared | Refusal {
  const core = wanted.like ? coreLike(job, wanted.like) : buildCore(job);
  if ('kind' in core) return core;
  const credits = diversityCredits(core);
  if (credits && 'kind' in credits) return credits;
  const design = solveDemand(core, designDemand(core), credits);
  if ('kind' in design) return design;
  const judge = judgeOf(core);
  const solver = turnSolver(core, design, credits);
  const turns = turnFigures(core, design, judge, solver, wanted);
  if ('kind' in turns) return turns;
  return {
    kind: 'prepared',
    job,
    solve: (scenario) => solveScenario(core, credits, design, judge, turns, scenario),
    shownRuns: (solution, only) =>
      solution.scenario === 'each-circuit' ? runsInTurns(core, solver, solution.runs, only) : solution.runs,
  };
}

/**
 * Solves a parsed job in one scenario: `farlug-solution/1`, volts, amps, watts, ohms and percents in full double
 * precision, arrays in the order of the job. The model's scenarios, splits and limits; see the package's page.
 */
export function solveJob(job: Job, options: { scenario: Scenario } & Partial<Wanted>): SolveOutcome {
  const { scenario, ...wanted } = options;
  const prepared = prepareJob(job, { ...EVERYTHING, ...wanted });
  return prepared.kind === 'prepared' ? prepared.solve(scenario) : prepared;
}

function solveScenario(
  core: Core,
  credits: Credits | null,
  design: State,
  judge: Judge,
  turns: readonly (TurnFigures | null)[],
  scenario: Scenario,
): SolveOutcome {
  const whole = scenario === 'everything-on' || scenario === 'light';
  const state = whole ? solveFrom(core, design, scenarioDemand(core, scenario), credits) : design;
  if ('kind' in state) return state;
  const loads = core.job.loads.map((_, i): LoadResult => {
    const found = turns[i];
    if (!found) return withoutFigures(core, i);
    const figures =
      scenario === 'each-circuit'
        ? found.each
        : scenario === 'starting' && found.starting
          ? found.starting
          : judge.figures(state.volts, i, startingJudged(found));
    return loadResult(core, i, figures, found, scenario);
  });
  const solution: Solution = {
    format: 'farlug-solution/1',
    scenario,
    buses: busResults(core, state.volts, design.volts),
    runs: runResults(core, state, loads),
    loads,
    totals: totalsOf(core, state, credits),
    warnings: jobWarnings(core.job),
  };
  return { kind: 'solved', solution };
}

/** The starting percent that is judged beside other figures of the load. */
const startingJudged = ({ each }: TurnFigures): number | null =>
  each.judged.find((j) => j.name === 'starting')?.value ?? null;

function loadResult(
  core: Core,
  i: number,
  figures: LoadFigures,
  found: TurnFigures,
  scenario: Scenario,
): LoadResult {
  const { id, terminals } = core.job.loads[i]!;
  const { split, judged } = figures;
  return {
    id,
    terminals,
    volts: split.volts,
    dropVolts: split.dropVolts,
    dropPercent: split.dropPercent,
    sourcePercent: split.sourcePercent,
    servicePercent: split.servicePercent,
    transformerPercent: split.transformerPercent,
    feederPercent: split.feederPercent,
    branchPercent: split.branchPercent,
    totalPercent: figures.totalPercent,
    limitPercent: figures.totalLimit,
    verdict: verdictOf(judged),
    reasons: reasonsOf(judged),
    turn: scenario === 'each-circuit' ? found.turn : null,
    headroomAmps: found.headroomAmps,
    thevenin: found.thevenin,
    startingPercent: found.startingPercent,
  };
}

const withoutFigures = (core: Core, i: number): LoadResult => ({
  id: core.job.loads[i]!.id,
  terminals: core.job.loads[i]!.terminals,
  volts: null,
  dropVolts: null,
  dropPercent: null,
  sourcePercent: null,
  servicePercent: null,
  transformerPercent: null,
  feederPercent: null,
  branchPercent: null,
  totalPercent: null,
  limitPercent: null,
  verdict: core.loads[i]!.served ? 'unjudged' : 'unserved',
  reasons: [],
  turn: null,
  headroomAmps: null,
  thevenin: null,
  startingPercent: null,
});

/** Runs in one state; each has the worst verdict of the loads that it carries. */
function runResults(core: Core, state: State, loads: readonly LoadResult[]): RunResult[] {
  const elements = runElements(core, state.stamped.elements);
  const worst = lowestCarried(core, (load) => VERDICT_ORDER.indexOf(loads[load]!.verdict));
  return core.job.runs.map(({ id }, i): RunResult => {
    const flow = runFlow(core, state.volts, i, elements[i]!);
    return {
      id,
      amps: flow?.amps ?? null,
      dropVolts: flow?.dropVolts ?? null,
      dropPercent: flow?.dropPercent ?? null,
      lossWatts: flow?.lossWatts ?? null,
      verdict: VERDICT_ORDER[worst[i]!] ?? 'unjudged',
    };
  });
}
