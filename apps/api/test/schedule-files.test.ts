import { readFileSync } from 'node:fs';
import { request as httpRequest } from 'node:http';
import { readSchedule } from '@farlug/contract/routes';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import writeXlsx from 'write-excel-file/node';
import { zipBomb } from '../../../fixtures/uploads/zip-bomb.ts';
import { startTestApi, type TestApi } from './start-test-api.ts';
import { pathOf } from './test-client.ts';
import { signUpFirm, type TestFirm } from './test-firm.ts';
import { zipOf } from './zip-of.ts';

let api: TestApi;
let firm: TestFirm;
beforeAll(async () => {
  api = await startTestApi();
  firm = await signUpFirm(api);
});
afterAll(() => api.close());

const send = (name: string, bytes: Buffer) =>
  firm.admin.call(readSchedule, { params: { firm: firm.firm }, file: { name, bytes } });

const sample = (name: string) => readFileSync(new URL(`../../../fixtures/uploads/${name}`, import.meta.url));

describe('a sample upload', () => {
  it.each([
    ['loft-panel.csv', 1],
    ['hall-board-de.csv', 1],
    ['store-panel.xlsx', 2],
    ['mixed-units.csv', 1],
    ['duplicate-circuits.csv', 1],
    ['two-hundred-columns.csv', 1],
  ])('%s comes back as cells', async (name, sheets) => {
    const { status, body } = await send(name, sample(name));
    expect(status).toBe(200);
    expect(body.sheets).toHaveLength(sheets);
    expect(Math.max(...body.sheets.map(({ cells }) => cells.length))).toBeGreaterThan(1);
  });

  it('with formulas shows them as text', async () => {
    const { body } = await send('formulas.xlsx', sample('formulas.xlsx'));
    const cells = body.sheets.flatMap((sheet) => sheet.cells.flat());
    expect(cells.filter((cell) => cell.startsWith('=')).length).toBeGreaterThan(0);
  });

  it('that is no workbook, or unpacks to 300 MB, is refused', async () => {
    expect((await send('not-a-workbook.xlsx', sample('not-a-workbook.xlsx'))).error.code).toBe(
      'unsupported_file',
    );
    expect((await send('bomb.xlsx', zipBomb(300, true))).error.code).toBe('too_large');
    expect((await send('bomb.xlsx', zipBomb(300, false))).error.code).toBe('unsupported_file');
  });
});

describe('a schedule file', () => {
  it('comes back as cells, whatever its name says', async () => {
    const csv = Buffer.from('Space;Load\n1;1,5 kW\n');
    const { status, body } = await send('lüfter.xlsx', csv);
    expect(status).toBe(200);
    expect(body).toEqual({
      fileName: 'lüfter.xlsx',
      sheets: [
        {
          name: 'CSV',
          cells: [
            ['Space', 'Load'],
            ['1', '1,5 kW'],
          ],
        },
      ],
    });
    const xlsx = await writeXlsx([[{ value: 'Space' }], [{ value: 7, type: Number }]], {
      sheet: 'LP-1',
    }).toBuffer();
    expect((await send('schedule.csv', xlsx)).body.sheets).toEqual([
      { name: 'LP-1', cells: [['Space'], ['7']] },
    ]);
  });

  it.each([
    ['a PDF', Buffer.from('%PDF-1.7\n'), /PDF/],
    ['a picture', Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a]), /picture/],
    ['an old workbook', Buffer.from([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1, 0, 0]), /old XLS/],
    [
      'a protected workbook',
      Buffer.concat([
        Buffer.from([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1]),
        Buffer.from('EncryptedPackage', 'utf16le'),
      ]),
      /password/,
    ],
    ['a job file', Buffer.from('{"format":"farlug/1"}'), /job file is uploaded from the list of jobs/],
    ['a web page', Buffer.from('<!DOCTYPE html><table></table>'), /page/],
    ['bytes', Buffer.from([1, 2, 3, 0, 4]), /not a text file/],
    ['nothing', Buffer.alloc(0), /empty/],
    ['plain text', Buffer.from('A letter about the job.\nIt holds no sheet.\n'), /without columns/],
    ['only separators', Buffer.from(',,,\n,,,\n'), /no cell/],
    ['another archive', zipOf([{ name: 'a.txt', bytes: Buffer.from('a') }]), /save it as XLSX or CSV/],
  ])('that is %s is refused with what would be right', async (_what, bytes, message) => {
    const { status, error } = await send('schedule.csv', bytes);
    expect(status).toBe(415);
    expect(error).toMatchObject({ code: 'unsupported_file', message: expect.stringMatching(message) });
  });

  it('of 200 columns is read, of 201 refused', async () => {
    const columns = (count: number) =>
      Buffer.from(Array.from({ length: count }, (_, i) => `c${i}`).join(','));
    expect((await send('wide.csv', columns(200))).body.sheets[0]?.cells[0]).toHaveLength(200);
    expect(await send('wide.csv', columns(201))).toMatchObject({ status: 413, error: { code: 'too_large' } });
  });

  it('that unpacks to far more than it weighs is refused', async () => {
    const bytes = zipOf([{ name: 'xl/worksheets/sheet1.xml', bytes: Buffer.alloc(80 * 1024 * 1024, 32) }]);
    expect(await send('bomb.xlsx', bytes)).toMatchObject({
      status: 413,
      error: { code: 'too_large', message: expect.stringMatching(/Unpacked/) },
    });
  });

  it('of more than 5 MB is refused, also where its size is not said before', async () => {
    const { status, error } = await send('large.csv', Buffer.alloc(5 * 1024 * 1024 + 1, 'a,'));
    expect(status).toBe(413);
    expect(error.message).toMatch(/larger than 5 MB/);
    expect(await sendChunks(6)).toBe(413);
  });

  it('of 50 MB is refused by what its header says, before it is kept', async () => {
    const before = process.memoryUsage.rss();
    const { status, error } = await send('huge.csv', Buffer.alloc(50 * 1024 * 1024, 'a,'));
    expect(status).toBe(413);
    expect(error.code).toBe('too_large');
    expect(await answerBeforeBody(50 * 1024 * 1024)).toBe(413);
    expect(process.memoryUsage.rss() - before).toBeLessThan(400 * 1024 * 1024);
  });

  it('must come alone, in the field "file"', async () => {
    const { agent, csrfToken } = firm.admin;
    const path = pathOf(readSchedule, { firm: firm.firm });
    const other = await agent
      .post(path)
      .set('x-csrf-token', csrfToken)
      .attach('other', Buffer.from('a,b'), 'a.csv');
    expect(other.body.error.code).toBe('bad_request');
    const json = await agent.post(path).set('x-csrf-token', csrfToken).send({ file: 'a,b' });
    expect(json.body.error.code).toBe('bad_request');
    const none = await agent
      .post(path)
      .set('x-csrf-token', csrfToken)
      .type('multipart/form-data; boundary=b')
      .send('--b--\r\n');
    expect(none.body.error).toMatchObject({
      code: 'invalid',
      message: expect.stringMatching(/Choose a file/),
    });
  });
});

function begin(headers: Record<string, string>) {
  const url = new URL(pathOf(readSchedule, { firm: firm.firm }), api.url);
  const cookie = firm.admin.agent.jar
    .getCookies({ domain: '127.0.0.1', path: '/', secure: false, script: false })
    .toValueString();
  return httpRequest(url, {
    method: 'POST',
    headers: {
      'content-type': 'multipart/form-data; boundary=b',
      'x-csrf-token': firm.admin.csrfToken,
      cookie,
      ...headers,
    },
  });
}

/** Sends a file in chunks, without a length. */
function sendChunks(megabytes: number): Promise<number> {
  return new Promise((resolve, reject) => {
    const call = begin({ 'transfer-encoding': 'chunked' });
    call.once('response', (response) => {
      response.resume();
      resolve(response.statusCode ?? 0);
    });
    call.once('error', reject);
    call.write('--b\r\ncontent-disposition: form-data; name="file"; filename="a.csv"\r\n\r\n');
    for (let sent = 0; sent < megabytes; sent += 1) call.write(Buffer.alloc(1024 * 1024, 'a,'));
    call.end('\r\n--b--\r\n');
  });
}

/** Says how much it would send, sends nothing, and has its answer. */
function answerBeforeBody(bytes: number): Promise<number> {
  return new Promise((resolve, reject) => {
    const call = begin({ 'content-length': String(bytes) });
    call.once('response', (response) => {
      resolve(response.statusCode ?? 0);
      call.destroy();
    });
    call.once('error', reject);
    call.flushHeaders();
  });
}
