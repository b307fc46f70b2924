import { type JobFromRows, type JobIndex, rowAtPath } from '@farlug/contract/job';
import type { LoadResult, RunResult, Scenario, Solution } from '@farlug/solver/job';
import {
  type Prepared,
  prepareJob,
  SHOWN_ORDER,
  type Shown,
  type ShownVerdict,
  shownVerdicts,
  summarise,
} from '@farlug/solver/judge';
import { SOLVER_VERSION } from '@farlug/solver/version';
import type {
  CircuitFigures,
  Counts,
  JobResult,
  LoadFigures,
  PanelFigures,
  RunFigures,
  Trouble,
} from './results.ts';

/** The network of a job's rows, prepared once for every scenario; or why it cannot be. */
export type PreparedRows = { built: JobFromRows; prepared: Prepared | null; trouble: Trouble[] };

export function prepareRows(built: JobFromRows): PreparedRows {
  if (built.problems.length > 0) {
    const trouble = built.problems.map(
      ({ path, message }): Trouble => ({ text: message, at: rowAtPath(built.index, path) }),
    );
    return { built, prepared: null, trouble };
  }
  const prepared = prepareJob(built.job);
  return prepared.kind === 'prepared'
    ? { built, prepared, trouble: [] }
    : { built, prepared: null, trouble: [troubleAt(built.index, prepared.at, prepared.reason)] };
}

/** Solves one scenario and keys everything by row. Where nothing can be computed, `trouble` says why. */
export function jobResult(
  rows: PreparedRows,
  scenario: Scenario,
  generation: number,
  now: () => number,
): JobResult {
  const began = now();
  const { built, prepared } = rows;
  const frame = {
    generation,
    scenario,
    solverVersion: SOLVER_VERSION,
    leftOut: built.leftOut,
    leftOutCount: built.leftOutCount,
    assumed: built.assumed,
    warnings: built.warnings,
  };
  const outcome = prepared?.solve(scenario);
  if (!prepared || outcome?.kind !== 'solved') {
    const trouble =
      outcome?.kind === 'unsolvable' ? [troubleAt(built.index, outcome.at, outcome.reason)] : rows.trouble;
    return { ...frame, ...NOTHING, trouble, milliseconds: now() - began };
  }
  const { solution } = outcome;
  const shown = shownVerdicts(built.job, solution);
  const loads = loadFigures(built.index, solution, shown);
  const circuits = circuitFigures(built, solution, shown, loads);
  return {
    ...frame,
    state: 'solved',
    trouble: [],
    loads,
    runs: runFigures(built.index, prepared.shownRuns(solution), shown),
    panels: panelFigures(built, solution, shown),
    ...circuits,
    totals: solution.totals,
    milliseconds: now() - began,
  };
}

const noCounts = (): Counts =>
  Object.fromEntries(SHOWN_ORDER.map((verdict) => [verdict, 0])) as Record<ShownVerdict, number>;

const NOTHING = {
  state: 'stopped',
  loads: new Map<string, LoadFigures>(),
  runs: new Map<string, RunFigures>(),
  panels: new Map<string, PanelFigures>(),
  circuits: new Map<string, CircuitFigures>(),
  counts: noCounts(),
  worst: null,
  totals: null,
} as const;

function loadFigures(index: JobIndex, solution: Solution, shown: Shown): Map<string, LoadFigures> {
  const figures = (result: LoadResult): [string, LoadFigures][] => {
    const placed = index.loadByCode.get(result.id);
    const verdict = shown.loads.get(result.id);
    if (!placed || !verdict) return [];
    return [[placed.row, { ...result, shown: verdict, row: placed.row, circuitId: placed.circuitId }]];
  };
  return new Map(solution.loads.flatMap(figures));
}

function runFigures(index: JobIndex, runs: readonly RunResult[], shown: Shown): Map<string, RunFigures> {
  const figures = (result: RunResult): [string, RunFigures][] => {
    const placed = index.runByCode.get(result.id);
    const verdict = shown.runs.get(result.id);
    if (!placed || !verdict) return [];
    return [[placed.row, { ...result, shown: verdict, row: placed.row, circuitId: placed.circuitId }]];
  };
  return new Map(runs.flatMap(figures));
}

/** Panels by row; a schedule stands for the bus that it is of. */
function panelFigures(
  { job, index }: JobFromRows,
  solution: Solution,
  shown: Shown,
): Map<string, PanelFigures> {
  const buses = new Map(solution.buses.map((bus) => [bus.id, bus]));
  return new Map(
    job.panels.flatMap((panel, i) => {
      const panelId = index.panels[i];
      const bus = buses.get(panel.bus);
      if (!panelId || !bus) return [];
      const figures: PanelFigures = {
        panelId,
        bus,
        feederPercent: bus.feederPercent ?? null,
        shown: shown.panels.get(panel.bus) ?? 'unjudged',
      };
      return [[panelId, figures] as const];
    }),
  );
}

function circuitFigures(
  { job, index }: JobFromRows,
  solution: Solution,
  shown: Shown,
  loads: ReadonlyMap<string, LoadFigures>,
): Pick<JobResult, 'circuits' | 'counts' | 'worst'> {
  const placeOf = (id: string) => index.loadByCode.get(id);
  const keyOf = (id: string): string => placeOf(id)?.circuitId ?? placeOf(id)?.row ?? id;
  const summary = summarise(job, solution, keyOf, shown);
  const figuresOf = ({ id }: LoadResult): LoadFigures[] => {
    const figures = loads.get(placeOf(id)?.row ?? '');
    return figures ? [figures] : [];
  };
  const circuits = new Map(
    summary.groups.flatMap((group) => {
      const [worst] = figuresOf(group.worst);
      if (!worst) return [];
      const placed = placeOf(worst.id);
      const figures: CircuitFigures = {
        circuitId: placed?.circuitId ?? null,
        panelId: placed?.panelId ?? null,
        shown: group.shown,
        worst,
        loads: group.loads.flatMap(figuresOf),
      };
      return [[group.key, figures] as const];
    }),
  );
  const worst = summary.worst && (circuits.get(summary.worst.key) ?? null);
  return { circuits, counts: summary.counts, worst };
}

/** A place that the solver names, as `run F1`, found among the rows. */
function troubleAt(index: JobIndex, place: string, reason: string): Trouble {
  const [, what, code = ''] = /^(\w+) (.*)$/.exec(place) ?? [];
  const text = `${place}: ${reason}`;
  const at = (
    table: 'bus' | 'run' | 'load' | 'source' | 'transformer',
    row: string | undefined,
  ): Trouble => ({
    text,
    at: row === undefined ? null : { table, row, field: null },
  });
  if (what === 'bus') return at('bus', index.busByCode.get(code));
  if (what === 'run') return at('run', index.runByCode.get(code)?.row);
  if (what === 'load') return at('load', index.loadByCode.get(code)?.row);
  if (what === 'source') return at('source', index.sourceByCode.get(code));
  if (what === 'transformer') return at('transformer', index.transformerByCode.get(code));
  return { text, at: null };
}
