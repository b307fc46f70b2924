import { busSystems, type Job, type Panel } from '@farlug/solver/job';
import type { JobRowLists, Row } from '../rows/index.ts';
import { blankBreaker, blankCircuit, blankPanel } from './blank-rows.ts';
import { type BranchPiece, branchPieces } from './branch-pieces.ts';
import { orderKeys } from './order-keys.ts';
import { decimalOf, decimalOrNull } from './quantity.ts';
import { breakersOfSpaces, firstBreaker, spacesFromText } from './spaces.ts';

type Overlay = Pick<JobRowLists, 'panel' | 'circuit' | 'breaker' | 'run' | 'load'>;
type Entry = Omit<Panel['circuits'][number], 'run'> & { runs: number[]; loads: number[] };
interface Sheet {
  bus: string;
  panel: Panel | null;
  entries: Entry[];
}

/** Panels with their circuits and breakers, and runs and loads that know which circuit they are of. */
export function overlayRows(
  job: Job,
  network: { busId: ReadonlyMap<string, string>; runs: Row<'run'>[]; loads: Row<'load'>[] },
  makeId: () => string,
): Overlay {
  const sheets = sheetsOf(job);
  const runs = [...network.runs];
  const loads = [...network.loads];
  const systems = busSystems(job);
  const overlay: Overlay = { panel: [], circuit: [], breaker: [], run: runs, load: loads };

  for (const sheet of sheets) {
    const panel = panelRowOf(
      sheet,
      network.busId.get(sheet.bus)!,
      systems.get(sheet.bus)?.conductors,
      makeId,
    );
    overlay.panel.push(panel);
    const keys = orderKeys(sheet.entries.length);
    sheet.entries.forEach((entry, i) => {
      const circuit = blankCircuit({ id: makeId(), orderKey: keys[i]!, panelId: panel.id });
      overlay.circuit.push({ ...circuit, kind: entry.kind, description: entry.description });
      const breakers = breakerRowsOf(job, entry, circuit.id, panel.layout, makeId);
      overlay.breaker.push(...breakers);
      const own = firstBreaker(breakers);
      for (const index of entry.runs) runs[index] = ofCircuit(runs[index]!, circuit.id, own);
      for (const index of entry.loads) loads[index] = { ...loads[index]!, circuitId: circuit.id };
    });
    nameHalves(
      overlay.breaker,
      new Set(overlay.circuit.filter((c) => c.panelId === panel.id).map((c) => c.id)),
    );
  }
  runs.forEach((run, i) => {
    runs[i] = withCircuitText(run, job.runs[i]!.circuit);
  });
  return overlay;
}

/** Two single poles in one space are the halves of a tandem; three or more are a conflict and stay as they are. */
function nameHalves(breakers: Row<'breaker'>[], ofPanel: ReadonlySet<string>): void {
  const bySpace = new Map<number, number[]>();
  breakers.forEach((breaker, i) => {
    if (breaker.poles === 1 && ofPanel.has(breaker.circuitId))
      bySpace.set(breaker.space, [...(bySpace.get(breaker.space) ?? []), i]);
  });
  for (const indices of bySpace.values()) {
    if (indices.length !== 2) continue;
    indices.forEach((index, i) => {
      breakers[index] = { ...breakers[index]!, half: i === 0 ? 'a' : 'b' };
    });
  }
}

function panelRowOf(
  { panel, entries }: Sheet,
  busId: string,
  conductors: readonly Panel['lines'][number][] | undefined,
  makeId: () => string,
): Row<'panel'> {
  const lines = panel?.lines ?? conductors?.filter((one) => one !== 'N') ?? [];
  const last = Math.max(0, ...entries.flatMap((entry) => entry.spaces));
  const row = blankPanel({
    id: makeId(),
    busId,
    spaces: panel?.spaces ?? Math.min(200, Math.max(42, last)),
    lines: lines.length > 0 ? [...lines] : ['L1'],
  });
  return { ...row, layout: panel?.layout ?? 'two-column', mainAmps: decimalOrNull(panel?.mainAmps ?? null) };
}

/** What stands in each panel: the file's own entries, then what leaves its bus and is in none. */
function sheetsOf(job: Job): Sheet[] {
  const pieces = branchPieces(job);
  const pieceOfRun = new Map(pieces.flatMap((piece) => piece.runs.map((index) => [index, piece] as const)));
  const runIndex = new Map(job.runs.map((run, i) => [run.id, i]));
  const taken = new Map<BranchPiece | number, Entry>();
  const sheets: Sheet[] = job.panels.map((panel) => ({ bus: panel.bus, panel, entries: [] }));

  for (const sheet of sheets) {
    for (const { run, ...circuit } of sheet.panel!.circuits) {
      const index = run === null ? undefined : runIndex.get(run);
      const key = index === undefined ? undefined : (pieceOfRun.get(index) ?? index);
      const first = key === undefined ? undefined : taken.get(key);
      if (first && sheet.entries.includes(first)) {
        first.spaces = [...new Set([...first.spaces, ...circuit.spaces])];
        first.description ??= circuit.description;
        continue;
      }
      const entry: Entry = { ...circuit, runs: [], loads: [] };
      if (key !== undefined && !first) {
        if (typeof key === 'number') entry.runs = [key];
        else Object.assign(entry, { runs: key.runs, loads: key.loads });
        taken.set(key, entry);
      }
      sheet.entries.push(entry);
    }
  }

  const panelBuses = new Set([...job.buses.filter((bus) => bus.kind === 'panel').map((bus) => bus.id)]);
  const sheetAt = (bus: string, make: boolean): Sheet | undefined => {
    const found = sheets.find((sheet) => sheet.bus === bus);
    if (found || !(make || panelBuses.has(bus))) return found;
    const made: Sheet = { bus, panel: null, entries: [] };
    sheets.push(made);
    return made;
  };
  for (const bus of job.buses) sheetAt(bus.id, false);
  job.runs.forEach((run, index) => {
    if (run.kind !== 'feeder' || taken.has(index)) return;
    const sheet = sheetAt(run.from, false);
    sheet?.entries.push({ ...derivedEntry(run, 'feeder'), runs: [index], loads: [] });
  });
  for (const piece of pieces) {
    if (taken.has(piece) || piece.starts.length === 0) continue;
    const bus = piece.starts.find((start) => sheetAt(start, false)) ?? piece.starts[0]!;
    const sheet = sheetAt(bus, piece.runs.length > 0);
    const lead = piece.runs.map((index) => job.runs[index]!).find((run) => run.circuit !== null);
    sheet?.entries.push({ ...derivedEntry(lead ?? null, 'branch'), runs: piece.runs, loads: piece.loads });
  }
  return sheets;
}

function derivedEntry(run: Job['runs'][number] | null, kind: Entry['kind']): Omit<Entry, 'runs' | 'loads'> {
  return { spaces: spacesFromText(run?.circuit ?? '') ?? [], kind, description: null };
}

function breakerRowsOf(
  job: Job,
  entry: Entry,
  circuitId: string,
  layout: Row<'panel'>['layout'],
  makeId: () => string,
): Row<'breaker'>[] {
  const said =
    entry.runs.map((index) => job.runs[index]!.breaker).find((breaker) => breaker !== null) ?? null;
  return breakersOfSpaces(layout, entry.spaces, said?.poles ?? null).map(({ space, poles }) => ({
    ...blankBreaker({ id: makeId(), circuitId, space, poles }),
    amps: said === null ? null : decimalOf(said.amps),
  }));
}

/** A run keeps a breaker of its own only where it is not its circuit's. */
function ofCircuit(run: Row<'run'>, circuitId: string, own: Row<'breaker'> | null): Row<'run'> {
  const same = own !== null && run.breakerAmps === own.amps && run.breakerPoles === own.poles;
  return same ? { ...run, circuitId, breakerAmps: null, breakerPoles: null } : { ...run, circuitId };
}

/** A circuit's number that no breaker can show is kept as a note. */
function withCircuitText(run: Row<'run'>, circuit: string | null): Row<'run'> {
  if (circuit === null || (run.circuitId !== null && spacesFromText(circuit) !== null)) return run;
  return { ...run, notes: `Circuit in the job file: ${circuit}` };
}
