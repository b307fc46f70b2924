import type { JobFromRows } from '@farlug/contract/job';
import type { ReportDigest } from '@farlug/contract/routes';
import type { JobRows } from '@farlug/contract/rows';
import type { Solution } from '@farlug/solver/job';
import { summarise } from '@farlug/solver/judge';

const FINDINGS_MAX = 200;

/** Counts by circuit, and what exceeds or is near a limit, worst first. */
export function reportDigest(rows: JobRows, { job, index }: JobFromRows, solution: Solution): ReportDigest {
  const circuitOf = (id: string) => index.loadByCode.get(id)?.circuitId ?? null;
  const { groups, counts } = summarise(job, solution, (id) => circuitOf(id) ?? id);
  const codes = new Map(
    [...rows.run.values()].flatMap(({ circuitId, code }) => (circuitId ? [[circuitId, code] as const] : [])),
  );
  const findings = groups.flatMap(({ key, shown, worst }): ReportDigest['findings'] => {
    if (shown !== 'over' && shown !== 'rise' && shown !== 'near') return [];
    return [
      {
        place: codes.get(key) ?? worst.id,
        serves: rows.circuit.get(key)?.description ?? '',
        load: worst.id,
        shown,
        feederPercent: worst.feederPercent,
        branchPercent: worst.branchPercent,
        totalPercent: worst.totalPercent,
        limitPercent: worst.limitPercent,
        reasons: worst.reasons,
      },
    ];
  });
  return { counts, findings: findings.slice(0, FINDINGS_MAX) };
}
