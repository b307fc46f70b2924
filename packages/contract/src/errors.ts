import { z } from 'zod';

/** The closed list of what the API answers when it does not do what was asked. */
export const ERROR_CODES = {
  bad_request: 400,
  invalid: 422,
  sign_in_needed: 401,
  wrong_credentials: 401,
  forbidden: 403,
  not_found: 404,
  conflict: 409,
  job_moved_on: 409,
  incomplete: 409,
  unsolvable: 409,
  archived: 409,
  link_gone: 410,
  too_large: 413,
  unsupported_file: 415,
  too_many: 429,
  internal: 500,
  unavailable: 503,
} as const;
export type ErrorCode = keyof typeof ERROR_CODES;
export const ERROR_CODE_NAMES = Object.keys(ERROR_CODES) as [ErrorCode, ...ErrorCode[]];

export const errorBody = z.strictObject({
  error: z.strictObject({
    code: z.enum(ERROR_CODE_NAMES),
    message: z.string(),
    requestId: z.string(),
    details: z.array(z.looseObject({ path: z.string(), message: z.string() })),
  }),
});
export type ErrorBody = z.output<typeof errorBody>;
