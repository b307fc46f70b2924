import papaparse from 'papaparse';
import { refuseColumns, refuseRows, SheetProblem } from './sheet-limits.mjs';

const DELIMITERS = [',', ';', '\t', '|'];

/**
 * @param {Buffer} bytes
 * @returns {{ name: string, cells: string[][] }[]}
 */
export function readCsv(bytes) {
  const name = 'the file';
  const { delimiter, text } = separate(decode(bytes));
  /** @type {string[][]} */
  const cells = [];
  /** @type {unknown} */
  let problem;
  papaparse.parse(text, {
    delimiter,
    skipEmptyLines: false,
    step: ({ data }, parser) => {
      const row = /** @type {string[]} */ (data).map((cell) => cell.trim());
      cells.push(row);
      try {
        refuseColumns(row.length, name, cells.length);
        refuseRows(cells.length - 1, name);
      } catch (error) {
        problem = error;
        parser.abort();
      }
    },
  });
  if (problem) throw problem;
  return [{ name: 'CSV', cells }];
}

/** @param {Buffer} bytes */
function decode(bytes) {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return new TextDecoder('utf-16le').decode(bytes);
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return new TextDecoder('utf-16be').decode(bytes);
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    const text = new TextDecoder('windows-1252').decode(bytes);
    // biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what tells text from other files
    if (/[\x00-\x08\x0e-\x1f]/.test(text))
      throw new SheetProblem(
        'unsupported_file',
        'This is not a text file. Save the schedule as CSV or XLSX and send that.',
      );
    return text;
  }
}

/**
 * Some programs write the separator into a first line of its own.
 * @param {string} whole
 */
function separate(whole) {
  const declared = /^\uFEFF?sep=(.)(?:\r\n|\r|\n)/i.exec(whole);
  return declared
    ? { delimiter: /** @type {string} */ (declared[1]), text: whole.slice(declared[0].length) }
    : { delimiter: delimiterOf(whole), text: whole };
}

/**
 * The one of the usual separators that most of the first lines agree upon, outside quotes.
 * @param {string} text
 */
function delimiterOf(text) {
  const lines = text
    .slice(0, 64 * 1024)
    .split(/\r\n|\r|\n/)
    .slice(0, 50)
    .filter((line) => line.trim() !== '');
  let best = { delimiter: ',', score: 0 };
  for (const delimiter of DELIMITERS) {
    const counts = lines.map((line) => line.replace(/"(?:[^"]|"")*"/g, '').split(delimiter).length - 1);
    const usual = mode(counts.filter((count) => count > 0));
    const score = usual * counts.filter((count) => count === usual).length;
    if (score > best.score) best = { delimiter, score };
  }
  return best.delimiter;
}

/** @param {number[]} counts */
function mode(counts) {
  /** @type {Map<number, number>} */
  const seen = new Map();
  for (const count of counts) seen.set(count, (seen.get(count) ?? 0) + 1);
  return [...seen].sort((a, b) => b[1] - a[1] || b[0] - a[0])[0]?.[0] ?? 0;
}
