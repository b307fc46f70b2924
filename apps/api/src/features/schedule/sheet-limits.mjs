// Bounds on what a schedule file may hold, for the process that reads it.
export const COLUMNS_MAX = 200;
export const ROWS_MAX = 20_000;
export const SHEETS_MAX = 40;
export const CELL_CHARACTERS_MAX = 4_000;
export const CHARACTERS_MAX = 10_000_000;
export const UNZIPPED_BYTES_MAX = 64 * 1024 * 1024;
export const ENTRIES_MAX = 2_000;

/** What is wrong with a file, in words that say what would be right. */
export class SheetProblem extends Error {
  /**
   * @param {'too_large' | 'unsupported_file' | 'invalid'} code
   * @param {string} message
   */
  constructor(code, message) {
    super(message);
    this.code = code;
  }
}

/**
 * Cuts empty rows and columns off the end and refuses what is larger than a schedule ever is.
 * @param {{ name: string, cells: string[][] }[]} sheets
 */
export function boundedSheets(sheets) {
  let characters = 0;
  for (const sheet of sheets) {
    for (const row of sheet.cells) while (row.length > 0 && row.at(-1)?.trim() === '') row.pop();
    while (sheet.cells.length > 0 && sheet.cells.at(-1)?.length === 0) sheet.cells.pop();
    refuseRows(sheet.cells.length, sheet.name);
    sheet.cells.forEach((row, index) => {
      refuseColumns(row.length, sheet.name, index + 1);
      for (const cell of row) {
        characters += cell.length;
        if (cell.length > CELL_CHARACTERS_MAX)
          throw new SheetProblem(
            'too_large',
            `Row ${index + 1} of ${sheet.name} has a cell of more than ${CELL_CHARACTERS_MAX} characters. Shorten it and send the file again.`,
          );
      }
      if (characters > CHARACTERS_MAX)
        throw new SheetProblem(
          'too_large',
          'The file holds more text than a schedule ever does. Send one building at a time.',
        );
    });
  }
  return sheets;
}

/**
 * @param {number} count
 * @param {string} name
 */
export function refuseRows(count, name) {
  if (count > ROWS_MAX)
    throw new SheetProblem('too_large', `${name} has more than ${ROWS_MAX} rows. Send it in parts.`);
}

/**
 * @param {number} count
 * @param {string} name
 * @param {number} row
 */
export function refuseColumns(count, name, row) {
  if (count > COLUMNS_MAX)
    throw new SheetProblem(
      'too_large',
      `Row ${row} of ${name} has more than ${COLUMNS_MAX} columns. Delete the columns that are not part of the schedule and send the file again.`,
    );
}
