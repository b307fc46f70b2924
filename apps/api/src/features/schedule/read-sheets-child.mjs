// A process of its own for a file that a stranger made: it may run out of time or memory without harm to the rest.
import { readCsv } from './read-csv.mjs';
import { readXlsx } from './read-xlsx.mjs';
import { boundedSheets, SheetProblem } from './sheet-limits.mjs';

process.once('message', async (message) => {
  const { kind, bytes } = /** @type {{ kind: 'csv' | 'xlsx', bytes: Uint8Array }} */ (message);
  process.send?.(await read(kind, Buffer.from(bytes)), undefined, undefined, () => process.disconnect());
});

/**
 * @param {'csv' | 'xlsx'} kind
 * @param {Buffer} bytes
 */
async function read(kind, bytes) {
  try {
    return { ok: true, sheets: boundedSheets(kind === 'csv' ? readCsv(bytes) : await readXlsx(bytes)) };
  } catch (error) {
    if (error instanceof SheetProblem) return { ok: false, code: error.code, message: error.message };
    return {
      ok: false,
      code: 'unsupported_file',
      message: 'This file cannot be read. Save the schedule as CSV or XLSX and send that.',
    };
  }
}
