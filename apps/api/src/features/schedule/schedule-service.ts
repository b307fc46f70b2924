import { Refusal, refuse } from '../../platform/refusal.ts';
import { readSheets, type Sheet } from './read-sheets.ts';
import { sniffFile } from './sniff-file.ts';

export interface UploadedFile {
  name: string;
  bytes: Buffer;
}

/** An uploaded schedule as cells; nothing is stored. */
export async function readSchedule(
  file: UploadedFile | null,
): Promise<{ fileName: string; sheets: Sheet[] } | Refusal> {
  if (file === null) return refuse('invalid', 'Choose a file: a schedule as CSV or XLSX.');
  const sniffed = sniffFile(file.bytes);
  if (sniffed.kind === null) return refuse('unsupported_file', sniffed.message);
  const sheets = await readSheets(sniffed.kind, file.bytes);
  if (sheets instanceof Refusal) return sheets;
  if (sheets.every(({ cells }) => cells.length === 0))
    return refuse(
      'unsupported_file',
      'The file has no cell with anything in it. Send the one that has the schedule.',
    );
  if (sniffed.kind === 'csv' && sheets.every(({ cells }) => cells.every((row) => row.length < 2)))
    return refuse(
      'unsupported_file',
      'This is text without columns. Save the schedule as CSV, with commas or semicolons between the columns, or as XLSX.',
    );
  return { fileName: file.name.slice(0, 200), sheets };
}
