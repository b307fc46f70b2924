import { lineOfSpace } from '@farlug/contract/job';
import type { RevisionInput } from '@farlug/contract/routes';
import { type Equations, nodalEquations } from '@farlug/solver/equations';
import { type HandCheck, handChecks } from '@farlug/solver/hand-check';
import {
  type BusResult,
  type Job,
  type Load,
  type LoadResult,
  type Run,
  SCENARIOS,
  type Scenario,
  type Solution,
} from '@farlug/solver/job';
import { circuitsOf, type ShownVerdict, shownVerdicts, summarise } from '@farlug/solver/judge';
import { loadText, powerFactorText, runWords } from './words.ts';

/** One row of a panel's schedule as it is printed. */
export interface PrintedRow {
  spaces: string;
  line: string;
  code: string;
  serves: string;
  room: string;
  breaker: string;
  wire: string;
  length: string;
  lengthAssumed: boolean;
  load: string;
  loadAssumed: boolean;
  powerFactor: string;
  powerFactorAssumed: boolean;
  override: string | null;
  kind: string;
  shown: ShownVerdict | null;
  worst: LoadResult | null;
  run: Run | null;
  /** Of a row that feeds a panel: the feeder part there, at design demand. */
  feeds: FedPanel | null;
}
export interface FedPanel {
  bus: string;
  feederPercent: number | null;
  /** Lowest between its lines, or to neutral where it has one. */
  volts: number | null;
  shown: ShownVerdict;
}
export interface PrintedPanel {
  bus: string;
  name: string | null;
  about: string;
  figures: BusResult | null;
  shown: ShownVerdict;
  rows: PrintedRow[];
}
export interface ReportFigures {
  input: RevisionInput;
  scenario: Scenario;
  solution: Solution;
  panels: PrintedPanel[];
  /** Loads that stand in no panel's schedule. */
  looseRows: PrintedRow[];
  /** What exceeds a limit, worst first. */
  exceeding: PrintedRow[];
  counts: Record<ShownVerdict, number>;
  panelsOver: number;
  equations: { bus: string; equations: Equations } | null;
  handChecks: HandCheck[];
}

/** Everything that a report prints, from its pinned input and the solver alone. Throws where that cannot be solved. */
export function reportFigures(
  input: RevisionInput,
  solve: (job: Job, scenario: Scenario) => Solution,
): ReportFigures {
  const { job } = input;
  const scenario = SCENARIOS.find((one) => one === input.scenario) ?? 'each-circuit';
  const solution = solve(job, scenario);
  const shown = shownVerdicts(job, solution);
  const circuits = circuitsOf(job);
  const groups = 'kind' in circuits ? [] : circuits;
  const groupOf = new Map(groups.flatMap(({ loads }, i) => loads.map((id) => [id, String(i)] as const)));
  const summary = summarise(job, solution, (id) => groupOf.get(id) ?? id, shown);
  const byGroup = new Map(summary.groups.map((group) => [group.key, group]));
  const groupOfRun = new Map(groups.flatMap(({ runs }, i) => runs.map((id) => [id, String(i)] as const)));
  const runs = new Map(job.runs.map((run) => [run.id, run]));
  const loads = new Map(job.loads.map((load) => [load.id, load]));
  const buses = new Map(solution.buses.map((bus) => [bus.id, bus]));
  const assumed = new Set(input.assumed.map(({ kind, id, field }) => `${kind} ${id} ${field}`));
  const overrides = new Map(input.overrides.map(({ run, reason }) => [run, reason]));

  const printed = new Set<string>();
  const rowOf = (facts: {
    spaces: string;
    line: string;
    run: Run | null;
    kind: string;
    serves: string;
    room: string;
    key: string | null;
  }): PrintedRow => {
    const group = facts.key === null ? undefined : byGroup.get(facts.key);
    if (facts.key !== null) printed.add(facts.key);
    const own = (group?.loads ?? [])
      .map(({ id }) => loads.get(id))
      .filter((load): load is Load => load !== undefined);
    const has = (field: string) => own.some((load) => assumed.has(`load ${load.id} ${field}`));
    const { run } = facts;
    return {
      spaces: facts.spaces,
      line: facts.line,
      code: run?.id ?? group?.worst.id ?? '',
      serves: facts.serves || run?.name || own[0]?.name || '',
      room: facts.room,
      breaker: run?.breaker ? `${run.breaker.amps}/${run.breaker.poles}` : '',
      wire: run ? `${runWords(run)}${overrides.has(run.id) ? ' †' : ''}` : '',
      length: run ? `${run.length} ${job.lengthUnit}` : '',
      lengthAssumed: run ? assumed.has(`run ${run.id} length`) : false,
      load: own.length === 1 ? loadText(own[0]!) : own.length > 1 ? `${own.length} loads` : '',
      loadAssumed: has('size'),
      powerFactor: job.frequency === 0 ? '' : powerFactorText(own),
      powerFactorAssumed: has('powerFactor'),
      override: run ? (overrides.get(run.id) ?? null) : null,
      kind: facts.kind,
      shown: group?.shown ?? null,
      worst: group?.worst ?? null,
      run,
      feeds: null,
    };
  };

  const words = new Map(input.rowWords.map((one) => [`${one.panel} ${one.row}`, one]));
  const panels = job.panels.map((panel, p): PrintedPanel => {
    const bus = job.buses.find(({ id }) => id === panel.bus);
    const rows = panel.circuits.map((circuit, r): PrintedRow => {
      const run = circuit.run === null ? null : (runs.get(circuit.run) ?? null);
      const row = rowOf({
        spaces: spacesText(circuit.spaces),
        line: lineText(circuit.spaces.map((space) => lineOfSpace(panel, space))),
        run,
        kind: circuit.kind,
        serves: circuit.description ?? '',
        room: words.get(`${p} ${r}`)?.room ?? '',
        key: run?.kind === 'branch' ? (groupOfRun.get(run.id) ?? null) : null,
      });
      if (!run || run.kind === 'branch') return row;
      const verdict = shown.panels.get(run.to);
      return {
        ...row,
        serves: row.serves || `panel ${run.to}`,
        feeds: verdict ? fedPanel(run.to, buses.get(run.to), verdict) : null,
      };
    });
    const figures = buses.get(panel.bus) ?? null;
    const nominal = figures?.volts ? Object.keys(figures.volts).filter((pair) => pair !== 'N').length : 0;
    return {
      bus: panel.bus,
      name: bus?.name ?? null,
      about: [
        panel.mainAmps === null ? null : `main ${panel.mainAmps} A`,
        `${panel.spaces} spaces`,
        nominal === 0 ? 'not served' : null,
      ]
        .filter(Boolean)
        .join(', '),
      figures,
      shown: shown.panels.get(panel.bus) ?? 'unjudged',
      rows,
    };
  });
  const looseRows = summary.groups
    .filter(({ key }) => !printed.has(key))
    .map(({ key, worst }) => {
      const group = groups[Number(key)];
      const run = group?.runs[0] ? (runs.get(group.runs[0]) ?? null) : null;
      return rowOf({
        spaces: '',
        line: '',
        run,
        kind: 'branch',
        serves: loads.get(worst.id)?.name ?? '',
        room: '',
        key,
      });
    });
  const all = [...panels.flatMap(({ rows }) => rows), ...looseRows];
  const place = new Map(summary.groups.map(({ worst }, i) => [worst.id, i]));
  const exceeding = all
    .filter(({ shown: verdict }) => verdict === 'over' || verdict === 'rise')
    .sort((a, b) => (place.get(a.worst!.id) ?? 0) - (place.get(b.worst!.id) ?? 0));

  const equationsBus = input.equationsPanel ?? worstPanel(panels);
  const equations = equationsBus === null ? null : nodalEquations(job, { buses: [equationsBus], scenario });
  const checks = handChecks(job);
  return {
    input,
    scenario,
    solution,
    panels,
    looseRows,
    exceeding,
    counts: summary.counts,
    panelsOver: panels.filter((panel) => panel.shown === 'over').length,
    equations: equations?.ok ? { bus: equationsBus!, equations } : null,
    handChecks: checks.ok ? checks.checks : [],
  };
}

function fedPanel(bus: string, figures: BusResult | undefined, shown: ShownVerdict): FedPanel {
  const volts = Object.entries(figures?.volts ?? {});
  const toNeutral = volts.filter(([pair]) => /^L\d-N$/.test(pair));
  const between = toNeutral.length > 0 ? toNeutral : volts.filter(([pair]) => pair !== 'N');
  return {
    bus,
    feederPercent: figures?.feederPercent ?? null,
    volts: between.length === 0 ? null : Math.min(...between.map(([, value]) => value)),
    shown,
  };
}

/** The panel with the worst row, for a job that names none. */
function worstPanel(panels: readonly PrintedPanel[]): string | null {
  let worst: { bus: string; percent: number } | null = null;
  for (const { bus, rows } of panels)
    for (const { worst: load } of rows) {
      const percent = load?.totalPercent ?? Number.NEGATIVE_INFINITY;
      if (load && (worst === null || percent > worst.percent)) worst = { bus, percent };
    }
  return worst?.bus ?? panels[0]?.bus ?? null;
}

/** `20`, `24, 26`, `31–35`. */
function spacesText(spaces: readonly number[]): string {
  if (spaces.length < 3) return spaces.join(', ');
  return `${spaces[0]}–${spaces.at(-1)}`;
}

function lineText(lines: readonly string[]): string {
  const digits = [...new Set(lines)].map((line) => line.replace('L', ''));
  if (digits.length === 0) return '';
  return digits.length === 3 ? '3-ph' : `L${digits.join('-')}`;
}
