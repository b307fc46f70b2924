import { once } from 'node:events';
import { type AddressInfo, createServer, type Socket } from 'node:net';
import { afterAll, afterEach, beforeAll, expect, it } from 'vitest';
import { type Letter, sendBySmtp } from '../src/mail/smtp-send.ts';
import { startTestMailServer, type TestMailServer } from './test-mail-server.ts';
import { pdfSaying } from './test-report.ts';

let server: TestMailServer;
beforeAll(async () => {
  server = await startTestMailServer();
});
afterEach(() => server.fail({}));
afterAll(() => server.close());

const letter: Letter = {
  from: 'Farlug <reports@farlug.example>',
  to: { name: 'Råd & Öst', address: 'osei@inspect.example' },
  subject: 'Kiln House: voltage drop report, revision A — ½',
  text: 'One line.\n.\nA line of one full stop stands above.\n',
  html: '<p>One line.</p>',
  messageId: '<a-1@farlug.example>',
  attachments: [{ filename: 'kiln.pdf', content: pdfSaying('Revision A'), contentType: 'application/pdf' }],
};

it('hands over a message whole, and says what the server answered', async () => {
  const outcome = await sendBySmtp(server.url, letter);
  expect(outcome).toMatchObject({ kind: 'sent', response: expect.stringMatching(/^250/) });
  const mail = server.mails.at(-1)!;
  expect(mail.messageId).toBe(letter.messageId);
  expect(mail.subject).toBe(letter.subject);
  expect(mail.to).toMatchObject({ value: [{ name: 'Råd & Öst', address: 'osei@inspect.example' }] });
  expect(mail.from).toMatchObject({ value: [{ name: 'Farlug', address: 'reports@farlug.example' }] });
  expect(mail.text?.trim()).toBe(letter.text.trim());
  expect(mail.attachments).toMatchObject([{ filename: 'kiln.pdf', contentType: 'application/pdf' }]);
  expect(mail.attachments[0]?.content).toEqual(letter.attachments[0]?.content);
});

it('logs in where the address names a person', async () => {
  const withLogin = (password: string) => server.url.replace('//', `//mail%40firm:${password}@`);
  expect(await sendBySmtp(withLogin('right'), letter)).toMatchObject({ kind: 'sent' });
  expect(await sendBySmtp(withLogin('wrong'), letter)).toMatchObject({
    kind: 'refused',
    retry: false,
    reason: expect.stringMatching(/535/),
  });
});

it.each([
  ['an answer to come back later', { recipient: 450 }, true, /450/],
  ['a recipient that is not wanted', { recipient: 550 }, false, /550/],
  ['a message that is not taken for now', { message: 452 }, true, /452/],
  ['a message that is not wanted', { message: 554 }, false, /554/],
  ['a connection that ends before the message', { dropAt: 'recipient' as const }, true, /closed/],
])('tells from its answer what became of %s', async (_what, faults, retry, reason) => {
  server.fail(faults);
  const before = server.mails.length;
  expect(await sendBySmtp(server.url, letter)).toEqual({
    kind: 'refused',
    retry,
    reason: expect.stringMatching(reason),
  });
  expect(server.mails).toHaveLength(before);
});

it('is refused, and may come back, where the connection ends at the login or nobody listens', async () => {
  server.fail({ dropAt: 'login' });
  const withLogin = server.url.replace('//', '//mail:right@');
  expect(await sendBySmtp(withLogin, letter)).toMatchObject({ kind: 'refused', retry: true });
  const closed = await startTestMailServer();
  await closed.close();
  expect(await sendBySmtp(closed.url, letter)).toMatchObject({
    kind: 'refused',
    retry: true,
    reason: expect.stringMatching(/ECONNREFUSED/),
  });
});

it.each(['message', 'taken'] as const)(
  'does not know what became of a message whose connection ended after it began to go out (%s)',
  async (dropAt) => {
    server.fail({ dropAt });
    expect(await sendBySmtp(server.url, letter)).toMatchObject({ kind: 'lost' });
  },
);

it('has sent what was taken, even where the connection is torn down right after', async () => {
  const answers: [RegExp, string][] = [
    [/^(EHLO|MAIL|RCPT)/, '250 yes'],
    [/^DATA/, '354 go on'],
    [/^\.$/, '250 taken'],
  ];
  const sockets: Socket[] = [];
  const rude = createServer((socket) => {
    sockets.push(socket);
    socket.on('error', () => {});
    socket.write('220 here\r\n');
    socket.on('data', (bytes) => {
      for (const line of bytes.toString().split('\r\n')) {
        const found = answers.find(([asked]) => asked.test(line));
        if (found) socket.write(`${found[1]}\r\n`);
        if (line === 'QUIT') socket.resetAndDestroy();
      }
    });
  });
  rude.listen(0, '127.0.0.1');
  await once(rude, 'listening');
  const { port } = rude.address() as AddressInfo;
  expect(await sendBySmtp(`smtp://127.0.0.1:${port}`, letter)).toMatchObject({ kind: 'sent' });
  await expect.poll(() => sockets.every(({ destroyed }) => destroyed)).toBe(true);
  rude.close();
});
