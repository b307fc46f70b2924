import { z } from 'zod';
import { MEMBER, route } from '../route.ts';
import { firmParams, none } from './common.ts';

export const IMPORT_BYTES_MAX = 5 * 1024 * 1024;

/** A sheet as text cells: what was shown in the cell, formulas as their text beginning with `=`. */
export const sheetCells = z.strictObject({
  name: z.string(),
  cells: z.array(z.array(z.string())),
});

/**
 * Reads an uploaded CSV or XLSX schedule (multipart field `file`) into cells. Nothing is stored: columns,
 * preview and the edit are made from the cells by the contract's `import` and sent as one edit.
 */
export const readSchedule = route({
  name: 'readSchedule',
  method: 'POST',
  path: '/api/firms/:firm/schedule-files',
  access: MEMBER,
  kind: 'upload',
  idempotent: true,
  params: firmParams,
  query: none,
  body: z.unknown(),
  response: z.strictObject({ fileName: z.string(), sheets: z.array(sheetCells) }),
  errors: ['invalid', 'not_found', 'too_large', 'too_many', 'unsupported_file'],
});
