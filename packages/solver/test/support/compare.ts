import type { JobFile, Solution } from '@farlug/solver/job';
import type { DenseSolution } from '../dense/solve-dense.ts';
import { note } from './ledger.ts';

/**
 * Of the number itself, or of a thousandth of the largest of its kind in the job where it is smaller than that. Amps are a
 * difference of volts divided by few ohms: up to 2e-10 was seen over thousands of jobs, headroom included, of all else 1e-11.
 */
const RELATIVE = 1e-10;
const RELATIVE_AMPS = 1e-9;
const LEAST_SHARE = 1e-3;

const PERCENTS = [
  'dropPercent',
  'sourcePercent',
  'servicePercent',
  'transformerPercent',
  'feederPercent',
  'branchPercent',
  'totalPercent',
  'limitPercent',
  'startingPercent',
] as const;

type Figure = number | null | undefined;

/**
 * Differences between two solutions of one job, each as a path with both values; empty where they agree. Numbers to 1e-10
 * relative, amps to 1e-9: a figure below a thousandth of the largest of its kind (volts, percent, amps, watts, ohms of the
 * job) is held to the same share of that thousandth, for it is what is left of larger ones. Words exactly, reasons by the
 * limit that they name. Headroom of the loads in `headroom` alone; where it ends at a collapse, ours must lie between the
 * last extra current that was served and the first that was not.
 */
export const differences = (
  job: JobFile,
  ours: Solution,
  theirs: DenseSolution,
  headroom: ReadonlySet<string>,
): string[] => {
  const found: string[] = [];
  const report = (path: string, a: unknown, b: unknown) =>
    found.push(`${path}: ${JSON.stringify(a)} against ${JSON.stringify(b)}`);
  const same = (path: string, a: unknown, b: unknown) => {
    if (JSON.stringify(a) !== JSON.stringify(b)) report(path, a, b);
  };
  const close = (of: string, figure: string, a: Figure, b: Figure, largest: number) => {
    const path = `${of} ${figure}`;
    if (a == null || b == null) {
      if ((a ?? null) !== (b ?? null)) report(path, a, b);
      return;
    }
    const size = Math.max(Math.abs(a), Math.abs(b), LEAST_SHARE * largest);
    const off = size === 0 ? 0 : Math.abs(a - b) / size;
    const most = /amps$/i.test(figure) ? RELATIVE_AMPS : RELATIVE;
    note(`${of.split(' ')[0]} ${figure}`, off, most);
    if (!(off <= most)) report(path, a, b);
  };
  type ByConductor = Record<string, number> | null;
  const keyed = (of: string, figure: string, a: ByConductor, b: ByConductor, largest: number) => {
    if (a === null || b === null) return same(`${of} ${figure}`, a, b);
    same(`${of} ${figure} of`, Object.keys(a).sort(), Object.keys(b).sort());
    for (const key of Object.keys(a)) close(`${of} ${key}`, figure, a[key], b[key], largest);
  };

  const volts = Math.max(
    ...job.sources.map((s) => s.volts),
    ...(job.transformers ?? []).map((t) => t.secondaryVolts),
  );
  const amps = Math.max(1, ...theirs.runs.flatMap((run) => Object.values(run.amps ?? {})));
  // The largest power that flows anywhere: between unequal sources it is more than what is consumed.
  const watts = Math.max(volts * amps, Math.abs(theirs.totals.sourceWatts));
  const ohms = Math.max(
    1e-3,
    ...theirs.loads.flatMap((load) => (load.thevenin ? [Math.hypot(...load.thevenin)] : [])),
  );

  same('scenario', ours.scenario, theirs.scenario);
  same('bus ids', ours.buses.map((b) => b.id).sort(), theirs.buses.map((b) => b.id).sort());
  for (const b of theirs.buses) {
    const a = ours.buses.find((each) => each.id === b.id);
    if (!a) continue;
    const of = `bus ${b.id}`;
    keyed(of, 'volts', a.volts, b.volts, volts);
    const parts = (phasors: typeof a.phasors, part: 0 | 1) =>
      phasors && Object.fromEntries(Object.entries(phasors).map(([c, value]) => [c, value[part]]));
    keyed(of, 're', parts(a.phasors, 0), parts(b.phasors, 0), volts);
    keyed(of, 'im', parts(a.phasors, 1), parts(b.phasors, 1), volts);
    close(of, 'feederPercent', a.feederPercent, b.feederPercent, 100);
    same(`${of} verdict`, a.verdict, b.verdict);
  }
  same(
    'run ids',
    ours.runs.map((r) => r.id),
    theirs.runs.map((r) => r.id),
  );
  theirs.runs.forEach((b, k) => {
    const a = ours.runs[k]!;
    const of = `run ${b.id}`;
    keyed(of, 'amps', a.amps, b.amps, amps);
    close(of, 'dropVolts', a.dropVolts, b.dropVolts, volts);
    close(of, 'dropPercent', a.dropPercent, b.dropPercent, 100);
    close(of, 'lossWatts', a.lossWatts, b.lossWatts, watts);
    same(`${of} verdict`, a.verdict, b.verdict);
  });
  same(
    'load ids',
    ours.loads.map((l) => l.id),
    theirs.loads.map((l) => l.id),
  );
  theirs.loads.forEach((b, k) => {
    const a = ours.loads[k]!;
    const of = `load ${b.id}`;
    same(`${of} terminals`, a.terminals, b.terminals);
    close(of, 'volts', a.volts, b.volts, volts);
    close(of, 'dropVolts', a.dropVolts, b.dropVolts, volts);
    for (const key of PERCENTS) close(of, key, a[key], b[key], 100);
    same(`${of} verdict`, a.verdict, b.verdict);
    same(`${of} reasons`, a.reasons.map(named), b.reasons.map(named));
    same(`${of} turn`, a.turn, b.turn);
    close(of, 'thevenin re', a.thevenin?.[0], b.thevenin?.[0], ohms);
    close(of, 'thevenin im', a.thevenin?.[1], b.thevenin?.[1], ohms);
    if (!headroom.has(b.id)) return;
    const unserved = theirs.collapses.get(b.id);
    if (unserved === undefined) close(of, 'headroomAmps', a.headroomAmps, b.headroomAmps, amps);
    else if (!(a.headroomAmps! >= b.headroomAmps! * (1 - RELATIVE) && a.headroomAmps! <= unserved))
      report(`${of} headroomAmps`, a.headroomAmps, `a collapse from ${b.headroomAmps} to ${unserved}`);
  });
  for (const key of ['sourceWatts', 'loadWatts', 'lossWatts'] as const)
    close('totals', key, ours.totals[key], theirs.totals[key], watts);
  return found;
};

/** The limit that a reason names: its words before the first number. */
const named = (reason: string): string => reason.replace(/\s*[-−]?\d.*$/, '').trim();
