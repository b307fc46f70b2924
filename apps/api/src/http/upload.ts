import { IMPORT_BYTES_MAX } from '@farlug/contract/routes';
import type { RequestHandler } from 'express';
import multer from 'multer';
import { refuse } from '../platform/refusal.ts';

/** Room for the form around the file. */
const FORM_BYTES = 16 * 1024;

/** Takes the one file of the form into memory; what declares itself too large is refused before a byte is read. */
export function receiveUpload(): RequestHandler {
  const one = multer({
    storage: multer.memoryStorage(),
    limits: { fileSize: IMPORT_BYTES_MAX, files: 1, fields: 0, parts: 2, headerPairs: 20 },
    defParamCharset: 'utf8',
  }).single('file');
  return (request, response, next) => {
    if (!request.is('multipart/form-data')) {
      next(refuse('bad_request', 'Send one file in the form field "file".'));
      return;
    }
    if (Number(request.headers['content-length'] ?? 0) > IMPORT_BYTES_MAX + FORM_BYTES) {
      next(
        refuse('too_large', 'The file is larger than 5 MB. Save only the schedule itself as CSV or XLSX.'),
      );
      return;
    }
    one(request, response, next);
  };
}
