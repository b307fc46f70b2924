import { ERROR_CODES, type ErrorBody } from '@farlug/contract/errors';
import type { NextFunction, Request, Response } from 'express';
import { MulterError } from 'multer';
import { Refusal, refuse } from '../platform/refusal.ts';

/** The one place where what went wrong becomes an answer; what nobody expected is logged here, once. */
export function answerErrors() {
  return (error: unknown, request: Request, response: Response, next: NextFunction): void => {
    if (response.headersSent) {
      next(error);
      return;
    }
    const refusal = error instanceof Refusal ? error : (knownError(error) ?? unknownError(error, request));
    sendRefusal(refusal, request, response);
  };
}

export function sendRefusal(refusal: Refusal, request: Request, response: Response): void {
  if (refusal.retryAfterS !== undefined) response.setHeader('Retry-After', String(refusal.retryAfterS));
  const body: ErrorBody = {
    error: {
      code: refusal.code,
      message: refusal.message,
      requestId: String(request.id),
      details: [...refusal.details],
    },
  };
  response.status(ERROR_CODES[refusal.code]).setHeader('Cache-Control', 'no-store').json(body);
}

function knownError(error: unknown): Refusal | null {
  if (error instanceof MulterError)
    return error.code === 'LIMIT_FILE_SIZE'
      ? refuse('too_large', 'The file is larger than 5 MB. Save only the schedule itself as CSV or XLSX.')
      : refuse('bad_request', 'Send one file in the form field "file".');
  if (!(error instanceof Error) || !('type' in error)) return null;
  if (error.type === 'entity.too.large') return refuse('too_large', 'This is more than can be sent at once.');
  if (error.type === 'entity.parse.failed') return refuse('bad_request', 'The body is not JSON.');
  if ('status' in error && error.status === 400) return refuse('bad_request', 'The request cannot be read.');
  if ('status' in error && error.status === 415)
    return refuse('bad_request', 'The body must be JSON in UTF-8, not compressed.');
  return null;
}

function unknownError(error: unknown, request: Request): Refusal {
  request.log.error({ err: error }, 'unexpected error');
  return refuse(
    'internal',
    'Something went wrong here. Nothing was changed. Try again; if it happens again, quote the request number.',
  );
}
