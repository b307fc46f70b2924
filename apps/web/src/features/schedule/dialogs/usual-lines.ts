import type { JobRows, Row } from '@farlug/contract/rows';
import { SYSTEM_CONDUCTORS } from '@farlug/solver/job';

/** Lines of the first source: what a panel that nothing feeds yet most likely has. */
export function usualLines(rows: JobRows): Row<'panel'>['lines'] {
  const source = [...rows.source.values()][0];
  return SYSTEM_CONDUCTORS[source?.system ?? '3ph-4w'].filter((one) => one !== 'N');
}
