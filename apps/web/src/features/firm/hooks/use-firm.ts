import { type FirmView, getFirm } from '@farlug/contract/routes';
import { type UseQueryResult, useQuery } from '@tanstack/react-query';
import { ask } from '../../../lib/call.ts';

export const firmKey = (firm: string) => ['firm', firm, 'view'] as const;

export function useFirm(firm: string): UseQueryResult<FirmView> {
  return useQuery({
    queryKey: firmKey(firm),
    queryFn: ({ signal }) => ask(getFirm, { params: { firm }, signal }),
    staleTime: 60_000,
  });
}
