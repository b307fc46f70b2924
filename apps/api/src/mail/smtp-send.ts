import { Readable } from 'node:stream';
import MailComposer from 'nodemailer/lib/mail-composer';
import SMTPConnection from 'nodemailer/lib/smtp-connection';

export interface Letter {
  from: string;
  to: { name: string; address: string };
  subject: string;
  text: string;
  html: string;
  messageId: string;
  attachments: { filename: string; content: Buffer; contentType: string }[];
}

/**
 * How sending a message ended. `refused` before or after its body by an answer of the server: nothing was delivered,
 * and `retry` says whether later may be better. `lost`: the connection ended after the body began to go out, without
 * an answer: nobody knows.
 */
export type SendOutcome =
  | { kind: 'sent'; response: string }
  | { kind: 'refused'; retry: boolean; reason: string }
  | { kind: 'lost'; reason: string };

interface SmtpError extends Error {
  code?: string;
  responseCode?: number;
}

const CONNECT_MS = 15_000;
const SILENCE_MS = 60_000;
/** Less than the queue gives an attempt, so that how it ended is always written down. */
const ALTOGETHER_MS = 100_000;

/** Sends one message over SMTP (RFC 5321), knowing at every moment whether its body has begun to go out. */
export async function sendBySmtp(smtpUrl: string, letter: Letter): Promise<SendOutcome> {
  const message = await compose(letter);
  const connection = new SMTPConnection(connectionOptions(smtpUrl));
  const broken = brokenOff(connection);
  let bodyBegan = false;
  const body = new Readable({
    read() {
      bodyBegan = true;
      this.push(message);
      this.push(null);
    },
  });
  try {
    await Promise.race([broken.off, connect(connection)]);
    await Promise.race([broken.off, logIn(connection, smtpUrl)]);
    const response = await Promise.race([broken.off, transmit(connection, letter, body)]);
    connection.quit();
    return { kind: 'sent', response };
  } catch (error) {
    connection.close();
    return outcomeOf(error as SmtpError, bodyBegan);
  } finally {
    broken.forget();
  }
}

/** Rejects when the connection fails, ends, or takes too long in all, whatever is being waited for. */
function brokenOff(connection: SMTPConnection): { off: Promise<never>; forget: () => void } {
  let timer: NodeJS.Timeout | undefined;
  const off = new Promise<never>((_resolve, reject) => {
    // Stays on the connection: what happens to it after the message was taken is nobody's concern.
    connection.on('error', reject);
    connection.once('end', () => reject(new Error('The server closed the connection.')));
    timer = setTimeout(() => reject(new Error('The server took too long.')), ALTOGETHER_MS);
  });
  off.catch(() => {});
  return { off, forget: () => clearTimeout(timer) };
}

const connect = (connection: SMTPConnection): Promise<void> =>
  new Promise((resolve, reject) => {
    connection.connect((error) => (error ? reject(error) : resolve()));
  });

const transmit = (connection: SMTPConnection, letter: Letter, body: Readable): Promise<string> =>
  new Promise((resolve, reject) => {
    const envelope = { from: addressOf(letter.from), to: [letter.to.address] };
    connection.send(envelope, body, (error, info) => (error ? reject(error) : resolve(info.response)));
  });

function outcomeOf(error: SmtpError, bodyBegan: boolean): SendOutcome {
  const reason = error.message;
  if (error.responseCode !== undefined) return { kind: 'refused', retry: error.responseCode < 500, reason };
  if (bodyBegan) return { kind: 'lost', reason };
  // Name resolution, refused connections and silence before the message may pass; a broken address will not.
  return { kind: 'refused', retry: error.code !== 'EENVELOPE', reason };
}

const compose = (letter: Letter): Promise<Buffer> =>
  new MailComposer({
    from: letter.from,
    to: letter.to,
    subject: letter.subject,
    text: letter.text,
    html: letter.html,
    messageId: letter.messageId,
    attachments: letter.attachments,
    disableFileAccess: true,
    disableUrlAccess: true,
  })
    .compile()
    .build();

const addressOf = (from: string): string => /<([^>]+)>/.exec(from)?.[1] ?? from;

const LOOPBACK = /^(127\.|localhost$|\[?::1\]?$)/;

function connectionOptions(smtpUrl: string) {
  const url = new URL(smtpUrl);
  const secure = url.protocol === 'smtps:';
  return {
    host: url.hostname.replace(/^\[|\]$/g, ''),
    port: Number(url.port || (secure ? 465 : 587)),
    secure,
    // A password never goes out in the clear, except to this machine itself.
    requireTLS: !secure && url.username !== '' && !LOOPBACK.test(url.hostname),
    ignoreTLS: LOOPBACK.test(url.hostname),
    connectionTimeout: CONNECT_MS,
    greetingTimeout: CONNECT_MS,
    socketTimeout: SILENCE_MS,
    disableFileAccess: true,
  };
}

function logIn(connection: SMTPConnection, smtpUrl: string): Promise<void> {
  const { username, password } = new URL(smtpUrl);
  if (username === '') return Promise.resolve();
  return new Promise((resolve, reject) => {
    connection.login({ user: decodeURIComponent(username), pass: decodeURIComponent(password) }, (error) =>
      error ? reject(error) : resolve(),
    );
  });
}
