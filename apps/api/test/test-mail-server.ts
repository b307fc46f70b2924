import { once } from 'node:events';
import type { AddressInfo, Socket } from 'node:net';
import { type ParsedMail, simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

/** What the server does wrong: an answer to the recipient or to the message, or a connection that ends. */
export interface MailFaults {
  recipient?: number;
  message?: number;
  /** `never`: the message is read and no answer ever comes. */
  dropAt?: 'recipient' | 'message' | 'login' | 'taken' | 'never';
}

export interface TestMailServer {
  url: string;
  /** What was taken, in order. */
  mails: ParsedMail[];
  /** How many connections there were. */
  connections: () => number;
  /** How many messages wait for an answer that does not come. */
  hanging: () => number;
  fail: (faults: MailFaults) => void;
  close: () => Promise<void>;
}

const answer = (responseCode: number) =>
  Object.assign(new Error(responseCode < 500 ? 'busy, come back later' : 'not wanted here'), {
    responseCode,
  });

/** A real SMTP server on loopback that can be told to fail. */
export async function startTestMailServer(port = 0): Promise<TestMailServer> {
  const mails: ParsedMail[] = [];
  const sockets = new Set<Socket>();
  let count = 0;
  let hanging = 0;
  let faults: MailFaults = {};
  const drop = () => {
    for (const socket of sockets) socket.destroy();
  };
  const server = new SMTPServer({
    authOptional: true,
    allowInsecureAuth: true,
    disabledCommands: ['STARTTLS'],
    disableReverseLookup: true,
    onAuth(login, _session, done) {
      if (faults.dropAt === 'login') drop();
      else if (login.password === 'right') done(null, { user: login.username });
      else done(Object.assign(new Error('wrong password'), { responseCode: 535 }));
    },
    onRcptTo(_address, _session, done) {
      if (faults.dropAt === 'recipient') drop();
      else done(faults.recipient ? answer(faults.recipient) : null);
    },
    onData(stream, _session, done) {
      const parts: Buffer[] = [];
      stream.on('data', (part: Buffer) => {
        parts.push(part);
        if (faults.dropAt === 'message') drop();
      });
      stream.once('error', () => {});
      stream.once('end', () => {
        if (faults.dropAt === 'message') return;
        if (faults.dropAt === 'never') {
          hanging += 1;
          return;
        }
        if (faults.message) {
          done(answer(faults.message));
          return;
        }
        void simpleParser(Buffer.concat(parts)).then((mail) => {
          mails.push(mail);
          if (faults.dropAt === 'taken') drop();
          else done(null, 'taken');
        });
      });
    },
  });
  server.on('error', () => {});
  server.server.on('connection', (socket: Socket) => {
    count += 1;
    sockets.add(socket);
    socket.once('close', () => sockets.delete(socket));
  });
  const listening = once(server.server, 'listening');
  server.listen(port, '127.0.0.1');
  await listening;
  return {
    url: `smtp://127.0.0.1:${(server.server.address() as AddressInfo).port}`,
    mails,
    connections: () => count,
    hanging: () => hanging,
    fail: (wanted) => {
      faults = wanted;
    },
    close: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        drop();
      }),
  };
}

/** The one personal link of a message. */
export function linkIn(mail: ParsedMail | undefined): { page: string; token: string } {
  const [, page, token] = /https?:\/\/[^/\s]+(\/\w+)#([\w-]+)/.exec(mail?.text ?? '') ?? [];
  if (!page || !token) throw new Error('the message has no link');
  return { page, token };
}
