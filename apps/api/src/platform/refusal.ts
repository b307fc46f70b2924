import type { ErrorCode } from '@farlug/contract/errors';

export interface RefusalDetail {
  path: string;
  message: string;
  [more: string]: unknown;
}

/**
 * An expected outcome: what was asked is not done, and why. Services return it; inside a transaction it is thrown,
 * so that nothing half-written stays.
 */
export class Refusal extends Error {
  readonly code: ErrorCode;
  readonly details: readonly RefusalDetail[];
  readonly retryAfterS: number | undefined;

  constructor(
    code: ErrorCode,
    message: string,
    details: readonly RefusalDetail[] = [],
    retryAfterS?: number,
  ) {
    super(message);
    this.name = 'Refusal';
    this.code = code;
    this.details = details;
    this.retryAfterS = retryAfterS;
  }
}

export function refuse(code: ErrorCode, message: string, details: readonly RefusalDetail[] = []): Refusal {
  return new Refusal(code, message, details);
}

/** A refusal about one field, as a form shows it. */
export function refuseField(code: ErrorCode, path: string, message: string): Refusal {
  return new Refusal(code, message, [{ path, message }]);
}

/** Runs work whose refusal was thrown to roll a transaction back, and hands the refusal on as a value. */
export async function refusalAsValue<T>(work: () => Promise<T>): Promise<T | Refusal> {
  try {
    return await work();
  } catch (error) {
    if (error instanceof Refusal) return error;
    throw error;
  }
}
