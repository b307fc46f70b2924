import type { z } from 'zod';
import type { ApiError } from './api-error.ts';

/** Messages by field path (`email`, `limits.0.value`); the empty path is the form’s own. */
export type FieldErrors = Readonly<Record<string, string>>;

/** What a schema says of what was typed, the first message of each field. */
export function schemaErrors(schema: z.ZodType, value: unknown): FieldErrors {
  const parsed = schema.safeParse(value);
  return parsed.success
    ? {}
    : firstOf(parsed.error.issues.map((issue) => [issue.path.join('.'), issue.message]));
}

/** What the server refused, at the fields it named; anything else belongs to the form. */
export function serverErrors(error: ApiError): FieldErrors {
  if (error.details.length === 0) return { '': error.message };
  return firstOf(error.details.map((detail) => [detail.path.replace(/^body\./, ''), detail.message]));
}

function firstOf(pairs: readonly (readonly [string, string])[]): FieldErrors {
  const errors: Record<string, string> = {};
  for (const [path, message] of pairs) errors[path] ??= message;
  return errors;
}
