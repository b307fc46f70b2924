import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { listMail, openAttachment, readMail } from '@farlug/contract/routes';
import { createTransport } from 'nodemailer';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { MailStore } from '../src/features/mailbox/mail-store.ts';
import { startSmtpSink } from '../src/features/mailbox/smtp-sink.ts';
import { startTestApi, type TestApi } from './start-test-api.ts';

const directory = mkdtempSync(path.join(tmpdir(), 'farlug-mail-'));
let api: TestApi;
let closed: TestApi;
beforeAll(async () => {
  api = await startTestApi({ config: { local: true, mailboxDir: directory } });
  closed = await startTestApi({ config: { mailboxDir: directory } });
});
afterAll(async () => {
  await Promise.all([api.close(), closed.close()]);
  rmSync(directory, { recursive: true, force: true });
});

async function deliver(...subjects: string[]): Promise<void> {
  const sink = await startSmtpSink({ host: '127.0.0.1', port: 0 }, new MailStore(directory), api.deps.log);
  const transport = createTransport({ host: '127.0.0.1', port: sink.port });
  for (const subject of subjects)
    await transport.sendMail({
      from: 'Farlug <reports@farlug.example>',
      to: ['Ida Brook <ida@town.example>', 'office@town.example'],
      subject,
      text: 'Voltage drop: see the report.\n',
      attachments: [
        {
          filename: 'kiln-house-r1.pdf',
          content: Buffer.from('%PDF-1.7 drop'),
          contentType: 'application/pdf',
        },
        { filename: 'page.html', content: '<script>1</script>', contentType: 'text/html' },
      ],
    });
  transport.close();
  await sink.close();
}

it('keeps what arrives by SMTP, newest first, through a restart of the server', async () => {
  await deliver('First report');
  await deliver('Second report ½');
  const { messages } = (await api.client().call(listMail)).body;
  expect(messages.map(({ subject }) => subject)).toEqual(['Second report ½', 'First report']);
  expect(messages[0]).toMatchObject({ to: ['ida@town.example', 'office@town.example'] });
});

it('shows a message and opens its attachments; only a PDF inside the browser', async () => {
  await deliver('With attachments');
  const client = api.client();
  const message = (await client.call(listMail)).body.messages[0]!.id;
  const { body } = await client.call(readMail, { params: { message } });
  expect(body.text.trim()).toBe('Voltage drop: see the report.');
  expect(body.attachments).toEqual([
    { index: 0, name: 'kiln-house-r1.pdf', type: 'application/pdf', bytes: 13 },
    { index: 1, name: 'page.html', type: 'text/html', bytes: 18 },
  ]);
  const pdf = await client.call(openAttachment, { params: { message, index: 0 } });
  expect(pdf.bytes.toString()).toBe('%PDF-1.7 drop');
  expect(pdf.headers).toMatchObject({
    'content-type': 'application/pdf',
    'content-disposition': expect.stringMatching(/^inline; filename="kiln-house-r1\.pdf"/),
  });
  const page = await client.call(openAttachment, { params: { message, index: 1 } });
  expect(page.headers).toMatchObject({
    'content-type': 'application/octet-stream',
    'content-disposition': expect.stringMatching(/^attachment/),
    'x-content-type-options': 'nosniff',
  });
});

it('finds nothing that is not in the mailbox', async () => {
  const client = api.client();
  for (const message of ['../../etc/passwd', '0000000000000-00000000-0000-0000-0000-000000000000', 'x']) {
    expect((await client.call(readMail, { params: { message } })).error.code).toBe('not_found');
    expect((await client.call(openAttachment, { params: { message, index: 0 } })).error.code).toBe(
      'not_found',
    );
  }
});

it('is not there without the local flag', async () => {
  const client = closed.client();
  expect((await client.call(listMail)).error.code).toBe('not_found');
  expect((await client.refresh()).local).toBe(false);
  expect((await api.client().refresh()).local).toBe(true);
});
