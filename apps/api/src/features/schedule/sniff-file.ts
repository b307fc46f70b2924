export type SheetKind = 'csv' | 'xlsx';
export type Sniffed = { kind: SheetKind } | { kind: null; message: string };

const WANTED = 'Save the schedule as CSV or XLSX and send that.';
const SIGNATURES: readonly [bytes: readonly number[], what: string][] = [
  [[0x25, 0x50, 0x44, 0x46], 'a PDF'],
  [[0x89, 0x50, 0x4e, 0x47], 'a picture'],
  [[0xff, 0xd8, 0xff], 'a picture'],
  [[0x47, 0x49, 0x46, 0x38], 'a picture'],
  [[0x1f, 0x8b], 'a compressed archive'],
  [[0x37, 0x7a, 0xbc, 0xaf], 'a compressed archive'],
  [[0x52, 0x61, 0x72, 0x21], 'a compressed archive'],
  [[0x7f, 0x45, 0x4c, 0x46], 'a program'],
  [[0x4d, 0x5a], 'a program'],
];
const ZIP = [0x50, 0x4b, 0x03, 0x04];
const EMPTY_ZIP = [0x50, 0x4b, 0x05, 0x06];
const COMPOUND = [0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1];

/** What a file is by its content, whatever its name says. */
export function sniffFile(bytes: Buffer): Sniffed {
  if (bytes.length === 0) return no('The file is empty.');
  if (startsWith(bytes, ZIP)) return { kind: 'xlsx' };
  if (startsWith(bytes, EMPTY_ZIP)) return no(`This is an empty archive. ${WANTED}`);
  if (startsWith(bytes, COMPOUND))
    return bytes.includes(Buffer.from('EncryptedPackage', 'utf16le'))
      ? no(
          'This workbook is protected by a password. Take the protection off, save it as XLSX and send it again.',
        )
      : no('This is a workbook in the old XLS format. Save it as XLSX or CSV and send that.');
  const known = SIGNATURES.find(([signature]) => startsWith(bytes, signature));
  if (known) return no(`This is ${known[1]}, not a schedule in cells. ${WANTED}`);
  return sniffText(bytes);
}

const no = (message: string): Sniffed => ({ kind: null, message });

function sniffText(bytes: Buffer): Sniffed {
  if (!hasUtf16Mark(bytes) && bytes.includes(0)) return no(`This is not a text file. ${WANTED}`);
  const start = bytes
    .subarray(0, 2000)
    .toString('latin1')
    .replace(/^\xef\xbb\xbf/, '')
    .trimStart();
  if (/^<(!doctype|html|\?xml|table|svg)/i.test(start)) return no(`This is a page or XML file. ${WANTED}`);
  if (/^[{[]\s*["{[\]}]/.test(start))
    return no(
      'This is a JSON file. A job file is uploaded from the list of jobs; a schedule must be CSV or XLSX.',
    );
  return { kind: 'csv' };
}

function hasUtf16Mark(bytes: Buffer): boolean {
  return startsWith(bytes, [0xff, 0xfe]) || startsWith(bytes, [0xfe, 0xff]);
}

function startsWith(bytes: Buffer, signature: readonly number[]): boolean {
  return signature.every((byte, index) => bytes[index] === byte);
}
