import {
  issueRevision,
  recordPaperDecision,
  renewLink,
  resendDelivery,
  revokeLink,
  sendRevision,
} from '@farlug/contract/routes';
import { useQueryClient } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { z } from 'zod';
import type { ApiError } from '../../../lib/api-error.ts';
import { call, type Outcome } from '../../../lib/call.ts';
import { revisionsKey } from './use-revisions.ts';

export interface ReportActions {
  issue: (body: z.input<typeof issueRevision.body>) => Promise<Outcome<typeof issueRevision>>;
  send: (revision: string, body: z.input<typeof sendRevision.body>) => Promise<ApiError | null>;
  resend: (delivery: string) => Promise<ApiError | null>;
  renew: (delivery: string, linkDays: number) => Promise<ApiError | null>;
  revoke: (delivery: string) => Promise<ApiError | null>;
  decide: (revision: string, body: z.input<typeof recordPaperDecision.body>) => Promise<ApiError | null>;
}

/** What is done with revisions; the list is fetched anew after each. */
export function useReportActions(firm: string, job: string): ReportActions {
  const cache = useQueryClient();
  return useMemo(() => {
    const after = async <T>(asked: Promise<T>): Promise<T> => {
      const outcome = await asked;
      await cache.invalidateQueries({ queryKey: revisionsKey(firm, job) });
      return outcome;
    };
    const refusal = async (asked: Promise<{ ok: true } | { ok: false; error: ApiError }>) => {
      const outcome = await after(asked);
      return outcome.ok ? null : outcome.error;
    };
    const at = { firm, job };
    return {
      issue: (body) => after(call(issueRevision, { params: at, body })),
      send: (revision, body) => refusal(call(sendRevision, { params: { ...at, revision }, body })),
      resend: (delivery) => refusal(call(resendDelivery, { params: { ...at, delivery } })),
      renew: (delivery, linkDays) =>
        refusal(call(renewLink, { params: { ...at, delivery }, body: { linkDays } })),
      revoke: (delivery) => refusal(call(revokeLink, { params: { ...at, delivery } })),
      decide: (revision, body) => refusal(call(recordPaperDecision, { params: { ...at, revision }, body })),
    };
  }, [cache, firm, job]);
}
