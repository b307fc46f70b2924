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

/**
 * What the server refused, at the fields it named. What it says of no field of the form stands on the form itself,
 * so that nothing is refused in silence.
 */
export function serverErrors(error: ApiError, values: object): FieldErrors {
  if (error.details.length === 0) return { '': error.message };
  const pairs = error.details.map((detail): readonly [string, string] => [
    detail.path.replace(/^body\./, ''),
    detail.message,
  ]);
  const simple = (path: string) => {
    const value = (values as Record<string, unknown>)[path];
    return typeof value === 'string' || typeof value === 'boolean';
  };
  const elsewhere = pairs.filter(([path]) => !simple(path)).map(([path, message]) => `${path}: ${message}`);
  const shown = elsewhere.length > 3 ? [...elsewhere.slice(0, 3), '…'] : elsewhere;
  return {
    ...firstOf(pairs),
    ...(elsewhere.length > 0 ? { '': `${error.message} ${shown.join(' ')}` } : {}),
  };
}

function firstOf(pairs: readonly (readonly [string, string])[]): FieldErrors {
  const errors: Record<string, string> = {};
  for (const [path, message] of pairs) errors[path] ??= message;
  return errors;
}
