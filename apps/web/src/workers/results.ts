import type { Assumed, LeftOut } from '@farlug/contract/job';
import type { JobTable } from '@farlug/contract/rows';
import type { BusResult, LoadResult, RunResult, Scenario, Totals, Warning } from '@farlug/solver/job';
import type { ShownVerdict } from '@farlug/solver/judge';

export interface LoadFigures extends LoadResult {
  shown: ShownVerdict;
  row: string;
  circuitId: string | null;
}

export interface RunFigures extends RunResult {
  shown: ShownVerdict;
  row: string;
  circuitId: string | null;
}

export interface PanelFigures {
  panelId: string;
  bus: BusResult;
  feederPercent: number | null;
  shown: ShownVerdict;
}

/** A circuit of the schedule, or a load that stands in none: judged by its worst load. */
export interface CircuitFigures {
  circuitId: string | null;
  panelId: string | null;
  shown: ShownVerdict;
  worst: LoadFigures;
  loads: LoadFigures[];
}

export interface Trouble {
  text: string;
  at: { table: JobTable; row: string; field: string | null } | null;
}

export type Counts = Record<ShownVerdict, number>;

/** What the pages show of a job: everything is keyed by row, so that a row finds its figures at once. */
export interface JobResult {
  /** The change of the rows that it stands on. */
  generation: number;
  scenario: Scenario;
  solverVersion: string;
  /** `stopped`: nothing could be computed, and `trouble` says why; the rows keep working. */
  state: 'solved' | 'stopped';
  trouble: Trouble[];
  leftOut: LeftOut[];
  leftOutCount: number;
  assumed: Assumed[];
  warnings: Warning[];
  loads: ReadonlyMap<string, LoadFigures>;
  runs: ReadonlyMap<string, RunFigures>;
  panels: ReadonlyMap<string, PanelFigures>;
  /** By circuit row; loads in no circuit under their own row. */
  circuits: ReadonlyMap<string, CircuitFigures>;
  counts: Counts;
  worst: CircuitFigures | null;
  totals: Totals | null;
  milliseconds: number;
}
