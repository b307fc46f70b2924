import readSheets from 'read-excel-file/node';
import { boundedArchive } from './bounded-archive.mjs';
import { overlayFormulas } from './formula-cells.mjs';
import { SHEETS_MAX, SheetProblem } from './sheet-limits.mjs';

const NOT_A_WORKBOOK =
  'This is not a workbook that can be read. Open it in a spreadsheet program, save it as XLSX or CSV, and send that.';

/**
 * @param {Buffer} bytes
 * @returns {Promise<{ name: string, cells: string[][] }[]>}
 */
export async function readXlsx(bytes) {
  const parts = await boundedArchive(bytes, (name) =>
    /^xl\/(workbook\.xml|_rels\/workbook\.xml\.rels|worksheets\/[^/]+\.xml)$/.test(name),
  );
  if (!parts.has('xl/workbook.xml')) throw new SheetProblem('unsupported_file', NOT_A_WORKBOOK);
  const sheets = await readSheets(bytes, { trim: true, parseNumber: plainNumber }).catch(() => {
    throw new SheetProblem('unsupported_file', NOT_A_WORKBOOK);
  });
  if (sheets.length > SHEETS_MAX)
    throw new SheetProblem(
      'too_large',
      `The workbook has more than ${SHEETS_MAX} sheets. Send only those with schedules.`,
    );
  const read = sheets.map(({ sheet, data }) => ({ name: sheet, cells: data.map((row) => row.map(textOf)) }));
  overlayFormulas(read, parts);
  return read;
}

/**
 * A double as a spreadsheet shows it: fifteen digits, not the seventeen that it stores.
 * @param {string} text
 */
function plainNumber(text) {
  const value = Number(text);
  if (!Number.isFinite(value)) return text;
  const shown = String(Number(value.toPrecision(15)));
  return shown.includes('e') ? value.toFixed(Math.abs(value) < 1 ? 12 : 0) : shown;
}

/** @param {unknown} value */
function textOf(value) {
  if (value === null || value === undefined) return '';
  if (value instanceof Date) return Number.isNaN(value.getTime()) ? '' : value.toISOString().slice(0, 10);
  if (typeof value === 'boolean') return value ? 'TRUE' : 'FALSE';
  return String(value).trim();
}
