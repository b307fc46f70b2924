import type { z } from 'zod';
import type { RefusalDetail } from '../platform/refusal.ts';

type Parsed<T> = { ok: true; value: T } | { ok: false; details: RefusalDetail[] };

const DETAILS_MAX = 100;

export function parse<S extends z.ZodType>(schema: S, value: unknown): Parsed<z.output<S>> {
  const parsed = schema.safeParse(value, { error: wording });
  if (parsed.success) return { ok: true, value: parsed.data };
  return { ok: false, details: parsed.error.issues.slice(0, DETAILS_MAX).map(detailOf) };
}

function wording(issue: { code?: string; input?: unknown }): string | undefined {
  if (issue.code === 'invalid_type' && issue.input === undefined) return 'This is needed.';
  return undefined;
}

function detailOf(issue: z.core.$ZodIssue): RefusalDetail {
  const path = issue.path
    .map((part, index) =>
      typeof part === 'number' ? `[${part}]` : `${index === 0 ? '' : '.'}${String(part)}`,
    )
    .join('');
  return { path, message: issue.message };
}
