import { deflateRawSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import writeXlsx from 'write-excel-file/node';
import { zipOf } from '../../../test/zip-of.ts';
import { Refusal } from '../../platform/refusal.ts';
import { readSheets } from './read-sheets.ts';

async function cellsOf(kind: 'csv' | 'xlsx', bytes: Buffer): Promise<string[][]> {
  const sheets = await readSheets(kind, bytes);
  if (sheets instanceof Refusal) throw sheets;
  return sheets[0]!.cells;
}

async function refusalOf(kind: 'csv' | 'xlsx', bytes: Buffer): Promise<Refusal> {
  const sheets = await readSheets(kind, bytes);
  if (!(sheets instanceof Refusal)) throw new Error('it was read');
  return sheets;
}

describe('CSV', () => {
  it.each([
    [
      'with commas',
      'Space,Load\n1,"1,200 VA"\n',
      [
        ['Space', 'Load'],
        ['1', '1,200 VA'],
      ],
    ],
    [
      'with semicolons and decimal commas',
      'Way;kW\n1;1,5\n3;2,25\n',
      [
        ['Way', 'kW'],
        ['1', '1,5'],
        ['3', '2,25'],
      ],
    ],
    [
      'with tabs',
      'Space\tRoom\r\n1\tOffice, east\r\n',
      [
        ['Space', 'Room'],
        ['1', 'Office, east'],
      ],
    ],
    [
      'that begins with a byte order mark',
      '\uFEFFSpace,Wire\n1,#12\n',
      [
        ['Space', 'Wire'],
        ['1', '#12'],
      ],
    ],
    [
      'with a formula',
      'Space,VA\n1,=A1*2\n',
      [
        ['Space', 'VA'],
        ['1', '=A1*2'],
      ],
    ],
    ['that declares its separator', 'sep=|\r\nA|B\r\n', [['A', 'B']]],
  ])('reads a file %s', async (_what, text, cells) => {
    expect(await cellsOf('csv', Buffer.from(text))).toEqual(cells);
  });

  it('reads the encodings in which spreadsheet programs save', async () => {
    const latin = Buffer.from('Room,mm²\nCafé,2.5\n', 'latin1');
    const utf16 = Buffer.from('\uFEFFRoom\tmm²\nCafé\t2.5\n', 'utf16le');
    const cells = [
      ['Room', 'mm²'],
      ['Café', '2.5'],
    ];
    expect(await cellsOf('csv', latin)).toEqual(cells);
    expect(await cellsOf('csv', utf16)).toEqual(cells);
  });

  it('refuses 201 columns and 20,001 rows, and takes 200 and 20,000', async () => {
    const wide = (columns: number) => Buffer.from(`${Array(columns).fill('x').join(',')}\n`);
    const long = (rows: number) => Buffer.from('a,b\n'.repeat(rows));
    expect((await cellsOf('csv', wide(200)))[0]).toHaveLength(200);
    expect(await cellsOf('csv', long(20_000))).toHaveLength(20_000);
    expect(await refusalOf('csv', wide(201))).toMatchObject({
      code: 'too_large',
      message: /more than 200 columns/,
    });
    expect(await refusalOf('csv', long(20_001))).toMatchObject({
      code: 'too_large',
      message: /more than 20000 rows/,
    });
  });

  it('refuses a cell as long as a book', async () => {
    expect(await refusalOf('csv', Buffer.from(`a,${'x'.repeat(4001)}\n`))).toMatchObject({
      code: 'too_large',
    });
  });
});

describe('XLSX', () => {
  it('reads numbers as they are shown, text, dates, truth and formulas', async () => {
    const bytes = await writeXlsx([
      [{ value: 'Space' }, { value: 'Amps' }, { value: 'Pulled' }, { value: 'Done' }, { value: 'Total' }],
      [
        { value: 1, type: Number },
        { value: 0.1 + 0.2, type: Number },
        { value: new Date('2026-03-04T00:00:00Z'), type: Date, format: 'yyyy-mm-dd' },
        { value: true, type: Boolean },
        { value: '=B2*"2"', type: 'Formula' },
      ],
    ]).toBuffer();
    expect(await cellsOf('xlsx', bytes)).toEqual([
      ['Space', 'Amps', 'Pulled', 'Done', 'Total'],
      ['1', '0.3', '2026-03-04', 'TRUE', '=B2*"2"'],
    ]);
  });

  it('refuses an archive that is no workbook', async () => {
    const bytes = zipOf([{ name: 'word/document.xml', bytes: Buffer.from('<w/>') }]);
    expect(await refusalOf('xlsx', bytes)).toMatchObject({
      code: 'unsupported_file',
      message: /save it as XLSX or CSV/,
    });
  });

  it('refuses a bomb by what it declares, before unpacking it', async () => {
    const part = Buffer.alloc(70 * 1024 * 1024, 0x20);
    const bytes = zipOf([{ name: 'xl/worksheets/sheet1.xml', bytes: part }]);
    expect(bytes.length).toBeLessThan(100_000);
    expect(await refusalOf('xlsx', bytes)).toMatchObject({ code: 'too_large', message: /Unpacked/ });
  });

  it('refuses a bomb that declares to be small', async () => {
    const part = Buffer.alloc(70 * 1024 * 1024, 0x20);
    const bytes = zipOf([
      { name: 'xl/workbook.xml', bytes: Buffer.from('<workbook/>') },
      { name: 'xl/worksheets/sheet1.xml', bytes: part, declaredSize: 1000, packed: deflateRawSync(part) },
    ]);
    expect(await refusalOf('xlsx', bytes)).toMatchObject({ code: 'unsupported_file', message: /damaged/ });
  });

  it('refuses an entry that is encrypted', async () => {
    const bytes = zipOf([{ name: 'xl/workbook.xml', bytes: Buffer.from('<workbook/>'), encrypted: true }]);
    expect(await refusalOf('xlsx', bytes)).toMatchObject({ code: 'unsupported_file', message: /password/ });
  });
});

it('ends a reader that takes too long or grows too large', async () => {
  const rows = Buffer.from(`${'a,b,c,d,e,f,g,h\n'.repeat(20_000)}`);
  expect(await readSheets('csv', rows, { timeMs: 1, heapMb: 256, residentMb: 512 })).toMatchObject({
    code: 'too_large',
    message: /too long or too much memory/,
  });
  expect(await readSheets('csv', rows, { timeMs: 10_000, heapMb: 256, residentMb: 1 })).toMatchObject({
    code: 'too_large',
  });
});
