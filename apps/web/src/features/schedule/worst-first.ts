import type { VerdictKind } from '../../ui/glyph.tsx';
import type { JobResult, LoadFigures, RunFigures } from '../../workers/results.ts';

const RANK: Record<VerdictKind, number> = { over: 0, rise: 0, unserved: 1, near: 2, within: 3, unjudged: 4 };

/** The worst verdict first; among equals the largest total, then the order of the job. */
export const loadsWorstFirst = (result: JobResult): LoadFigures[] =>
  [...result.loads.values()].sort(
    (a, b) => RANK[a.shown] - RANK[b.shown] || Math.abs(b.totalPercent ?? 0) - Math.abs(a.totalPercent ?? 0),
  );

export const runsWorstFirst = (result: JobResult): RunFigures[] =>
  [...result.runs.values()].sort(
    (a, b) => RANK[a.shown] - RANK[b.shown] || Math.abs(b.dropPercent ?? 0) - Math.abs(a.dropPercent ?? 0),
  );
