import yauzl from 'yauzl';
import { ENTRIES_MAX, SheetProblem, UNZIPPED_BYTES_MAX } from './sheet-limits.mjs';

const TOO_LARGE =
  'Unpacked, this workbook is far larger than any schedule. Copy the schedule into a new workbook and send that.';
const DAMAGED =
  'This workbook is damaged or was not made by a spreadsheet program. Save it again as XLSX or CSV.';

/**
 * Unpacks an archive against its own table of contents, before anything else reads it: refuses one that unpacks to
 * too much, and one whose table of contents lies.
 * @param {Buffer} bytes
 * @param {(name: string) => boolean} wanted which entries to keep, as text
 * @returns {Promise<Map<string, string>>}
 */
export async function boundedArchive(bytes, wanted) {
  const archive = await yauzl.fromBufferPromise(bytes, { validateEntrySizes: true }).catch(() => {
    throw new SheetProblem('unsupported_file', DAMAGED);
  });
  /** @type {Map<string, string>} */
  const kept = new Map();
  /** @type {import('yauzl').Entry[]} */
  const entries = [];
  let declared = 0;
  try {
    for await (const entry of archive.eachEntry()) {
      entries.push(entry);
      declared += entry.uncompressedSize;
      if (entry.isEncrypted())
        throw new SheetProblem(
          'unsupported_file',
          'This workbook is protected by a password. Take the protection off, save it as XLSX and send it again.',
        );
      if (entries.length > ENTRIES_MAX || declared > UNZIPPED_BYTES_MAX)
        throw new SheetProblem('too_large', TOO_LARGE);
    }
    for (const entry of entries) {
      const keep = wanted(entry.fileName);
      /** @type {Buffer[]} */
      const parts = [];
      for await (const part of await archive.openReadStreamPromise(entry)) if (keep) parts.push(part);
      if (keep) kept.set(entry.fileName, Buffer.concat(parts).toString('utf8'));
    }
  } catch (error) {
    throw error instanceof SheetProblem ? error : new SheetProblem('unsupported_file', DAMAGED);
  }
  return kept;
}
