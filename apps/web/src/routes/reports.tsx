import type { LeftOut } from '@farlug/contract/job';
import { inOrder } from '@farlug/contract/job';
import type { JobRows } from '@farlug/contract/rows';
import { useParams } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { useMembership } from '../features/accounts/hooks/use-membership.ts';
import { ReportsPage } from '../features/reports/components/reports-page.tsx';
import type { BlockingRow } from '../features/reports/job-standing.ts';
import { useOpenJob, useReplica } from '../job/open-job.tsx';
import { useResult, useScenario } from '../job/use-result.ts';
import { usePageTitle } from '../lib/use-page-title.ts';
import { BriefCautions } from './brief-cautions.tsx';

/** Reports, with the job as it stands before the person. */
export function Component() {
  const { job = '' } = useParams();
  const { firmId, mayIssue } = useMembership();
  const { archived } = useOpenJob();
  const { rows, headSeq, settled } = useReplica();
  const { result } = useResult();
  const [scenario] = useScenario();
  usePageTitle('Reports', [...rows.job.values()][0]?.name);
  const buses = inOrder(rows.bus.values());
  const panels = [...rows.panel.values()].map((panel) => ({
    id: panel.id,
    label: buses.find((bus) => bus.id === panel.busId)?.code ?? 'panel',
  }));
  return (
    <ReportsPage
      firm={firmId}
      job={job}
      mayIssue={mayIssue}
      standing={{
        seq: headSeq,
        saved: settled,
        archived,
        scenario,
        panels,
        leftOut: blockingRows(rows, result?.leftOut ?? [], (panel, circuit) =>
          paths.schedule(firmId, job, { panel, circuit }),
        ),
        unsolvable:
          result?.state === 'stopped' ? result.trouble.map((trouble) => trouble.text).join(' ') : null,
      }}
      cautions={<BriefCautions />}
    />
  );
}

/** Each row of the schedule that is left out for its own sake, once, with the place where it is mended. */
function blockingRows(
  rows: JobRows,
  leftOut: readonly LeftOut[],
  to: (panel: string | null, circuit: string | null) => string,
): BlockingRow[] {
  const found = new Map<string, BlockingRow>();
  for (const entry of leftOut) {
    if (entry.follows) continue;
    const key = entry.circuitId ?? `${entry.table} ${entry.row}`;
    if (found.has(key)) continue;
    const circuit = entry.circuitId === null ? undefined : rows.circuit.get(entry.circuitId);
    const code = entry.code ?? circuit?.description ?? entry.table;
    const label = circuit?.description && entry.code ? `${entry.code}, ${circuit.description}` : code;
    found.set(key, {
      key,
      label,
      reason: entry.field ?? entry.reason,
      to: to(entry.panelId ?? circuit?.panelId ?? null, entry.circuitId),
    });
  }
  return [...found.values()];
}
