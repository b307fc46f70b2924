import { getInspection, type InspectionView, recordDecision } from '@farlug/contract/routes';
import { type UseQueryResult, useQuery, useQueryClient } from '@tanstack/react-query';
import { useCallback } from 'react';
import type { z } from 'zod';
import type { ApiError } from '../../../lib/api-error.ts';
import { ask, call } from '../../../lib/call.ts';

const KEY = ['inspection'] as const;

export function useInspection(): UseQueryResult<InspectionView> {
  return useQuery({ queryKey: KEY, queryFn: ({ signal }) => ask(getInspection, { signal }) });
}

type Decision = z.input<typeof recordDecision.body>;

export function useRecordDecision(): (decision: Decision) => Promise<ApiError | null> {
  const cache = useQueryClient();
  return useCallback(
    async (body) => {
      const outcome = await call(recordDecision, { body });
      if (!outcome.ok) return outcome.error;
      await cache.invalidateQueries({ queryKey: KEY });
      return null;
    },
    [cache],
  );
}
