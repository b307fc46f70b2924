import { setRunSizeEdit } from '@farlug/contract/schedule';
import { useCallback } from 'react';
import { useOpenJob } from '../../job/open-job.tsx';
import type { SizeFigures } from '../../workers/answer-sizes.ts';

/** Lays a run in a size, its grounding conductor with it; the reason of an override is kept with the run. */
export function useApplySize(run: string): (size: SizeFigures, reason: string | null) => string | null {
  const { replica } = useOpenJob();
  return useCallback(
    ({ material, size, sets, grounding }, reason) => {
      const change = setRunSizeEdit(replica.getSnapshot().rows, run, {
        material,
        size,
        sets,
        floorOverride: reason,
        ...(grounding.ok ? { groundingSize: grounding.size } : {}),
      });
      if (!change.edit) return change.problem;
      const done = replica.apply(change.edit);
      return done.ok ? change.problem : done.message;
    },
    [replica, run],
  );
}
