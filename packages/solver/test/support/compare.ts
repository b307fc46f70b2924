import type { JobFile, Solution } from '@farlug/solver/job';

/**
 * Differences between two solutions of one job, each as a path with both values; empty where they agree.
 * Volts are compared to `epsilon` of the highest volts of the job, percents to the same share of 100, amps, watts and
 * ohms to the same share of the largest in the job; words exactly, reasons by the limit that they name. Headroom to
 * `headroomEpsilon`, and not at all where that is null.
 */
export const differences = (
  job: JobFile,
  ours: Solution,
  theirs: Solution,
  epsilon: number,
  headroomEpsilon: number | null = epsilon,
): string[] => {
  const found: string[] = [];
  const report = (path: string, a: unknown, b: unknown) =>
    found.push(`${path}: ${JSON.stringify(a)} against ${JSON.stringify(b)}`);
  const same = (path: string, a: unknown, b: unknown) => {
    if (JSON.stringify(a) !== JSON.stringify(b)) report(path, a, b);
  };
  const close = (
    path: string,
    a: number | null | undefined,
    b: number | null | undefined,
    scale: number,
    most = epsilon,
  ) => {
    if (a == null || b == null) {
      if ((a ?? null) !== (b ?? null)) report(path, a, b);
      return;
    }
    if (!(Math.abs(a - b) <= most * Math.max(scale, Math.abs(a), Math.abs(b)))) report(path, a, b);
  };
  const keyed = (
    path: string,
    a: Record<string, number> | null,
    b: Record<string, number> | null,
    scale: number,
  ) => {
    if (a === null || b === null) return same(path, a, b);
    same(`${path} keys`, Object.keys(a).sort(), Object.keys(b).sort());
    for (const key of Object.keys(a)) close(`${path}.${key}`, a[key], b[key], scale);
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
    const path = `bus ${b.id}`;
    keyed(`${path} volts`, a.volts, b.volts, volts);
    if (a.phasors === null || b.phasors === null) same(`${path} phasors`, a.phasors, b.phasors);
    else
      for (const [c, [re, im]] of Object.entries(b.phasors)) {
        const mine = a.phasors[c as 'L1'];
        close(`${path} ${c} re`, mine?.[0], re, volts);
        close(`${path} ${c} im`, mine?.[1], im, volts);
      }
    close(`${path} feederPercent`, a.feederPercent, b.feederPercent, 100);
    same(`${path} verdict`, a.verdict, b.verdict);
  }
  same(
    'run ids',
    ours.runs.map((r) => r.id),
    theirs.runs.map((r) => r.id),
  );
  theirs.runs.forEach((b, k) => {
    const a = ours.runs[k]!;
    const path = `run ${b.id}`;
    keyed(`${path} amps`, a.amps, b.amps, amps);
    close(`${path} dropVolts`, a.dropVolts, b.dropVolts, volts);
    close(`${path} dropPercent`, a.dropPercent, b.dropPercent, 100);
    close(`${path} lossWatts`, a.lossWatts, b.lossWatts, watts);
    same(`${path} verdict`, a.verdict, b.verdict);
  });
  same(
    'load ids',
    ours.loads.map((l) => l.id),
    theirs.loads.map((l) => l.id),
  );
  theirs.loads.forEach((b, k) => {
    const a = ours.loads[k]!;
    const path = `load ${b.id}`;
    same(`${path} terminals`, a.terminals, b.terminals);
    close(`${path} volts`, a.volts, b.volts, volts);
    close(`${path} dropVolts`, a.dropVolts, b.dropVolts, volts);
    for (const key of [
      'dropPercent',
      'sourcePercent',
      'servicePercent',
      'transformerPercent',
      'feederPercent',
      'branchPercent',
      'totalPercent',
      'limitPercent',
      'startingPercent',
    ] as const)
      close(`${path} ${key}`, a[key], b[key], 100);
    same(`${path} verdict`, a.verdict, b.verdict);
    same(`${path} reasons`, a.reasons.map(named), b.reasons.map(named));
    same(`${path} turn`, a.turn, b.turn);
    close(`${path} thevenin re`, a.thevenin?.[0], b.thevenin?.[0], ohms);
    close(`${path} thevenin im`, a.thevenin?.[1], b.thevenin?.[1], ohms);
    if (headroomEpsilon !== null)
      close(
        `${path} headroomAmps`,
        a.headroomAmps,
        b.headroomAmps,
        headroomScale(b.headroomAmps, amps),
        headroomEpsilon,
      );
  });
  for (const key of ['sourceWatts', 'loadWatts', 'lossWatts'] as const)
    close(`totals.${key}`, ours.totals[key], theirs.totals[key], watts);
  return found;
};

/** Headroom is where a difference reaches zero: it carries the rounding of volts over a slope of ohms. */
const headroomScale = (headroom: number | null, amps: number): number =>
  1000 * Math.max(Math.abs(headroom ?? 0), amps);

/** The limit that a reason names: its words before the first number. */
const named = (reason: string): string => reason.replace(/\s*[-−]?\d.*$/, '').trim();
