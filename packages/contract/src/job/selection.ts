import type { JobRows, JobTable } from '../rows/index.ts';
import type { Missing } from './incomplete.ts';
import type { LeftOut } from './left-out.ts';
import { reachedBuses } from './reach.ts';

type Placed = { code?: string; name?: string | null; circuitId?: string | null; panelId?: string };
const keyOf = (table: JobTable, row: string) => `${table} ${row}`;

/** Which rows stand in the job, and why the others do not. */
export class Selection {
  private readonly rows: JobRows;
  private readonly out = new Map<string, LeftOut>();
  private fed: ReadonlySet<string> = new Set();

  constructor(rows: JobRows) {
    this.rows = rows;
  }

  /** False where the row is left out already. */
  leaveOut(missing: Missing, follows = false): boolean {
    const key = keyOf(missing.table, missing.row);
    if (this.out.has(key)) return false;
    const { table, row, field, reason } = missing;
    this.out.set(key, { table, row, field, reason, ...this.placeOf(table, row), follows });
    const circuit = this.draftedCircuit(missing);
    if (circuit !== null) this.leaveOutCircuit(circuit, missing.reason);
    return true;
  }

  has(table: JobTable, row: string): boolean {
    return !this.out.has(keyOf(table, row));
  }

  isFed(busId: string): boolean {
    return this.fed.has(busId);
  }

  leftOut(): LeftOut[] {
    return [...this.out.values()];
  }

  /** What nothing that is kept feeds follows what should have fed it. */
  leaveOutUnfed(): void {
    const kept = (table: 'source' | 'run' | 'transformer') =>
      new Set([...this.rows[table].keys()].filter((id) => this.has(table, id)));
    this.fed = reachedBuses(this.rows, {
      source: kept('source'),
      run: kept('run'),
      transformer: kept('transformer'),
    });
    for (const run of this.rows.run.values())
      if (!this.fed.has(run.fromBusId) && !this.fed.has(run.toBusId))
        this.follow('run', run.id, run.circuitId);
    for (const one of this.rows.transformer.values())
      if (!this.fed.has(one.fromBusId)) this.follow('transformer', one.id, null);
    for (const load of this.rows.load.values()) {
      const along = load.alongRunId;
      const alone = along === null ? !this.fed.has(load.busId ?? '') : !this.has('run', along);
      if (alone) this.follow('load', load.id, load.circuitId);
    }
  }

  private follow(table: JobTable, row: string, circuitId: string | null): void {
    if (!this.has(table, row)) return;
    const cause =
      circuitId === null
        ? undefined
        : [...this.out.values()].find((one) => one.circuitId === circuitId && !one.follows);
    const reason = cause?.reason ?? 'No complete run leads from a source to it.';
    this.leaveOut({ table, row, field: null, reason }, true);
  }

  private draftedCircuit({ table, row, draft }: Missing): string | null {
    if (!draft) return null;
    return table === 'breaker'
      ? (this.rows.breaker.get(row)?.circuitId ?? null)
      : table === 'circuit'
        ? row
        : null;
  }

  private leaveOutCircuit(circuitId: string, reason: string): void {
    for (const table of ['run', 'load'] as const)
      for (const row of this.rows[table].values())
        if (row.circuitId === circuitId) this.leaveOut({ table, row: row.id, field: null, reason }, true);
  }

  private placeOf(table: JobTable, row: string): Pick<LeftOut, 'code' | 'circuitId' | 'panelId'> {
    const placed = (this.rows[table] as ReadonlyMap<string, Placed>).get(row);
    const circuitId = table === 'circuit' ? row : (placed?.circuitId ?? null);
    const ofCircuit = circuitId === null ? undefined : this.rows.circuit.get(circuitId);
    const panelId = table === 'panel' ? row : (ofCircuit?.panelId ?? null);
    return { code: placed?.code ?? null, circuitId, panelId };
  }
}
