import { type ErrorCode, errorBody } from '@farlug/contract/errors';
import type { z } from 'zod';

/** The API's own codes, and the two that only a browser can find out. */
export type ClientErrorCode = ErrorCode | 'unreachable' | 'unreadable';
export type ErrorDetail = z.output<typeof errorBody>['error']['details'][number];

/** Why the API did not do what was asked; `message` is fit to be read by the person. */
export class ApiError extends Error {
  readonly code: ClientErrorCode;
  readonly status: number;
  readonly requestId: string | null;
  readonly details: readonly ErrorDetail[];

  constructor(
    code: ClientErrorCode,
    message: string,
    status = 0,
    requestId: string | null = null,
    details: readonly ErrorDetail[] = [],
  ) {
    super(message);
    this.name = 'ApiError';
    this.code = code;
    this.status = status;
    this.requestId = requestId;
    this.details = details;
  }
}

export const unreachable = (): ApiError =>
  new ApiError(
    'unreachable',
    'The server cannot be reached. What you typed is kept here; try again in a moment.',
  );

export function errorOf(status: number, body: unknown): ApiError {
  const parsed = errorBody.safeParse(body);
  if (!parsed.success)
    return new ApiError(
      'unreadable',
      `The server answered ${status} in a way that this page cannot read.`,
      status,
    );
  const { code, message, requestId, details } = parsed.data.error;
  return new ApiError(code, message, status, requestId, details);
}
